import { normaliseBearing } from '../geometry/bearing';
import { chooseCellM, columnXM, frameOver, rowYM, type GridFrame } from '../geometry/cell-frame';
import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import type { Point } from '../geometry/point';
import type { Outline } from '../geometry/polygon';
import { sightFrom, type Sight } from '../geometry/sight';
import { waterNodes } from '../geometry/water-cells';

/** Where a peg's lines go out from, on the lake's plane; bearings are the plane's, clockwise from its north. */
export type PegStance = { at: Point; arcFromDeg: number; arcToDeg: number; reachM: number };

/** An area drawn by the owner: the place of its peg in the list, or null for nobody's. */
export type DrawnArea = { peg: number | null; ring: readonly Point[] };

/** No water there, and water that is no peg's. */
export const LAND = -2;
export const NOBODY = -1;

/**
 * Whose water every cell is: the place of a peg in the list, `NOBODY` or `LAND`. One number a cell, so no place can be two
 * pegs' water. `area`: which drawn area decided the cell, −1 for none.
 */
export type PegWaters = { frame: GridFrame; owner: Int16Array; area: Int16Array };

/**
 * Parts a lake's water among its pegs. First each cell goes to the nearest stance that can cast there: inside the peg's arc,
 * no farther than it casts, in straight sight over the water (islands and points of land block); of what a peg gets so, the
 * piece at its stance is its own, and pieces behind another's water are nobody's. Then the drawn areas
 * are laid on in their order, the last one on top. Of two stances equally near the one earlier in the list has it, and
 * scraps under 12 m² that a twig of the shore hides or frees go to whoever lies most round them.
 */
export function pegWaters(
  outline: Outline,
  pegs: readonly PegStance[],
  areas: readonly DrawnArea[] = [],
): PegWaters {
  const frame = frameOver(outline.shore, chooseCellM(outline.shore));
  const water = waterNodes(outline, frame);
  const owner = new Int16Array(water.length).fill(LAND);
  const casters = pegs.map((peg) => casterOf(outline, peg));
  for (let node = 0; node < water.length; node++) {
    if (water[node] !== 1) continue;
    const row = Math.floor(node / frame.columns);
    owner[node] = nearest(casters, columnXM(frame, node - row * frame.columns), rowYM(frame, row));
  }
  takeInStrays(owner, frame);
  leaveOnePiece(owner, frame, pegs);
  const area = new Int16Array(water.length).fill(-1);
  areas.forEach(({ peg, ring }, place) => {
    const covered = waterNodes({ shore: [...ring], islands: [] }, frame);
    for (let node = 0; node < water.length; node++) {
      if (covered[node] !== 1 || water[node] !== 1) continue;
      owner[node] = peg ?? NOBODY;
      area[node] = place;
    }
  });
  return { frame, owner, area };
}

type Caster = {
  x: number;
  y: number;
  reach2: number;
  inArc: (dx: number, dy: number) => boolean;
  sees: Sight;
};

function casterOf(outline: Outline, { at, arcFromDeg, arcToDeg, reachM }: PegStance): Caster {
  const widthDeg = normaliseBearing(arcToDeg - arcFromDeg);
  const inArc = (dx: number, dy: number): boolean =>
    normaliseBearing((Math.atan2(dx, dy) * 180) / Math.PI - arcFromDeg) <= widthDeg;
  return { x: at.xM, y: at.yM, reach2: reachM * reachM, inArc, sees: sightFrom(outline, at) };
}

function nearest(casters: readonly Caster[], xM: number, yM: number): number {
  let best = NOBODY;
  let least = Infinity;
  for (let i = 0; i < casters.length; i++) {
    const { x, y, reach2, inArc, sees } = casters[i]!;
    const dx = xM - x;
    const dy = yM - y;
    const d2 = dx * dx + dy * dy;
    if (d2 >= least || d2 > reach2 || !inArc(dx, dy) || !sees(xM, yM)) continue;
    best = i;
    least = d2;
  }
  return best;
}

/** A peg's water is one piece, the one at its stance: what lies behind another's water is no more its own to cast to. */
function leaveOnePiece(owner: Int16Array, frame: GridFrame, pegs: readonly PegStance[]): void {
  const { of } = cellRegions(owner, frame.columns, 0);
  const nearest = pegs.map(() => ({ region: -1, d2: Infinity }));
  for (let node = 0; node < owner.length; node++) {
    const peg = pegs[owner[node]!];
    const best = nearest[owner[node]!];
    if (!peg || !best) continue;
    const dx = columnXM(frame, node % frame.columns) - peg.at.xM;
    const dy = rowYM(frame, Math.floor(node / frame.columns)) - peg.at.yM;
    if (dx * dx + dy * dy < best.d2) nearest[owner[node]!] = { region: of[node]!, d2: dx * dx + dy * dy };
  }
  for (let node = 0; node < owner.length; node++) {
    const best = nearest[owner[node]!];
    if (best && best.region !== of[node]) owner[node] = NOBODY;
  }
}

/** A scrap of water smaller than this is nobody's to argue over, m². */
const SCRAP_M2 = 12;

function takeInStrays(owner: Int16Array, { columns, cellM }: GridFrame): void {
  const { of, sizes } = cellRegions(owner, columns, NOBODY);
  const most = SCRAP_M2 / cellM ** 2;
  const round = new Map<number, Map<number, number>>(); // of each scrap: how many sides each neighbour has
  for (let node = 0; node < owner.length; node++) {
    const region = of[node]!;
    if (region < 0 || sizes[region]! >= most) continue;
    for (const next of [node - 1, node + 1, node - columns, node + columns]) {
      const other = of[next] ?? -1;
      if (other < 0 || other === region || sizes[other]! < most) continue;
      const sides = round.get(region) ?? new Map<number, number>();
      round.set(region, sides.set(owner[next]!, (sides.get(owner[next]!) ?? 0) + 1));
    }
  }
  const taken = new Map([...round].map(([region, sides]) => [region, commonest(sides)]));
  for (let node = 0; node < owner.length; node++) owner[node] = taken.get(of[node]!) ?? owner[node]!;
}

const commonest = (sides: ReadonlyMap<number, number>): number =>
  [...sides].sort(([a, m], [b, n]) => n - m || a - b)[0]![0];

export type Reachable = { inArc: boolean; inRange: boolean; inSight: boolean };

/** Answers of places on the water whether a line from this stance could reach them, each condition by itself. */
export function reachFrom(outline: Outline, peg: PegStance): (place: Point) => Reachable {
  const { x, y, reach2, inArc, sees } = casterOf(outline, peg);
  return ({ xM, yM }) => {
    const dx = xM - x;
    const dy = yM - y;
    return { inArc: inArc(dx, dy), inRange: dx * dx + dy * dy <= reach2, inSight: sees(xM, yM) };
  };
}

/** Whose water a place is: the cell it lies in, beside the shore the nearest cell of water within one; LAND farther off. */
export function ownerAt({ frame, owner }: PegWaters, { xM, yM }: Point): number {
  const { columns, rows, cellM, originM } = frame;
  const column = Math.round((xM - originM.xM) / cellM);
  const row = Math.round((yM - originM.yM) / cellM);
  let found = LAND;
  let least = Infinity;
  for (let r = row - 1; r <= row + 1; r++) {
    for (let c = column - 1; c <= column + 1; c++) {
      if (c < 0 || r < 0 || c >= columns || r >= rows) continue;
      const whose = owner[r * columns + c]!;
      if (whose === LAND) continue;
      if (c === column && r === row) return whose;
      const d2 = (columnXM(frame, c) - xM) ** 2 + (rowYM(frame, r) - yM) ** 2;
      if (d2 >= least) continue;
      found = whose;
      least = d2;
    }
  }
  return found;
}

/** Area of each peg's water, of nobody's, and of what each drawn area still decides, m². */
export function waterAreas({ frame, owner, area }: PegWaters, pegCount: number, areaCount: number) {
  const cellM2 = frame.cellM ** 2;
  const pegsM2 = new Array<number>(pegCount).fill(0);
  const areasM2 = new Array<number>(areaCount).fill(0);
  let nobodysM2 = 0;
  owner.forEach((whose, node) => {
    if (whose === NOBODY) nobodysM2 += cellM2;
    else if (whose >= 0) pegsM2[whose] = pegsM2[whose]! + cellM2;
    const by = area[node]!;
    if (by >= 0) areasM2[by] = areasM2[by]! + cellM2;
  });
  return { pegsM2, areasM2, nobodysM2 };
}

/** Borders of each peg's water: closed rings of x, y, x, y … metres; neighbours share every line between them. */
export const waterRings = ({ frame, owner }: PegWaters, pegCount: number): number[][][] =>
  regionRings(owner, frame, pegCount);
