import { bearingDifferenceDeg, normaliseBearing } from '../geometry/geodesic';
import { arcWidthDeg } from '../lakes/peg-rules';

/** Lines every ten degrees, casts every two wraps: common practice, no published source. */
export const SECTOR_DEG = 10;
export const RING_WRAPS = 2;
/** Two throws that land nearer than this were thrown at one place (a good angler repeats within 1 m each way). */
export const REPEAT_WITHIN_M = 2;

/** The water a peg's survey should cover. */
export type PegArc = {
  arcFromDeg: number; // left limit, true
  arcToDeg: number; // right limit, clockwise from the left
  longestCastM: number;
  lineAWrapM: number;
  /** Is the middle of a cell on the peg's water? Cells on land, or beyond the far bank, need no cast. */
  isWater: (at: Polar) => boolean;
};

/** A place seen from the peg. */
export type Polar = { bearingDeg: number; rangeM: number };

/** A cast that landed; further readings closer in on the same throw share its `lineId` and are no repeats of it. */
export type Landed = Polar & { lineId: string };

/** One cell of the arc, for the running sketch. */
export type ArcCell = {
  fromDeg: number;
  toDeg: number;
  fromM: number;
  toM: number;
  casts: number;
};

/**
 * The cells of a peg's arc that lie on water, sectors of at most 10° by rings of two wraps from two wraps out to the
 * longest cast, with how many casts landed in each.
 */
export function arcCells(arc: PegArc, casts: readonly Landed[]): ArcCell[] {
  const widthDeg = arcWidthDeg(arc);
  const sectors = Math.max(1, Math.ceil(widthDeg / SECTOR_DEG - 1e-9));
  const sectorDeg = widthDeg / sectors;
  const ringM = RING_WRAPS * arc.lineAWrapM;
  const counts = countByCell(arc, casts, { sectorDeg, ringM });
  const cells: ArcCell[] = [];
  for (let ring = 1; (ring + 0.5) * ringM <= arc.longestCastM; ring++) {
    for (let sector = 0; sector < sectors; sector++) {
      const fromDeg = normaliseBearing(arc.arcFromDeg + sector * sectorDeg);
      const toDeg = normaliseBearing(arc.arcFromDeg + (sector + 1) * sectorDeg);
      const middle = { bearingDeg: normaliseBearing(fromDeg + sectorDeg / 2), rangeM: (ring + 0.5) * ringM };
      if (!arc.isWater(middle)) continue;
      const landed = counts.get(`${sector} ${ring}`) ?? 0;
      cells.push({ fromDeg, toDeg, fromM: ring * ringM, toM: (ring + 1) * ringM, casts: landed });
    }
  }
  return cells;
}

function countByCell(
  arc: PegArc,
  casts: readonly Landed[],
  { sectorDeg, ringM }: { sectorDeg: number; ringM: number },
): Map<string, number> {
  const counts = new Map<string, number>();
  for (const { bearingDeg, rangeM } of casts) {
    const turnDeg = normaliseBearing(bearingDeg - arc.arcFromDeg);
    const key = `${Math.floor(turnDeg / sectorDeg)} ${Math.floor(rangeM / ringM)}`;
    counts.set(key, (counts.get(key) ?? 0) + 1);
  }
  return counts;
}

/**
 * Share of the arc's cells that a cast landed in (a chart asks for 60 %), and share of casts that were thrown again at
 * a place another throw had reached (10 %). An arc without water, or without casts, has a share of 0.
 */
export function arcCoverage(arc: PegArc, casts: readonly Landed[]): { share: number; repeatsShare: number } {
  const cells = arcCells(arc, casts);
  const reached = cells.filter((cell) => cell.casts > 0).length;
  const repeats = casts.filter((cast, i) => casts.slice(0, i).some((other) => isRepeat(cast, other)));
  return {
    share: cells.length === 0 ? 0 : reached / cells.length,
    repeatsShare: casts.length === 0 ? 0 : repeats.length / casts.length,
  };
}

/** Near in, neighbouring lines lie within two metres of one another too: a repeat is thrown on the same line as well. */
function isRepeat(cast: Landed, other: Landed): boolean {
  if (other.lineId === cast.lineId || apartM(cast, other) > REPEAT_WITHIN_M) return false;
  return Math.abs(bearingDifferenceDeg(cast.bearingDeg, other.bearingDeg)) < SECTOR_DEG / 2;
}

function apartM(a: Polar, b: Polar): number {
  const turn = ((a.bearingDeg - b.bearingDeg) * Math.PI) / 180;
  const squared = a.rangeM ** 2 + b.rangeM ** 2 - 2 * a.rangeM * b.rangeM * Math.cos(turn);
  return Math.sqrt(Math.max(0, squared));
}
