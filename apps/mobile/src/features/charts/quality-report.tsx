import type { QualityView } from '@mereward/shared/charts/contract';
import type { BottomQualityView } from '@mereward/shared/charts/bottom-quality-contract';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Table } from '@/components/table';
import { useUnits } from '@/hooks/use-units';
import { figure, length, percent } from '@/lib/format';

/** Both bottom maps held against each cast left out in turn. */
function BottomQualityFacts({ bottom }: { bottom: BottomQualityView }) {
  const units = useUnits();
  const words = ({ casts, bandwidthM, logScore, evenLogScore }: BottomQualityView['cover']): string =>
    logScore === null
      ? `${figure(casts)} casts, too few to score; a cast’s word carries ${length(bandwidthM, units)}`
      : `${figure(casts)} casts; a cast’s word carries ${length(bandwidthM, units)}; log score ${figure(logScore, 2)} a cast (knowing nothing: ${figure(evenLogScore, 2)}; nearer nought is better)`;
  return (
    <Facts
      facts={[
        { term: 'The bottom', fact: words(bottom.substrate) },
        { term: 'What lies on it', fact: words(bottom.cover) },
        {
          term: 'Bottom counts from',
          fact: 'casts of grades A, B and C, with a depth or without; contours from A and B alone',
        },
      ]}
    />
  );
}

/** The surface held against each sounding left out in turn, and what the figures mean. */
export function QualityReport({ quality }: { quality: QualityView }) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <>
      <Facts
        facts={[
          { term: 'Soundings used', fact: figure(quality.soundings) },
          { term: 'Mean error', fact: `${m(quality.meanErrorM)} (near nothing: no lean to deep or shallow)` },
          { term: 'Root mean square error', fact: m(quality.rmseM) },
          {
            term: 'Standardised variance',
            fact: `${figure(quality.standardisedVariance, 2)} (near 1: the stated ± is honest; below: it is cautious)`,
          },
          { term: 'Inside their own 95 % band', fact: percent(quality.coverage95, 1) },
          { term: 'Share of the water surveyed', fact: percent(quality.surveyedShare) },
        ]}
      />
      {quality.bottom ? <BottomQualityFacts bottom={quality.bottom} /> : null}
      <Disclosure title="Which model of the bed, and why">
        <Table
          caption="Models tried"
          rows={quality.models}
          rowKey={({ model }) => model}
          columns={[
            { key: 'model', head: 'Model', value: ({ model }) => model },
            {
              key: 'rmse',
              head: 'RMSE',
              value: ({ rmseM }) => rmseM,
              show: ({ rmseM }) => m(rmseM),
              figures: true,
            },
            {
              key: 'variance',
              head: 'Standardised variance',
              value: (row) => row.standardisedVariance,
              show: (row) => figure(row.standardisedVariance, 2),
              figures: true,
            },
          ]}
        />
      </Disclosure>
    </>
  );
}
