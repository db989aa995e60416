import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { LogOptions, LogView } from '@mereward/shared/surveys/log-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Progress } from '@/components/progress';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { LogMap } from '@/features/charts/log-map';
import { useLake } from '@/features/lakes/api';
import { useVisit } from '@/features/surveys/api';
import { isBeingRead, useLog, useLogDeed, useLookAgain, useUndoLog } from '@/features/surveys/log-api';
import { LogOptionsForm } from '@/features/surveys/log-options-form';
import { LogReportPart } from '@/features/surveys/log-report-part';
import { countWords } from '@/features/surveys/visit-words';
import { useUnits } from '@/hooks/use-units';
import { useWide } from '@/hooks/use-wide';
import { dayAndTime } from '@/lib/format-time';
import { length } from '@/lib/format';

/** One log of a visit: how it is read, taking it in, how far that is, what came of it, taking it back. */
export function LogScreen() {
  const { visitId, logId } = useLocalSearchParams<{ visitId: string; logId: string }>();
  const visit = useVisit(visitId);
  const lake = useLake(visit.data?.visit.lakeId ?? '');
  const log = useLog(logId);
  const deed = useLogDeed(logId);
  const look = useLookAgain(logId);
  const it = log.data;
  const ready =
    !look.isPending && // what is on the screen is about to be read in another way
    it?.state === 'looked' &&
    it.may.change &&
    it.preview &&
    it.preview.asks.length === 0 &&
    it.preview.kept > 0;
  const again = it?.goal === 'keep' && (it.state === 'failed' || it.state === 'cancelled') && it.may.change;
  return (
    <Page
      title={it?.filenames.join(', ') ?? 'A log'}
      over={visit.data?.visit.lakeName}
      back={{ label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` }}
      width="wide"
      actions={
        <>
          {it?.may.undo ? <TakeBack log={it} /> : null}
          {ready || again ? (
            <Button
              label={again ? 'Take it in again' : `Take in ${countWords(it.preview?.kept ?? 0, 'sounding')}`}
              kind="main"
              bank
              grow
              busy={deed.isPending}
              onPress={() => deed.mutate('start')}
            />
          ) : null}
        </>
      }
    >
      <Loaded query={log} waiting="Reading the log…">
        {(value) => (
          <Loaded query={lake} waiting="Reading the lake…">
            {(water) => (
              <>
                <ProblemNote problem={deed.error} />
                <Log
                  log={value}
                  lake={water}
                  onStop={() => deed.mutate('cancel')}
                  onLook={look.mutateAsync}
                />
              </>
            )}
          </Loaded>
        )}
      </Loaded>
    </Page>
  );
}

function TakeBack({ log }: { log: LogView }) {
  const router = useRouter();
  const [asked, setAsked] = useState(false);
  const undo = useUndoLog({ logId: log.id, visitId: log.visitId });
  const done = log.state === 'done';
  const act = done ? 'Take the log back' : 'Discard it';
  return (
    <>
      <ProblemNote problem={undo.error} />
      <Button label={act} bank grow onPress={() => setAsked(true)} />
      <Confirm
        open={asked}
        title={act}
        words={
          done
            ? 'Its soundings leave the visit, and drafts made from them have to be built again. The files can be brought again.'
            : 'Nothing of it was taken in. The files can be brought again.'
        }
        act={act}
        danger
        busy={undo.isPending}
        onClose={() => setAsked(false)}
        onAct={() =>
          undo.mutate(undefined, {
            onSuccess: () => router.replace(`/bank/surveys/${log.visitId}`),
            onError: () => setAsked(false),
          })
        }
      />
    </>
  );
}

type Props = {
  log: LogView;
  lake: LakeView;
  onStop: () => void;
  onLook: (options: LogOptions) => Promise<LogView>;
};

function Log({ log, lake, onStop, onLook }: Props) {
  const wide = useWide();
  const { preview, report } = log;
  if (isBeingRead(log.state))
    return (
      <Progress
        label={log.step}
        share={log.state === 'queued' ? null : log.share}
        onCancel={log.may.cancel ? onStop : undefined}
      />
    );
  const shown = report ?? preview;
  return (
    <>
      <StateNote log={log} />
      {preview ? <Asks log={log} /> : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
        {preview && preview.sample.length > 0 ? (
          <View style={{ flexGrow: 2, flexBasis: 340, minWidth: 0 }}>
            <LogMap lake={lake} preview={preview} heightPx={wide ? 520 : 320} />
          </View>
        ) : null}
        <View style={{ flexGrow: 1, flexBasis: 340, minWidth: 0, gap: space.large }}>
          {shown ? (
            <Section title={report ? 'What was taken in' : 'What is in it'} bare>
              <LogReportPart report={shown} zone={lake.zone} />
            </Section>
          ) : null}
          {preview && log.may.change ? (
            <Section title="How it is read">
              <LogOptionsForm
                key={JSON.stringify(preview.guessed)}
                log={log}
                preview={preview}
                onLook={onLook}
              />
            </Section>
          ) : null}
          {preview && !report ? <FirstPoints log={log} zone={lake.zone} /> : null}
        </View>
      </View>
    </>
  );
}

function StateNote({ log: { state, goal, error, report, preview } }: { log: LogView }) {
  if (state === 'done')
    return (
      <Note kind="fine" title={`${countWords(report?.kept ?? 0, 'sounding')} taken in`} live>
        A chart drafted from this visit is made from them too.
      </Note>
    );
  if (state === 'failed')
    return (
      <Note
        kind="danger"
        title={goal === 'look' ? 'The log could not be read' : 'The log could not be taken in'}
        live
      >
        {`${error ?? ''} ${goal === 'look' ? 'Nothing was taken in.' : ''}`.trim()}
      </Note>
    );
  if (state === 'cancelled')
    return (
      <Note kind="caution" title="Stopped" live>
        Nothing was taken in.
      </Note>
    );
  if (preview?.asks.length === 0 && preview.kept > 0)
    return (
      <Note kind="fine" title={`${countWords(preview.kept, 'sounding')} can be taken in`} live>
        Look whether they fall where the boat went. Nothing is taken in yet.
      </Note>
    );
  return null;
}

const Asks = ({ log: { preview } }: { log: LogView }) =>
  preview && preview.asks.length > 0 ? (
    <Note kind="caution" title="To be said first" live>
      {preview.asks.map(({ words }) => words).join(' ')}
    </Note>
  ) : null;

function FirstPoints({ log: { preview }, zone }: { log: LogView; zone: string }) {
  const units = useUnits();
  if (!preview || preview.first.length === 0) return null;
  return (
    <Section title="The first of them">
      <List label="First soundings">
        {preview.first.map(({ where, depthM, at, position, taken }) => (
          <Row
            key={`${where} ${position.join(' ')}`}
            title={`${length(depthM, units, 2)}${taken ? '' : ', left out'}`}
            note={`${where} · ${position[1].toFixed(6)}, ${position[0].toFixed(6)}${at === null ? '' : ` · ${dayAndTime(at, zone)}`}`}
          />
        ))}
      </List>
    </Section>
  );
}
