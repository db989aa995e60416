import { ruled, stroked, type Line, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { toPlane, type LonLat, type Point } from '@mereward/shared/geometry/plane';
import { stationPlace, type ShoreWalk } from '@mereward/shared/lakes/shore-walk';
import { lineOf } from '@/features/charts/outline-drawing';

/** A walk laid on the plane: its stretches in order, each broken off where nobody was seen to walk. */
export type PlaneWalk = { stretches: Point[][]; gaps: [Point, Point][]; here: Point | null };

export function planeWalk({ stations }: Pick<ShoreWalk, 'stations'>, origin: LonLat): PlaneWalk {
  const stretches: Point[][] = [];
  const gaps: [Point, Point][] = [];
  let here: Point | null = null;
  for (const station of stations) {
    const point = toPlane(origin, stationPlace(station));
    if (here && station.afterGap) gaps.push([here, point]);
    if (!here || station.afterGap) stretches.push([point]);
    else stretches.at(-1)?.push(point);
    here = point;
  }
  return { stretches, gaps, here };
}

const HERE = 'm-8 0a8 8 0 1 0 16 0a8 8 0 1 0 -16 0z';
const START = 'm-6 -6h12v12h-12z';

/** The walk as far as it has come: walked lines, dashes where nobody walked, the start and "you are here". */
export function walkMarks({ stretches, gaps, here }: PlaneWalk, palette: Palette): Mark[] {
  const first = stretches[0]?.[0];
  const dot = (point: Point, glyph: string, fill: string): Mark => ({
    kind: 'glyphs',
    at: [point.xM, point.yM],
    glyph,
    fill,
    stroke: ruled(palette.paper, 2),
  });
  return [
    stroked(gaps.map(lineOf), ruled(palette.selected, 2, [4, 6])),
    stroked(stretches.map(lineOf), ruled(palette.selected, 3.2)),
    ...(first ? [dot(first, START, palette.ink)] : []),
    ...(here ? [dot(here, HERE, palette.selected)] : []),
  ];
}

const STEP_M = 60;

/** A frame widened in whole steps until the walk is inside it, so that it seldom changes as the walk grows. */
export function frameWithWalk(frame: readonly Line[], { stretches }: PlaneWalk, alone: boolean): Line[] {
  const points = stretches.flat();
  if (points.length === 0) return [...frame];
  const xs = points.map(({ xM }) => xM);
  const ys = points.map(({ yM }) => yM);
  const low = (values: number[]): number => Math.floor(Math.min(...values) / STEP_M - 0.5) * STEP_M;
  const high = (values: number[]): number => Math.ceil(Math.max(...values) / STEP_M + 0.5) * STEP_M;
  return [...(alone ? [] : frame), [low(xs), low(ys), high(xs), high(ys)]];
}
