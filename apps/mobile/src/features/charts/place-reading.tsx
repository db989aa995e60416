import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import type { Point } from '@mereward/shared/geometry/plane';
import { Text } from '@/components/text';
import { useChartUnits } from './use-chart-units';
import { lengthWithin, percent } from '@/lib/format';
import { depthNow } from '@mereward/shared/charts/depth-words';
import { readingAt } from './readied-chart';

type Props = { layers: ChartLayers | null; place: Point; raisedM: number; when: string };

/** What the chart says of the place that was touched: depth within its spread, bottom with its confidence. */
export function PlaceReading({ layers, place, raisedM, when }: Props) {
  const units = useChartUnits();
  const reading = readingAt(layers, place);
  const words = (): string => {
    if (!reading) return 'That place is off the chart.';
    const { depthM, sigmaM, substrate, cover } = reading;
    const parts: string[] = [];
    if (depthM === null) parts.push('not surveyed');
    else if (depthM + raisedM <= 0) parts.push(`${depthNow(depthM + raisedM, units.length)} ${when}`);
    else
      parts.push(
        sigmaM === null
          ? `${depthNow(depthM + raisedM, units.length)} ${when}`
          : `${lengthWithin(depthM + raisedM, Math.max(0.1, 1.96 * sigmaM), units)} ${when}`,
      );
    if (cover && cover.bottom !== 'clear') {
      parts.push(`${BOTTOM_GLYPHS[cover.bottom].words} ${percent(cover.confidence)}`);
    }
    if (substrate) parts.push(`${BOTTOM_GLYPHS[substrate.bottom].words} ${percent(substrate.confidence)}`);
    return `Here: ${parts.join(', ')}.`;
  };
  return (
    <Text role="status" weight="semibold">
      {words()}
    </Text>
  );
}
