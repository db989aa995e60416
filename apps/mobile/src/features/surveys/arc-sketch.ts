import { pointAlong, type Point } from '@mereward/shared/geometry/plane';
import { ringsOf, type Outline } from '@mereward/shared/geometry/polygon';
import type { Grade } from '@mereward/shared/surveys/contract';
import type { ArcCell } from '@mereward/shared/surveys/peg-arc';
import type { Colours } from '@/constants/colours';

export type SketchCast = Point & { grade: Grade };

export type ArcSketch = {
  outline: Outline;
  stance: Point;
  facingDeg: number;
  reachM: number;
  cells: readonly ArcCell[];
  casts: readonly SketchCast[];
  /** Where the cast being typed would fall. */
  now: Point | null;
};

const WIDTH = 340;
const HEIGHT = 240;
const MARGIN = 14;

/** The peg's water seen from above with the peg at the foot, looking out; what is covered, and where casts fell. An SVG. */
export function arcSketchSvg(sketch: ArcSketch, colours: Colours): string {
  const place = placer(sketch);
  const ring = (points: readonly Point[]) => `M${points.map((p) => place(p).join(' ')).join('L')}Z`;
  const shore = ringsOf(sketch.outline).map(ring).join('');
  const cells = sketch.cells.map((cell) => cellPath(sketch.stance, cell, place));
  const covered = sketch.cells.flatMap((cell, i) => (cell.casts > 0 ? [cells[i] ?? ''] : [])).join('');
  const parts = [
    `<path d="${shore}" fill="${colours.sheet}" fill-rule="evenodd" stroke="${colours.ink}" stroke-width="1.5"/>`,
    `<path d="${covered}" fill="${colours.waterTint}"/>`,
    `<path d="${cells.join('')}" fill="none" stroke="${colours.rule}" stroke-width="1"/>`,
    ...sketch.casts.map((cast) => castShape(place(cast), cast.grade, colours.ink)),
    standing(place(sketch.stance), colours.float),
    ...(sketch.now ? [nowShape(place(sketch.stance), place(sketch.now), colours.float)] : []),
  ];
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${WIDTH} ${HEIGHT}" width="100%" style="max-width:${WIDTH * 1.5}px">${parts.join('')}</svg>`;
}

type Placer = (p: Point) => [number, number];

/** Turns the plane so that the peg's middle line runs up the sketch, and fits its reach. */
function placer({ stance, facingDeg, reachM }: ArcSketch): Placer {
  const turn = (facingDeg * Math.PI) / 180;
  const scale = Math.min((HEIGHT - 2 * MARGIN) / (reachM * 1.08), (WIDTH - 2 * MARGIN) / (reachM * 1.2));
  return ({ xM, yM }) => {
    const east = xM - stance.xM;
    const north = yM - stance.yM;
    const right = east * Math.cos(turn) - north * Math.sin(turn);
    const out = east * Math.sin(turn) + north * Math.cos(turn);
    return [round(WIDTH / 2 + right * scale), round(HEIGHT - MARGIN - out * scale)];
  };
}

const round = (px: number): number => Math.round(px * 10) / 10;

function cellPath(stance: Point, { fromDeg, toDeg, fromM, toM }: ArcCell, place: Placer): string {
  const corners = [
    pointAlong(stance, fromDeg, fromM),
    pointAlong(stance, fromDeg, toM),
    pointAlong(stance, toDeg, toM),
    pointAlong(stance, toDeg, fromM),
  ];
  return `M${corners.map((p) => place(p).join(' ')).join('L')}Z`;
}

/** Grades by shape, as beside the list: A a full dot, B a ring, C a triangle, D a cross. */
function castShape([x, y]: [number, number], grade: Grade, ink: string): string {
  switch (grade) {
    case 'A':
      return `<circle cx="${x}" cy="${y}" r="3.6" fill="${ink}"/>`;
    case 'B':
      return `<circle cx="${x}" cy="${y}" r="3.4" fill="none" stroke="${ink}" stroke-width="1.6"/>`;
    case 'C':
      return `<path d="M${x} ${y - 4}L${x + 4} ${y + 3.4}L${x - 4} ${y + 3.4}Z" fill="none" stroke="${ink}" stroke-width="1.5"/>`;
    case 'D':
      return `<path d="M${x - 3} ${y - 3}L${x + 3} ${y + 3}M${x + 3} ${y - 3}L${x - 3} ${y + 3}" stroke="${ink}" stroke-width="1.5"/>`;
  }
}

const standing = ([x, y]: [number, number], colour: string): string =>
  `<path d="M${x - 9} ${y}H${x + 9}M${x} ${y}V${y - 7}" stroke="${colour}" stroke-width="3"/>`;

const nowShape = ([x0, y0]: [number, number], [x, y]: [number, number], colour: string): string =>
  `<path d="M${x0} ${y0}L${x} ${y}" stroke="${colour}" stroke-width="1.2" stroke-dasharray="4 3"/><circle cx="${x}" cy="${y}" r="5" fill="none" stroke="${colour}" stroke-width="2.4"/>`;
