import { useMemo, useState } from 'react';
import type { SectionPoint } from '@mereward/shared/charts/contract';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { drawSection } from '@mereward/shared/charts/drawing/section-drawing';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { fromMetres, METRES_IN } from '@mereward/shared/units/length';
import { View } from 'react-native';
import { useTheme } from '@/hooks/use-theme';
import { useChartUnits } from './use-chart-units';
import { SvgPicture } from '@/components/svg-picture';

const HEIGHT_PX = 190;

type Props = {
  points: readonly SectionPoint[];
  /** Added to every depth: the water's rise above datum now. */
  raisedM: number;
  markLineOutM: number | null;
  /** The same, said. */
  label: string;
};

/** The bed along a cast, drawn in wraps of the reader's own sticks. */
export function SectionPicture({ points, raisedM, markLineOutM, label }: Props) {
  const { name } = useTheme();
  const units = useChartUnits();
  const [widthPx, setWidthPx] = useState(0);
  const svg = useMemo(() => {
    if (widthPx === 0) return '';
    const page = drawSection(
      {
        places: points.map((point) => ({
          ...point,
          depthM: point.depthM === null ? null : point.depthM + raisedM,
        })),
        stickSpacingM: units.stickSpacingM,
        markLineOutM,
        unitM: METRES_IN[units.length],
        depthWords: (depthM) => String(Math.round(fromMetres(depthM, units.length) * 10) / 10),
      },
      { widthPx, heightPx: HEIGHT_PX, palette: palettes[name] },
    );
    return toSvg(page, { ...PLAIN_SVG, idPrefix: 'section' });
  }, [points, raisedM, markLineOutM, units, name, widthPx]);
  return (
    <View
      style={{ minHeight: HEIGHT_PX }}
      onLayout={({ nativeEvent }) => setWidthPx(Math.round(nativeEvent.layout.width))}
    >
      {svg ? <SvgPicture svg={svg} label={label} /> : null}
    </View>
  );
}
