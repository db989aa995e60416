import type { LogMissView } from '@mereward/shared/charts/left-out-contract';
import { Table } from '@/components/table';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { positionText } from '@/lib/position-text';
import { outByWords } from './sounding-miss-words';

type Props = { caption: string; chartId: string; misses: readonly LogMissView[] };

/** Merged soundings of boats' logs, each leading to where it can be left out. */
export function LogMissesTable({ caption, chartId, misses }: Props) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <Table
      caption={caption}
      rows={misses}
      rowKey={({ id }) => id}
      href={({ id, logId }) => `/office/charts/${chartId}/logs/${logId}?sounding=${encodeURIComponent(id)}`}
      columns={[
        { key: 'sounding', head: 'Sounding', value: titleOf },
        { key: 'place', head: 'Place', value: ({ position: [lon, lat] }) => positionText([lon, lat]) },
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

/** "boat.log, soundings 120–124". */
function titleOf({ filenames, merged }: LogMissView): string {
  const file = filenames.join(', ');
  if (!merged) return file;
  return merged.count === 1
    ? `${file}, sounding ${figure(merged.fromSeq)}`
    : `${file}, soundings ${figure(merged.fromSeq)}–${figure(merged.toSeq)}`;
}
