import { chartCaution } from '@mereward/shared/charts/cautions';
import { ageWords, type ChartAge } from '@mereward/shared/charts/chart-age';
import type { ChartChange } from '@mereward/shared/charts/chart-change-contract';
import { View } from 'react-native';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { length } from '@/lib/format';
import { dayRange } from '@/lib/format-time';
import { useChartUnits } from './use-chart-units';

type Surveyed = {
  version: string | null;
  surveyedFrom: string;
  surveyedTo: string;
  datumM: number;
  age: ChartAge;
  changes?: readonly ChartChange[] | undefined; // what dates it
};

/** A chart's age in shape and words. */
export function ChartAgeBadge({ age, changes }: Pick<Surveyed, 'age' | 'changes'>) {
  const looks = {
    current: { shape: 'triangle', tone: 'reed' },
    ageing: { shape: 'ring', tone: 'amber' },
    old: { shape: 'diamond', tone: 'amber' },
    changed: { shape: 'diamond', tone: 'amber' },
  } as const;
  return <StatusShape {...looks[age]} word={ageWords(age, changes)} size="small" />;
}

/** Stands under every chart: which one, when it was surveyed, at what level, and what it must not be used for. */
export function ChartCaption({ chart, shownAt }: { chart: Surveyed; shownAt: string }) {
  const units = useChartUnits();
  const version = chart.version === null ? 'Draft chart' : `Chart ${chart.version}`;
  return (
    <View style={{ gap: space.hair, maxWidth: MEASURE_PX + 120 }}>
      <Text size="small" weight="semibold">
        {`${version} · surveyed ${dayRange(chart.surveyedFrom, chart.surveyedTo)} · datum ${length(chart.datumM, units, 2)} · ${shownAt}`}
      </Text>
      <ChartAgeBadge age={chart.age} changes={chart.changes} />
      <Text size="small" tone="inkSoft">
        {`${chartCaution(chart)} Not for navigation.`}
      </Text>
    </View>
  );
}
