import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { LOG_MOST_BYTES, LOG_MOST_FILES, LOG_MOST_SOUNDINGS } from '@mereward/shared/surveys/log-contract';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Progress } from '@/components/progress';
import { Text } from '@/components/text';
import { useVisit } from '@/features/surveys/api';
import { logKeys, sendLog } from '@/features/surveys/log-api';
import { figure } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { pickFiles } from '@/lib/pick-file';
import type { PickedFile } from '@/lib/picked';

const MOST_MB = LOG_MOST_BYTES / 1024 / 1024;

/** Brings the files of a log to a visit. They are looked at before anything is taken in. */
export function LogNewScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const back = { label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` } as const;
  if (visit.data?.visit.may.correct)
    return <Bring visitId={visitId} over={visit.data.visit.lakeName} back={back} />;
  return (
    <Page title="Bring in a log" back={back}>
      <Loaded query={visit} waiting="Reading the visit…">
        {() => (
          <Empty
            title="Not yours to add to"
            action={<LinkButton label="To the visit" href={back.href} bank />}
          >
            Managers and bailiffs bring logs to a visit.
          </Empty>
        )}
      </Loaded>
    </Page>
  );
}

type Props = { visitId: string; over: string; back: { label: string; href: `/bank/surveys/${string}` } };

function Bring({ visitId, over, back }: Props) {
  const router = useRouter();
  const queries = useQueryClient();
  const [id, setId] = useState(newId);
  const [files, setFiles] = useState<PickedFile[]>([]);
  const [share, setShare] = useState(0);
  const sending = useMutation({
    mutationFn: (chosen: readonly PickedFile[]) => sendLog({ visitId, id, files: chosen, onShare: setShare }),
    onSuccess: (log) => {
      queries.setQueryData(logKeys.one(log.id), log);
      void queries.invalidateQueries({ queryKey: logKeys.ofVisit(visitId) });
      router.replace(`/bank/surveys/${visitId}/logs/${log.id}`);
    },
  });
  const fault = faultOf(files);
  const choose = async (): Promise<void> => {
    const chosen = await pickFiles();
    if (chosen.length === 0) return;
    sending.reset();
    setShare(0);
    setId(newId());
    setFiles(chosen);
    if (faultOf(chosen) === null) sending.mutate(chosen);
  };
  return (
    <Page
      title="Bring in a log"
      over={over}
      back={back}
      actions={
        <Button
          label={files.length > 0 ? 'Other files' : 'Choose files'}
          kind={files.length > 0 ? 'plain' : 'main'}
          bank
          grow
          busy={sending.isPending}
          busyLabel="Sending…"
          onPress={() => void choose()}
        />
      }
    >
      {fault ? (
        <Note kind="danger" title={fault} live>
          Nothing was sent. Bring the log in parts.
        </Note>
      ) : null}
      {sending.isPending ? (
        <Progress
          label={share < 1 ? `Sending ${namesOf(files)}` : 'All of it has gone; waiting for the answer'}
          share={share}
        />
      ) : null}
      <ProblemNote problem={sending.error} />
      {sending.error && fault === null ? (
        <Button label="Send again" bank onPress={() => sending.mutate(files)} />
      ) : null}
      <Text>
        What an echo sounder on a boat recorded: NMEA 0183, GPX with depths, GeoJSON points, or a table with
        latitude, longitude and depth. Where places and depths are in files of their own, choose them
        together.
      </Text>
      <Text tone="inkSoft">
        {`You see on the lake how it is read before anything is taken in. The visit’s gauge board brings the depths to chart datum. At most ${figure(LOG_MOST_FILES)} files, ${figure(MOST_MB)} MB and ${figure(LOG_MOST_SOUNDINGS)} soundings at once.`}
      </Text>
    </Page>
  );
}

const namesOf = (files: readonly PickedFile[]): string => files.map(({ name }) => name).join(', ');

function faultOf(files: readonly PickedFile[]): string | null {
  if (files.length > LOG_MOST_FILES)
    return `These are ${files.length} files; at most ${LOG_MOST_FILES} go together`;
  const bytes = files.reduce((sum, { file }) => sum + file.size, 0);
  return bytes > LOG_MOST_BYTES ? `These files are larger than ${MOST_MB} MB together` : null;
}
