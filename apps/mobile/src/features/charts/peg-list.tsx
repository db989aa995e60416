import { useMemo } from 'react';
import type { ChartView } from '@mereward/shared/charts/contract';
import { depthTodayM, stickWords } from '@mereward/shared/charts/spot-words';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { List, Row } from '@/components/list';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useChartUnits } from './use-chart-units';
import { depthNow } from '@mereward/shared/charts/depth-words';
import { pegOutlook } from './peg-outlook';
import { PEG_STATUS } from './peg-words';
import { layersOf } from '@mereward/shared/charts/drawing/chart-part';

const OUTLOOK_WRAPS = 10;

type Props = {
  lake: LakeView;
  chart: ChartView | null;
  pegId: string | null;
  onPeg: (pegId: string) => void;
};

/** A lake's pegs in walking order, with what lies straight out from each as far as the chart tells this reader. */
export function PegList({ lake, chart, pegId, onPeg }: Props) {
  const units = useChartUnits();
  const rangeM = OUTLOOK_WRAPS * units.stickSpacingM;
  const outlooks = useMemo(() => {
    const layers = chart?.depth ? layersOf(chart) : null;
    const known =
      chart && layers ? chart.pegs.map((peg) => [peg.id, pegOutlook(layers, peg, rangeM)] as const) : [];
    return new Map(known);
  }, [chart, rangeM]);
  const words = (id: string): string | undefined => {
    const outlook = outlooks.get(id);
    if (!outlook || outlook.depthM === null || !chart) return undefined;
    const levelM = chart.levelNow?.levelM ?? chart.datumM;
    const depth = depthNow(depthTodayM(outlook.depthM, levelM, chart.datumM), units.length);
    return outlook.bottom ? `${depth}, ${outlook.bottom}` : depth;
  };
  return (
    <View style={{ gap: space.small }}>
      {outlooks.size ? (
        <Text size="small" tone="inkSoft">
          {`Straight out at ${String(OUTLOOK_WRAPS)} wraps of ${stickWords(units.stickSpacingM)}, ${chart?.levelNow ? 'today' : 'at datum'}`}
        </Text>
      ) : null}
      <List label="Pegs in walking order">
        {lake.pegs.map(({ id, number, name, status, statusReason }) => (
          <Row
            key={id}
            title={name ? `${number}  ${name}` : number}
            note={status === 'open' || !statusReason ? words(id) : statusReason}
            end={<StatusShape {...PEG_STATUS[status]} size="small" />}
            chosen={id === pegId}
            onPress={() => onPeg(id)}
          />
        ))}
      </List>
    </View>
  );
}
