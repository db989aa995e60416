import { useCallback, useMemo } from 'react';
import { filled, ruled, stroked, type Mark } from '@mereward/shared/charts/drawing/mark';
import { mixed } from '@mereward/shared/charts/drawing/colour';
import { toPlane } from '@mereward/shared/geometry/plane';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { lakeBackdrop, waterLines } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import { lineOf, placeOf } from '@/features/charts/outline-drawing';

const DOT = 'm-5 0a5 5 0 1 0 10 0a5 5 0 1 0 -10 0z';

/** What the corners make: a ring that closes by itself, a line from first to last, or one place that a tap moves. */
export type DrawnShape = 'area' | 'line' | 'point';

type Props = {
  lake: LakeView;
  shape?: DrawnShape | undefined;
  exceptPlaceId?: string | undefined;
  corners: readonly [number, number][];
  onCorners: (corners: [number, number][]) => void;
};

const ASKS: Readonly<Record<DrawnShape, string>> = {
  area: 'tap round the area, corner by corner',
  line: 'tap along the line, post by post',
  point: 'tap where it is',
};

/** A part of the lake, a line or a place at it: a tap adds a corner, a drag moves one. */
export function AreaCanvas({ lake, shape = 'area', exceptPlaceId, corners, onCorners }: Props) {
  const { origin } = lake;
  const under = useMemo(() => lakeBackdrop(lake, { water: true, exceptPlaceId }), [lake, exceptPlaceId]);
  const frame = useMemo(() => waterLines(lake), [lake]);
  const points = useMemo(() => corners.map((corner) => toPlane(origin, corner)), [corners, origin]);
  const over = useCallback<Draw>(
    ({ palette }): Mark[] => {
      const ring = lineOf(points);
      if (points.length === 0) return [];
      const dots: Mark = {
        kind: 'glyphs',
        at: ring,
        glyph: DOT,
        fill: palette.selected,
        stroke: ruled(palette.paper, 1.6),
      };
      if (points.length < 2) return [dots];
      return [
        ...(shape === 'area' && points.length > 2
          ? [filled([ring], mixed(palette.paper, palette.selected, 0.25))]
          : []),
        { ...stroked([ring], ruled(palette.selected, 2.2)), closed: shape === 'area' },
        dots,
      ];
    },
    [points, shape],
  );
  return (
    <LakeCanvas
      label={`${lake.details.name}: ${ASKS[shape]}`}
      frame={frame}
      under={under}
      over={over}
      handles={points.map((point, i) => ({ ...point, id: String(i) }))}
      onTap={(point) => onCorners([...(shape === 'point' ? [] : corners), placeOf(origin, point)])}
      onMove={(id, point) =>
        onCorners(corners.map((corner, i) => (String(i) === id ? placeOf(origin, point) : corner)))
      }
      heightPx={380}
    />
  );
}
