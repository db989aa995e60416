import type { ChartView } from '@mereward/shared/charts/contract';
import { Facts } from '@/components/facts';
import { Section } from '@/components/section';
import { useChartUnits } from './use-chart-units';
import { area, figure, length, percent, volume } from '@/lib/format';

/** The water in figures, at chart datum. */
export function ChartFigures({ figures }: { figures: NonNullable<ChartView['figures']> }) {
  const units = useChartUnits();
  return (
    <Section title="The water in figures" note="At chart datum; volume and mean depth of the surveyed part.">
      <Facts
        facts={[
          { term: 'Water', fact: area(figures.areaM2, units) },
          { term: 'Surveyed', fact: percent(figures.surveyedShare) },
          { term: 'Greatest depth found', fact: length(figures.greatestDepthM, units) },
          { term: 'Mean depth', fact: length(figures.meanDepthM, units) },
          { term: 'Volume', fact: volume(figures.volumeM3) },
          { term: 'Shoreline development', fact: figure(figures.shorelineDevelopment, 2) },
        ]}
      />
    </Section>
  );
}
