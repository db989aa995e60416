import type { ChartView } from '@mereward/shared/charts/contract';
import { layerReasons } from '@mereward/shared/charts/layer-reasons';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { Toggles, type Toggle } from '@/components/toggles';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';
import { dayAndTime } from '@/lib/format-time';
import { useChartUnits } from './use-chart-units';
import { shownLayers, type ShownLayers } from './chart-layers';

type Key = keyof ShownLayers;

/** The layers this reader has, and the level they are shown at. A layer that is not theirs is no button, but a reason. */
export function LayerToggles({ chart }: { chart: ChartView }) {
  const shown = shownLayers.use();
  const { length: usual } = useUnits();
  const toggles: Toggle<Key>[] = [];
  if (chart.depth) toggles.push({ key: 'depth', label: 'Depth' });
  if (chart.substrate) toggles.push({ key: 'bottom', label: 'Bottom' });
  if (chart.soundings) toggles.push({ key: 'soundings', label: 'Soundings' });
  if (chart.depth && chart.levelNow) toggles.push({ key: 'today', label: 'At today’s level' });
  if (chart.depth) toggles.push({ key: 'otherUnit', label: usual === 'm' ? 'In feet' : 'In metres' });
  return (
    <Toggles
      label="Shown on the chart"
      toggles={toggles}
      isOn={(key) => shown[key]}
      onToggle={(key) => shownLayers.set({ ...shown, [key]: !shown[key] })}
    />
  );
}

/** Why something is missing from the chart for this reader. */
export function LayerReasons({ notes }: { notes: ChartView['layerNotes'] }) {
  const reasons = layerReasons(notes);
  if (reasons.length === 0) return null;
  return (
    <View style={{ gap: space.hair }}>
      {reasons.map((words) => (
        <Text key={words} size="small" tone="inkSoft">
          {words}
        </Text>
      ))}
    </View>
  );
}

/** "at today's level, 0.38 m on B1, Sat 4 July, 07:00" or "at chart datum" */
export function useLevelWords(chart: Pick<ChartView, 'levelNow' | 'zone'>, isToday: boolean): string {
  const units = useChartUnits();
  if (!isToday || !chart.levelNow) return 'depths at datum';
  const { boardReadsM, boardCode, at } = chart.levelNow;
  return `depths at today’s level, ${length(boardReadsM, units, 2)} on ${boardCode}, read ${dayAndTime(at, chart.zone)}`;
}
