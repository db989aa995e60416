import { useState } from 'react';
import type { NoticeView } from '@mereward/shared/notices/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useNotices } from '@/features/notices/api';
import { mayPutAway, SEVERITY_KINDS, SEVERITY_WORDS } from '@/features/notices/notice-words';

type Props = {
  fisheryId: string;
  /** Only what is said of this lake or of the whole fishery. */
  lakeId?: string | undefined;
};

/** What a fishery tells its visitors now, the gravest first. Nothing is shown where nothing is said. */
export function NoticesHere({ fisheryId, lakeId }: Props) {
  const notices = useNotices(fisheryId);
  const [nowMs] = useState(() => Date.now());
  const [away, setAway] = useState<ReadonlySet<string>>(new Set());
  const shown = (notices.data?.notices ?? []).filter(
    (notice) =>
      holdsNow(notice, nowMs) &&
      !away.has(notice.id) &&
      (lakeId === undefined || notice.lakeIds.length === 0 || notice.lakeIds.includes(lakeId)),
  );
  if (shown.length === 0) return null;
  return (
    <View style={{ gap: space.small }}>
      {shown.map((notice) => (
        <OneNotice key={notice.id} notice={notice} onAway={() => setAway(new Set([...away, notice.id]))} />
      ))}
    </View>
  );
}

const holdsNow = ({ from, until }: NoticeView, nowMs: number): boolean =>
  Date.parse(from) <= nowMs && (until === null || Date.parse(until) > nowMs);

function OneNotice({ notice, onAway }: { notice: NoticeView; onAway: () => void }) {
  const { severity, details } = notice;
  return (
    <Note kind={SEVERITY_KINDS[severity]} title={`${SEVERITY_WORDS[severity]}. ${details.title}`}>
      <Text>{details.text}</Text>
      {mayPutAway(severity) ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="Put away" kind="quiet" spoken={`Put away: ${details.title}`} onPress={onAway} />
        </View>
      ) : null}
    </Note>
  );
}
