import {
  filled,
  ruled,
  stroked,
  text,
  type GlyphsMark,
  type Line,
  type Mark,
} from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import {
  distanceBetweenM,
  fromPlane,
  toPlane,
  type LonLat,
  type Point,
} from '@mereward/shared/geometry/plane';
import { ringLengthM } from '@mereward/shared/geometry/polygon';
import { nearestOnSegment } from '@mereward/shared/geometry/shore-distance';
import type { Sketch } from '@/features/lakes/outline-sketch';

export type PlaneRing = { closed: boolean; points: Point[] };

type Laid = { lon: number; lat: number; point: Point };

// Laying a place on the plane is dear, and a drag moves one of thousands: each place keeps its point while it lasts.
const laid = new WeakMap<readonly [number, number], Laid>();

function pointOf(place: readonly [number, number], [lon, lat]: LonLat): Point {
  const known = laid.get(place);
  if (known?.lon === lon && known.lat === lat) return known.point;
  const point = toPlane([lon, lat], place);
  laid.set(place, { lon, lat, point });
  return point;
}

/** A sketch laid on the plane of an origin. */
export const planeSketch = (sketch: Sketch, origin: LonLat): PlaneRing[] =>
  sketch.rings.map(({ closed, places }) => ({
    closed,
    points: places.map((place) => pointOf(place, origin)),
  }));

/** A point of the plane as a place, to a centimetre. */
export function placeOf(origin: LonLat, point: Point): [number, number] {
  const [lon, lat] = fromPlane(origin, point);
  return [Math.round(lon * 1e7) / 1e7, Math.round(lat * 1e7) / 1e7];
}

export const lineOf = (points: readonly Point[]): Line => points.flatMap(({ xM, yM }) => [xM, yM]);

const HALF_SHEET_M = 220;

/** What the canvas shows at first: all that is drawn, or a sheet about the origin where nothing is yet. */
export function frameOf(rings: readonly PlaneRing[]): Line[] {
  const points = rings.flatMap((ring) => ring.points);
  if (points.length >= 3) return rings.map((ring) => lineOf(ring.points));
  const [first = { xM: 0, yM: 0 }] = points;
  const low = { xM: first.xM - HALF_SHEET_M, yM: first.yM - HALF_SHEET_M };
  const high = { xM: first.xM + HALF_SHEET_M, yM: first.yM + HALF_SHEET_M };
  return [[low.xM, low.yM, high.xM, high.yM]];
}

const APART_PX = 11;

/** The scale from which the points stand far enough apart to be told from one another, px per metre. */
export function pointsFromPxPerM(rings: readonly PlaneRing[]): number {
  const lengthM = rings.reduce((sum, { points }) => sum + ringLengthM(points), 0);
  const count = rings.reduce((sum, { points }) => sum + points.length, 0);
  return lengthM === 0 || count < 12 ? 0 : (APART_PX * count) / lengthM;
}

export type Chosen = { ring: number; index: number } | null;

const DOT = 'm-4.5 0a4.5 4.5 0 1 0 9 0a4.5 4.5 0 1 0 -9 0z';
const BIG_DOT = 'm-7.5 0a7.5 7.5 0 1 0 15 0a7.5 7.5 0 1 0 -15 0z';
const CROSS = 'm-8 -8l16 16m0 -16l-16 16';

type Scene = { palette: Palette; showPoints: boolean; chosen: Chosen; faults: readonly Point[] };

/** The sketch's closed rings: water, shore and islands. Over a picture (`water` null) the lines alone, edged to be seen on it. */
export function closedMarks(rings: readonly PlaneRing[], palette: Palette, water: string | null): Mark[] {
  const closed = rings.filter((ring) => ring.closed).map(({ points }) => lineOf(points));
  const under =
    water === null ? { ...stroked(closed, ruled(palette.paper, 5)), closed: true } : filled(closed, water);
  return [under, { ...stroked(closed, ruled(palette.ink, 2)), closed: true }];
}

/** What is worked on: the open ring with its closing side dashed, points, and where it is wrong. */
export function workMarks(rings: readonly PlaneRing[], scene: Scene): Mark[] {
  const { palette, faults } = scene;
  return [
    ...rings.flatMap((ring) => (ring.closed ? [] : openMarks(ring, palette))),
    ...(scene.showPoints ? rings.flatMap((ring, at) => pointMarks(ring, at, scene)) : []),
    ...faults.flatMap((fault): Mark[] => [
      glyph(fault, CROSS, { fill: null, stroke: ruled(palette.paper, 7) }),
      glyph(fault, CROSS, { fill: null, stroke: ruled(palette.danger, 3.2) }),
      text({
        words: 'here',
        x: fault.xM,
        y: fault.yM,
        dyPx: 20,
        bold: true,
        colour: palette.danger,
        halo: palette.paper,
      }),
    ]),
  ];
}

const glyph = (
  { xM, yM }: Point,
  path: string,
  { fill, stroke }: Pick<GlyphsMark, 'fill' | 'stroke'>,
): GlyphsMark => ({ kind: 'glyphs', at: [xM, yM], glyph: path, fill, stroke });

function openMarks({ points }: PlaneRing, palette: Palette): Mark[] {
  const [first] = points;
  const last = points.at(-1);
  if (!first || !last) return [];
  const closing = points.length < 3 ? [] : [lineOf([last, first])];
  return [
    stroked([lineOf(points)], ruled(palette.paper, 5)),
    stroked([lineOf(points)], ruled(palette.ink, 2.4)),
    stroked(closing, ruled(palette.inkSoft, 1.6, [6, 6])),
    glyph(first, BIG_DOT, { fill: null, stroke: ruled(palette.ink, 1.6) }),
  ];
}

function pointMarks({ points }: PlaneRing, at: number, { palette, chosen }: Scene): Mark[] {
  const dots: Mark = {
    kind: 'glyphs',
    at: lineOf(points),
    glyph: DOT,
    fill: palette.paper,
    stroke: ruled(palette.ink, 1.8),
  };
  const picked = chosen?.ring === at ? points[chosen.index] : undefined;
  if (!picked) return [dots];
  return [dots, glyph(picked, BIG_DOT, { fill: palette.selected, stroke: ruled(palette.paper, 1.6) })];
}

type Side = { ring: number; index: number; at: Point };

/** The side of a ring within reach of a point: after which point a new one belongs, and where on the side. */
export function sideNear(rings: readonly PlaneRing[], point: Point, reachM: number): Side | null {
  let best: Side | null = null;
  let bestM = reachM;
  for (const [ring, { points, closed }] of rings.entries()) {
    for (const [index, a] of points.entries()) {
      const b = points[index + 1] ?? (closed ? points[0] : undefined);
      if (!b) continue;
      const at = nearestOnSegment(point, a, b);
      const awayM = distanceBetweenM(at, point);
      if (awayM > bestM) continue;
      bestM = awayM;
      best = { ring, index, at };
    }
  }
  return best;
}
