import type { ChartReview } from '@mereward/shared/charts/contract';
import type { SoundingMissView } from '@mereward/shared/charts/sounding-miss';
import { Disclosure } from '@/components/disclosure';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { LogMissesTable } from '@/features/charts/log-misses-table';
import { castPlaceWords, castTitle, outByWords } from '@/features/charts/sounding-miss-words';

type Props = { review: ChartReview };

/** The soundings a person must look at before a chart is published, each leading to where it can be left out. */
export function SoundingMisses({ review: { chart, misses, logMisses, quality, may } }: Props) {
  const flagged = misses.filter((miss) => miss.flagged);
  const flaggedOfLogs = logMisses.filter((miss) => miss.flagged);
  const none = quality?.flagged.length === 0;
  return (
    <Section
      title="Out of line with their neighbours"
      {...(none
        ? {}
        : {
            note: `They are in the chart all the same: a hole or a bar may be true. If it looks like a slip, cast there again, and both readings count${may.leaveOut ? '; or open it and leave it out of this chart, with a reason' : ''}.`,
          })}
    >
      {none ? <Note kind="fine">No sounding disagrees with those round about.</Note> : null}
      {flagged.length > 0 ? (
        <MissList caption="Casts out of line with their neighbours" chartId={chart.id} misses={flagged} />
      ) : null}
      {flaggedOfLogs.length > 0 ? (
        <>
          <Note kind="caution">
            {`${figure(flaggedOfLogs.length)} merged ${flaggedOfLogs.length === 1 ? 'sounding' : 'soundings'} of a boat’s log out of line. Many along one run: check the log’s level and its offsets first.`}
          </Note>
          <LogMissesTable
            caption="Soundings of logs out of line with their neighbours"
            chartId={chart.id}
            misses={flaggedOfLogs}
          />
        </>
      ) : null}
      <Disclosure title="The ten soundings that fit worst">
        {misses.length > 0 ? (
          <MissList caption="Casts that fit worst" chartId={chart.id} misses={misses.slice(0, 10)} />
        ) : null}
        {logMisses.length > 0 ? (
          <LogMissesTable
            caption="Soundings of logs that fit worst"
            chartId={chart.id}
            misses={logMisses.slice(0, 10)}
          />
        ) : null}
      </Disclosure>
    </Section>
  );
}

type MissProps = { caption: string; chartId: string; misses: readonly SoundingMissView[] };

/** Rows of a list: seven columns would not fit beside the drawing. */
function MissList({ caption, chartId, misses }: MissProps) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <List label={caption}>
      {misses.map((miss) => (
        <Row
          key={miss.id}
          title={`${castTitle(miss)}: ${outByWords(miss, units)} than foretold`}
          note={[
            `${m(miss.depthM)} read, ${m(miss.foretoldM)} by its neighbours (${figure(miss.standardised, 1)} of its own σ)`,
            castPlaceWords(miss, units),
            miss.visitTitle,
          ].join(' · ')}
          href={`/office/charts/${chartId}/casts/${miss.id}`}
        />
      ))}
    </List>
  );
}
