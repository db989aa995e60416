import { useState } from 'react';
import type { NoticeView } from '@mereward/shared/notices/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { useNotices, useTakeDown } from '@/features/notices/api';
import { NoticeForm } from '@/features/notices/notice-form';
import { AUDIENCE_WORDS, SEVERITY_KINDS, SEVERITY_WORDS } from '@/features/notices/notice-words';
import { dayAndTime } from '@/lib/format-time';

/** What the fishery tells its visitors: written, changed and taken down. */
export function NoticesScreen() {
  const fishery = useChosenFishery(['owner', 'manager', 'head_bailiff', 'office']);
  return (
    <Page title="Notices" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fishery}
        none={
          <Empty title="No fishery">
            The owner, a manager, the office or the head bailiff writes notices.
          </Empty>
        }
      >
        {(fisheryId) => (
          <Notices
            fisheryId={fisheryId}
            lakes={fishery.chosen?.id === fisheryId ? fishery.chosen.lakes : []}
          />
        )}
      </ChosenFishery>
    </Page>
  );
}

type Ground = { fisheryId: string; lakes: readonly { id: string; name: string }[] };

function Notices({ fisheryId, lakes }: Ground) {
  const fishery = useFishery(fisheryId);
  const notices = useNotices(fisheryId);
  const [writing, setWriting] = useState<NoticeView | 'new' | null>(null);
  return (
    <Loaded query={fishery} waiting="Reading the fishery…">
      {({ details: { zone } }) => (
        <Loaded query={notices} waiting="Reading the notices…">
          {({ notices: all, may }) =>
            writing === null ? (
              <>
                {may.write ? (
                  <View style={{ alignItems: 'flex-start' }}>
                    <Button label="Write a notice" kind="main" onPress={() => setWriting('new')} />
                  </View>
                ) : null}
                {all.length === 0 ? (
                  <Empty title="No notice is up">
                    A notice is shown at the front door, on its lakes and on tickets.
                  </Empty>
                ) : null}
                {all.map((notice) => (
                  <UpNow
                    key={notice.id}
                    notice={notice}
                    zone={zone}
                    lakes={lakes}
                    onChange={() => setWriting(notice)}
                  />
                ))}
              </>
            ) : (
              <Section title={writing === 'new' ? 'A new notice' : 'Change the notice'} bare>
                <NoticeForm
                  fisheryId={fisheryId}
                  zone={zone}
                  lakes={lakes}
                  notice={writing === 'new' ? null : writing}
                  onDone={() => setWriting(null)}
                />
              </Section>
            )
          }
        </Loaded>
      )}
    </Loaded>
  );
}

type UpProps = { notice: NoticeView; zone: string; lakes: Ground['lakes']; onChange: () => void };

function UpNow({ notice, zone, lakes, onChange }: UpProps) {
  const [asking, setAsking] = useState(false);
  const takeDown = useTakeDown();
  const { severity, details, from, until, lakeIds } = notice;
  const where =
    lakeIds.length === 0
      ? 'The whole fishery'
      : lakes.flatMap(({ id, name }) => (lakeIds.includes(id) ? [name] : [])).join(', ');
  return (
    <Note kind={SEVERITY_KINDS[severity]} title={`${SEVERITY_WORDS[severity]}. ${details.title}`}>
      <Text>{details.text}</Text>
      <Text size="small" tone="inkSoft">
        {`${where} · ${AUDIENCE_WORDS[details.audience]} · from ${dayAndTime(from, zone)}${until === null ? '' : ` until ${dayAndTime(until, zone)}`}`}
      </Text>
      {notice.may.change ? (
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          <Button label="Change" spoken={`Change: ${details.title}`} onPress={onChange} />
          <Button
            label="Take down"
            kind="quiet"
            spoken={`Take down: ${details.title}`}
            onPress={() => setAsking(true)}
          />
        </View>
      ) : (
        <Text size="small" tone="inkSoft">
          It belongs to a closure, and goes when that is lifted.
        </Text>
      )}
      <ProblemNote problem={takeDown.error} />
      <Confirm
        open={asking}
        title="Take this notice down?"
        words={`Nobody reads “${details.title}” any more. It stays on record.`}
        act="Take it down"
        busy={takeDown.isPending}
        onClose={() => setAsking(false)}
        onAct={() => takeDown.mutate(notice.id, { onSettled: () => setAsking(false) })}
      />
    </Note>
  );
}
