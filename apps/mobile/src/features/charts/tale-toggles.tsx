import type { ChartView } from '@mereward/shared/charts/contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { Toggles, type Toggle } from '@/components/toggles';
import { space } from '@/constants/layout';
import { shownTales, type ShownTales } from './chart-tales';
import type { Tales } from './use-tales';

type Props = { chart: ChartView; tales: Tales; hasEarlier: boolean };

/** What the chart can tell beyond its layers: each shown on it and listed beside it. */
export function TaleToggles({ chart, tales, hasEarlier }: Props) {
  const { shown, chosen } = tales;
  const toggles: Toggle<keyof ShownTales>[] = [];
  if (chart.depth) toggles.push({ key: 'features', label: 'Features' });
  if (chart.substrate) toggles.push({ key: 'patches', label: 'Stand-outs' });
  if (chart.pegs.length) toggles.push({ key: 'waters', label: 'Pegs’ waters' });
  if (hasEarlier && (chart.depth || chart.substrate)) toggles.push({ key: 'changes', label: 'What changed' });
  if (toggles.length === 0) return null;
  return (
    <View style={{ gap: space.small }}>
      <Toggles
        label="Told of the chart"
        toggles={toggles}
        isOn={(key) => shown[key]}
        onToggle={(key) => shownTales.set({ ...shown, [key]: !shown[key] })}
      />
      {chosen ? (
        <Text role="status">
          <Text weight="semibold">{`${chosen.title}${chosen.certain ? '' : ', not certain'}. `}</Text>
          {chosen.words}
        </Text>
      ) : null}
    </View>
  );
}
