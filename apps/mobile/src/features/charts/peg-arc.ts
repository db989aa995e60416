import { ruled, stroked, text, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { normaliseBearing } from '@mereward/shared/geometry/geodesic';
import { pointAlong, type Point } from '@mereward/shared/geometry/plane';
import { insideOutline, type Outline } from '@mereward/shared/geometry/polygon';

/** How far from the origin mark the handles of the arc's limits stand, metres. */
export const HANDLE_M = 30;
/** Half the arc that is offered before anybody has set the limits. */
const HALF_ARC_DEG = 45;
/** The origin mark is offered this far behind the water's edge. */
const BEHIND_M = 1;

const LOOK_M = [6, 12, 20];
const LOOK_EVERY_DEG = 10;

/** Which way the open water lies from a place on the shore, degrees; null where there is none or it lies all round. */
export function towardsWaterDeg(outline: Outline, from: Point): number | null {
  let east = 0;
  let north = 0;
  for (let bearingDeg = 0; bearingDeg < 360; bearingDeg += LOOK_EVERY_DEG) {
    const wet = LOOK_M.filter((awayM) => insideOutline(outline, pointAlong(from, bearingDeg, awayM))).length;
    east += wet * Math.sin((bearingDeg * Math.PI) / 180);
    north += wet * Math.cos((bearingDeg * Math.PI) / 180);
  }
  return Math.hypot(east, north) < 1 ? null : normaliseBearing((Math.atan2(east, north) * 180) / Math.PI);
}

export type OfferedStance = { origin: Point; fromDeg: number; toDeg: number };

/** Where the origin mark and the limits probably are, once the water's edge is known: to be looked at and moved. */
export function offeredStance(outline: Outline, edge: Point): OfferedStance | null {
  const facing = towardsWaterDeg(outline, edge);
  if (facing === null) return null;
  return {
    origin: pointAlong(edge, facing + 180, BEHIND_M),
    fromDeg: Math.round(normaliseBearing(facing - HALF_ARC_DEG)) % 360,
    toDeg: Math.round(normaliseBearing(facing + HALF_ARC_DEG)) % 360,
  };
}

export type Stance = {
  edge: Point | null;
  origin: Point | null;
  fromDeg: number | null;
  toDeg: number | null;
};

const EDGE = 'm-7 0a7 7 0 1 0 14 0a7 7 0 1 0 -14 0z';
const ORIGIN = 'm-7 -7h14v14h-14z';
const KNOB = 'm-6 0a6 6 0 1 0 12 0a6 6 0 1 0 -12 0z';

/** The peg being placed: edge, origin mark, its arc with a handle on each limit. */
export function stanceMarks({ edge, origin, fromDeg, toDeg }: Stance, palette: Palette): Mark[] {
  const limits = origin
    ? [
        { bearingDeg: fromDeg, words: 'left' },
        { bearingDeg: toDeg, words: 'right' },
      ].flatMap(({ bearingDeg, words }) =>
        bearingDeg === null ? [] : [{ words, at: pointAlong(origin, bearingDeg, HANDLE_M) }],
      )
    : [];
  return [
    ...(origin && fromDeg !== null && toDeg !== null
      ? [stroked([arcLine(origin, fromDeg, toDeg)], ruled(palette.selected, 1.6, [4, 5]))]
      : []),
    ...(origin
      ? limits.flatMap(({ at, words }): Mark[] => [
          stroked([[origin.xM, origin.yM, at.xM, at.yM]], ruled(palette.selected, 2)),
          {
            kind: 'glyphs',
            at: [at.xM, at.yM],
            glyph: KNOB,
            fill: palette.selected,
            stroke: ruled(palette.paper, 1.6),
          },
          named(words, at, palette),
        ])
      : []),
    ...(edge
      ? ([
          {
            kind: 'glyphs',
            at: [edge.xM, edge.yM],
            glyph: EDGE,
            fill: palette.paper,
            stroke: ruled(palette.ink, 2),
          },
        ] satisfies Mark[])
      : []),
    ...(origin
      ? ([
          {
            kind: 'glyphs',
            at: [origin.xM, origin.yM],
            glyph: ORIGIN,
            fill: palette.selected,
            stroke: ruled(palette.paper, 1.6),
          },
        ] satisfies Mark[])
      : []),
  ];
}

const named = (words: string, { xM, yM }: Point, palette: Palette): Mark =>
  text({ words, x: xM, y: yM, dyPx: 17, colour: palette.ink, halo: palette.paper });

/** Clockwise from one bearing to the other at the handles' distance. */
function arcLine(origin: Point, fromDeg: number, toDeg: number): number[] {
  const width = normaliseBearing(toDeg - fromDeg);
  const steps = Math.max(2, Math.ceil(width / 5));
  return Array.from({ length: steps + 1 }, (_, i) => {
    const { xM, yM } = pointAlong(origin, fromDeg + (width * i) / steps, HANDLE_M);
    return [xM, yM];
  }).flat();
}
