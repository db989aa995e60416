import type { ChartView } from '@mereward/shared/charts/contract';
import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { radius, space } from '@/constants/layout';
import { useChart } from '@/features/charts/api';
import { shownLayers } from '@/features/charts/chart-layers';
import { ChartMap } from '@/features/charts/chart-map';
import { useChartContent } from '@/features/charts/use-chart-content';
import { useTheme } from '@/hooks/use-theme';
import { useWide } from '@/hooks/use-wide';

/** The chart as it would be published, beside what is said of it. */
export function ReviewMap({ chartId }: { chartId: string }) {
  const chart = useChart(chartId);
  return (
    <Section title="As it is drawn" bare>
      <Loaded query={chart} waiting="Drawing the chart…">
        {(value) => <Drawn chart={value} />}
      </Loaded>
      <LinkButton label="Look at the chart" href={`/water/charts/${chartId}`} />
    </Section>
  );
}

const NOTHING_CHOSEN = { pegId: null, spotId: null, cast: null };

function Drawn({ chart }: { chart: ChartView }) {
  const { colours } = useTheme();
  const wide = useWide();
  const { content } = useChartContent(chart, shownLayers.use());
  const nothing = (): void => undefined; // a peg is chosen on the chart’s own page
  return (
    <View
      style={{
        height: wide ? 520 : 340,
        overflow: 'hidden',
        borderWidth: 1,
        borderColor: colours.rule,
        borderRadius: radius.control,
        marginBottom: space.hair,
      }}
    >
      <ChartMap
        label={`Chart of ${chart.lakeName}`}
        content={content}
        chosen={NOTHING_CHOSEN}
        onPeg={nothing}
      />
    </View>
  );
}
