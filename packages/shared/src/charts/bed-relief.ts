import { isSurveyed } from './grid';
import type { Grid } from './grid';

/** Directions looked along, each both ways: every 22.5°. */
const WAYS = 8;
/** Most steps along a way: the surface is smooth between them. */
const STEPS = 20;

/**
 * What stands up and what lies deep, cell by cell (NaN unsurveyed), metres. `upM`: along the best of eight lines, how much
 * deeper the bed gets within reach on *both* sides, whichever side gets deeper least. A slope, or the edge of one, falls
 * on one side only and has none. `downM`: the same for what rises on both sides. `roundM`: least over all sixteen ways of
 * how far it rises, so that only a place closed in all round has any. `footSigmaM`, `rimSigmaM`: σ of the depth at those
 * ends.
 */
export type Relief = {
  upM: Float64Array;
  downM: Float64Array;
  roundM: Float64Array;
  footSigmaM: Float64Array;
  rimSigmaM: Float64Array;
  /** 1 where the bed bends most across the very line on which it falls (rises) on both sides: a crest, a foot. */
  crest: Uint8Array;
  trough: Uint8Array;
};

/** How far is looked along each way, over what length the bend of the bed is taken, and the least relief of a crest. */
export type ReliefScale = { reachM: number; bendM: number; leastM: number };

/** Looks `reachM` metres along each way; a gap in the survey ends the look. */
export function bedRelief(depth: Grid, sigma: Grid, { reachM, bendM, leastM }: ReliefScale): Relief {
  const { columns, rows, values, cellM } = depth;
  const rays = waysOf(reachM / cellM, Math.max(1, reachM / cellM / STEPS));
  const blank = () => new Float64Array(values.length).fill(Number.NaN);
  const relief: Relief = {
    upM: blank(),
    downM: blank(),
    roundM: blank(),
    footSigmaM: blank(),
    rimSigmaM: blank(),
    crest: new Uint8Array(values.length),
    trough: new Uint8Array(values.length),
  };
  const bend = benderOf(depth, Math.max(1, Math.round(bendM / cellM)));
  const look = lookerOf(depth);
  const deepest = new Int32Array(2 * WAYS);
  const shallowest = new Int32Array(2 * WAYS);
  for (let node = 0; node < columns * rows; node++) {
    const here = values[node]!;
    if (!isSurveyed(here)) continue;
    for (let way = 0; way < 2 * WAYS; way++) look(node, rays[way]!, { deepest, shallowest, way });
    let up = -Infinity;
    let down = -Infinity;
    let round = Infinity;
    let foot = node;
    let rim = node;
    for (let way = 0; way < WAYS; way++) {
      const [d1, d2] = [deepest[way]!, deepest[way + WAYS]!];
      const less = values[d1]! < values[d2]! ? d1 : d2;
      if (values[less]! - here > up) {
        up = values[less]! - here;
        foot = less;
      }
      const [s1, s2] = [shallowest[way]!, shallowest[way + WAYS]!];
      const lower = values[s1]! > values[s2]! ? s1 : s2;
      round = Math.min(round, here - values[lower]!);
      if (here - values[lower]! > down) {
        down = here - values[lower]!;
        rim = lower;
      }
    }
    const bent = bend(node);
    if (bent !== null) {
      const ends = bent.deeper ? deepest : shallowest;
      const both = [-1, 0, 1].map((beside) => {
        const way = (bent.way + beside + WAYS) % WAYS;
        const rises = [ends[way]!, ends[way + WAYS]!].map((end) => Math.abs(values[end]! - here));
        return Math.min(...rises);
      });
      if (Math.max(...both) >= leastM) (bent.deeper ? relief.crest : relief.trough)[node] = 1;
    }
    relief.upM[node] = up;
    relief.downM[node] = down;
    relief.roundM[node] = round;
    relief.footSigmaM[node] = sigma.values[foot]!;
    relief.rimSigmaM[node] = sigma.values[rim]!;
  }
  return relief;
}

type Bend = { way: number; deeper: boolean };

/** The way along which the bed bends most, and whether it gets deeper to both sides there; null beside a gap. */
function benderOf({ columns, values }: Grid, k: number): (node: number) => Bend | null {
  const at = (node: number): number => values[node] ?? Number.NaN;
  return (node) => {
    const here = 2 * at(node);
    const xx = at(node + k) + at(node - k) - here;
    const yy = at(node + k * columns) + at(node - k * columns) - here;
    const rising = at(node + k * columns + k) + at(node - k * columns - k);
    const xy = (rising - at(node + k * columns - k) - at(node - k * columns + k)) / 4;
    if (!Number.isFinite(xx + yy + xy)) return null;
    const spread = Math.hypot(xx - yy, 2 * xy);
    const deeper = xx + yy >= 0; // the greater of both bends has the sign of their sum
    const angle = 0.5 * Math.atan2(2 * xy, xx - yy) + (deeper ? 0 : Math.PI / 2);
    if (Math.abs(xx + yy) + spread < 1e-9) return null;
    return { way: ((Math.round((angle * WAYS) / Math.PI) % WAYS) + WAYS) % WAYS, deeper };
  };
}

/** Steps of each way as whole cells: a way's cells in the order they are met. */
function waysOf(reachCells: number, stepCells: number): Int16Array[] {
  return Array.from({ length: 2 * WAYS }, (_, way) => {
    const angle = (Math.PI * way) / WAYS;
    const steps: number[] = [];
    for (let s = stepCells; s <= reachCells + 1e-9; s += stepCells)
      steps.push(Math.round(s * Math.cos(angle)), Math.round(s * Math.sin(angle)));
    return Int16Array.from(steps);
  });
}

type Found = { deepest: Int32Array; shallowest: Int32Array; way: number };

function lookerOf({ columns, rows, values }: Grid): (node: number, ray: Int16Array, found: Found) => void {
  return (node, ray, { deepest, shallowest, way }) => {
    const column = node % columns;
    const row = (node - column) / columns;
    let deep = node;
    let shallow = node;
    for (let s = 0; s < ray.length; s += 2) {
      const c = column + ray[s]!;
      const r = row + ray[s + 1]!;
      if (c < 0 || r < 0 || c >= columns || r >= rows) break;
      const next = r * columns + c;
      const value = values[next]!;
      if (!isSurveyed(value)) break;
      if (value > values[deep]!) deep = next;
      if (value < values[shallow]!) shallow = next;
    }
    deepest[way] = deep;
    shallowest[way] = shallow;
  };
}

/** Slope of the bed, metres a metre, by central differences (one-sided at the edge of the survey); NaN unsurveyed. */
export function bedSlope({ columns, values, cellM }: Grid): Float64Array {
  const along = (node: number, stepTo: number): number => {
    const before = values[node - stepTo] ?? Number.NaN;
    const after = values[node + stepTo] ?? Number.NaN;
    const here = values[node]!;
    if (isSurveyed(before) && isSurveyed(after)) return (after - before) / (2 * cellM);
    if (isSurveyed(after)) return (after - here) / cellM;
    return isSurveyed(before) ? (here - before) / cellM : 0;
  };
  return values.map((value, node) =>
    isSurveyed(value) ? Math.hypot(along(node, 1), along(node, columns)) : Number.NaN,
  );
}
