import type { Line } from './mark';

/** Where in a ring words stand best: the middle of the longest level run, metres. */
export type WidestPlace = { xM: number; yM: number; acrossM: number; roomM: number };

const ROWS = 24;

/**
 * Looks along level lines through the ring, its holes left out, for the widest stretch whose neighbours above and
 * below are wide too.
 */
export function widestPlace(ring: Line, holes: readonly Line[]): WidestPlace | null {
  let [south, north] = [Infinity, -Infinity];
  for (let i = 1; i < ring.length; i += 2) {
    south = Math.min(south, ring[i]!);
    north = Math.max(north, ring[i]!);
  }
  if (!(north > south)) return null;
  const gapM = (north - south) / ROWS;
  const runs = Array.from({ length: ROWS }, (_, row) =>
    longestRun([ring, ...holes], south + (row + 0.5) * gapM),
  );
  let best: WidestPlace | null = null;
  for (let row = 1; row < ROWS - 1; row++) {
    const [below, here, above] = [runs[row - 1], runs[row], runs[row + 1]];
    if (!below || !here || !above) continue;
    const from = Math.max(below[0], here[0], above[0]);
    const to = Math.min(below[1], here[1], above[1]);
    const acrossM = to - from;
    const edgeRows = Math.min(row, ROWS - 1 - row);
    const roomM = (edgeRows + 0.5) * gapM;
    if (
      acrossM > 0 &&
      (!best || acrossM * Math.min(roomM, acrossM) > best.acrossM * Math.min(best.roomM, best.acrossM))
    )
      best = { xM: (from + to) / 2, yM: south + (row + 0.5) * gapM, acrossM, roomM };
  }
  return best;
}

/** Twice the ring's signed area: above nought when it turns counter-clockwise, as the edge of an area does. */
export function turnOf(ring: Line): number {
  let twice = 0;
  for (let i = 0; i < ring.length; i += 2) {
    const j = (i + 2) % ring.length;
    twice += ring[i]! * ring[j + 1]! - ring[j]! * ring[i + 1]!;
  }
  return twice;
}

/** Is a place inside the rings, by the even-odd rule? */
export function isInside(rings: readonly Line[], x: number, y: number): boolean {
  return rings.flatMap((ring) => crossingsOf(ring, y)).filter((at) => at < x).length % 2 === 1;
}

function longestRun(rings: readonly Line[], yM: number): readonly [number, number] | null {
  const crossings = rings.flatMap((ring) => crossingsOf(ring, yM)).sort((a, b) => a - b);
  let best: readonly [number, number] | null = null;
  for (let i = 0; i + 1 < crossings.length; i += 2) {
    const run = [crossings[i]!, crossings[i + 1]!] as const;
    if (!best || run[1] - run[0] > best[1] - best[0]) best = run;
  }
  return best;
}

function crossingsOf(ring: Line, yM: number): number[] {
  const crossings: number[] = [];
  for (let i = 0; i < ring.length; i += 2) {
    const j = (i + 2) % ring.length;
    const [ay, by] = [ring[i + 1]!, ring[j + 1]!];
    if (ay > yM !== by > yM) crossings.push(ring[i]! + ((yM - ay) / (by - ay)) * (ring[j]! - ring[i]!));
  }
  return crossings;
}
