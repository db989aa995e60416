import { ruled, stroked, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import type { Point } from '@mereward/shared/geometry/point';
import { lineOf } from './outline-drawing';

/** Corners of an area being drawn, as places. */
export type DrawnArea = readonly (readonly [number, number])[];

const DOT = 'm-5 0a5 5 0 1 0 10 0a5 5 0 1 0 -10 0z';

/** The area as far as it is drawn: its corners, its sides, the closing side dashed. */
export function areaMarks(corners: readonly Point[], palette: Palette): Mark[] {
  const [first] = corners;
  const last = corners.at(-1);
  if (!first || !last) return [];
  const closing = corners.length < 3 ? [] : [lineOf([last, first])];
  return [
    stroked([lineOf(corners)], ruled(palette.paper, 5)),
    stroked([lineOf(corners)], ruled(palette.selected, 2.4)),
    stroked(closing, ruled(palette.selected, 1.8, [6, 5])),
    {
      kind: 'glyphs',
      at: lineOf(corners),
      glyph: DOT,
      fill: palette.paper,
      stroke: ruled(palette.selected, 2),
    },
  ];
}
