import { useCallback, useMemo } from 'react';
import { ruled, type Line } from '@mereward/shared/charts/drawing/mark';
import { toPlane } from '@mereward/shared/geometry/plane';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { LogPreview } from '@mereward/shared/surveys/log-contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { lakeBackdrop, waterLines } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import { countWords } from '@/features/surveys/visit-words';

const DOT = 'm-2 0a2 2 0 1 0 4 0a2 2 0 1 0 -4 0z';
const CROSS = 'm-4 -4l8 8m0 -8l-8 8';

/** The water and those left out near it; a place in another country must not shrink the lake. */
function withNear(water: readonly Line[], left: readonly number[]): readonly Line[] {
  const corners = water.flatMap((line) => Array.from(line));
  const reach = (axis: 0 | 1) => {
    const values = corners.filter((_, i) => i % 2 === axis);
    const [least, most] = [Math.min(...values), Math.max(...values)];
    return [least - (most - least) / 2, most + (most - least) / 2] as const;
  };
  const [[west, east], [south, north]] = [reach(0), reach(1)];
  const near: number[] = [];
  for (let i = 0; i + 1 < left.length; i += 2) {
    const [x = 0, y = 0] = [left[i], left[i + 1]];
    if (x > west && x < east && y > south && y < north) near.push(x, y);
  }
  return near.length > 0 ? [...water, near] : water;
}

type Props = { lake: LakeView; preview: LogPreview; heightPx: number };

/** Where a log's soundings fall on the lake: dots for those taken, crosses for those left out. */
export function LogMap({ lake, preview, heightPx }: Props) {
  const { origin } = lake;
  const { sample } = preview;
  const under = useMemo(() => lakeBackdrop(lake, { water: true }), [lake]);
  const at = useMemo(() => {
    const taken: number[] = [];
    const left: number[] = [];
    for (const [lon, lat, kept] of sample) {
      const { xM, yM } = toPlane(origin, [lon, lat]);
      (kept ? taken : left).push(xM, yM);
    }
    return { taken, left };
  }, [origin, sample]);
  const frame = useMemo(() => withNear(waterLines(lake), at.left), [lake, at]);
  const over = useCallback<Draw>(
    ({ palette }) => [
      { kind: 'glyphs', at: at.taken, glyph: DOT, fill: palette.ink, stroke: null },
      { kind: 'glyphs', at: at.left, glyph: CROSS, fill: null, stroke: ruled(palette.selected, 1.8) },
    ],
    [at],
  );
  const drawn =
    sample.length < preview.found
      ? ` Of ${countWords(preview.found, 'sounding')} ${sample.length} are drawn.`
      : '';
  return (
    <View style={{ gap: space.small }}>
      <LakeCanvas
        label={`Where the soundings fall on ${lake.details.name}`}
        frame={frame}
        under={under}
        over={over}
        handles={[]}
        onTap={() => undefined}
        onMove={() => undefined}
        heightPx={heightPx}
      />
      <Text size="small" tone="inkSoft">{`Dots are taken, crosses left out.${drawn}`}</Text>
    </View>
  );
}
