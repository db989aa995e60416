import type { SoundingMissView } from '@mereward/shared/charts/sounding-miss';
import { Disclosure } from '@/components/disclosure';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { castPlaceWords, castTitle, outByWords } from '@/features/charts/sounding-miss-words';

type Props = { misses: readonly SoundingMissView[]; flaggedIds: readonly string[] };

/** The soundings a person must look at before a chart is published, each leading to its cast. */
export function SoundingMisses({ misses, flaggedIds }: Props) {
  const flagged = misses.filter((miss) => miss.flagged);
  const ofLogs = flaggedIds.length - flagged.length; // merged from a boat's log: they have no cast to open
  return (
    <Section
      title="Out of line with their neighbours"
      {...(flagged.length > 0
        ? {
            note: 'They are in the chart all the same. Open each cast: a hole or a bar may be true. If it looks like a slip, cast there again; both readings then count.',
          }
        : {})}
    >
      {ofLogs > 0 ? (
        <Note kind="caution">
          {`${figure(ofLogs)} merged ${ofLogs === 1 ? 'sounding' : 'soundings'} of a boat’s log also out of line. Check the log’s level and its offsets.`}
        </Note>
      ) : null}
      {flaggedIds.length === 0 ? (
        <Note kind="fine">No sounding disagrees with those round about.</Note>
      ) : null}
      {flagged.length > 0 ? <MissTable caption="Out of line with their neighbours" misses={flagged} /> : null}
      <Disclosure title="The ten soundings that fit worst">
        <MissTable caption="Soundings that fit worst" misses={misses.slice(0, 10)} />
      </Disclosure>
    </Section>
  );
}

function MissTable({ caption, misses }: { caption: string; misses: readonly SoundingMissView[] }) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <Table
      caption={caption}
      rows={misses}
      rowKey={({ id }) => id}
      href={({ id, visitId }) => `/bank/surveys/${visitId}/casts/${id}`}
      columns={[
        { key: 'cast', head: 'Cast', value: castTitle },
        { key: 'place', head: 'Place', value: (miss) => castPlaceWords(miss, units) },
        { key: 'visit', head: 'Visit', value: ({ visitTitle }) => visitTitle },
        {
          key: 'depth',
          head: 'Read',
          value: ({ depthM }) => depthM,
          show: ({ depthM }) => m(depthM),
          figures: true,
        },
        {
          key: 'foretold',
          head: 'By its neighbours',
          value: ({ foretoldM }) => foretoldM,
          show: ({ foretoldM }) => m(foretoldM),
          figures: true,
        },
        {
          key: 'out',
          head: 'Out by',
          value: ({ errorM }) => Math.abs(errorM),
          show: (miss) => outByWords(miss, units),
          figures: true,
        },
        {
          key: 'share',
          head: 'In its own σ',
          value: ({ standardised }) => standardised,
          show: ({ standardised }) => figure(standardised, 1),
          figures: true,
        },
      ]}
    />
  );
}
