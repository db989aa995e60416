import { isSurveyed } from './grid';
import type { Grid } from './grid';

/** Directions looked along, each both ways: every 22.5°. */
const WAYS = 8;

/**
 * What stands up and what lies deep, cell by cell (NaN unsurveyed), metres. `upM`: along the best of eight lines, how much
 * deeper the bed gets within reach on *both* sides, whichever side gets deeper least. A slope, or the edge of one, falls
 * on one side only and has none. `downM`: the same for what rises on both sides. `roundM`: least over all sixteen ways of
 * how far it rises, so that only a place closed in all round has any. `footM`, `rimM`: σ of the depth at those ends.
 */
export type Relief = {
  upM: Float64Array;
  downM: Float64Array;
  roundM: Float64Array;
  footSigmaM: Float64Array;
  rimSigmaM: Float64Array;
};

/** Looks `reachM` metres along each way; a gap in the survey ends the look. */
export function bedRelief(depth: Grid, sigma: Grid, reachM: number): Relief {
  const { columns, rows, values, cellM } = depth;
  const rays = waysOf(reachM / cellM);
  const blank = () => new Float64Array(values.length).fill(Number.NaN);
  const relief: Relief = {
    upM: blank(),
    downM: blank(),
    roundM: blank(),
    footSigmaM: blank(),
    rimSigmaM: blank(),
  };
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
    relief.upM[node] = up;
    relief.downM[node] = down;
    relief.roundM[node] = round;
    relief.footSigmaM[node] = sigma.values[foot]!;
    relief.rimSigmaM[node] = sigma.values[rim]!;
  }
  return relief;
}

/** Steps of each way as whole cells: a way's cells in the order they are met. */
function waysOf(reachCells: number): Int16Array[] {
  return Array.from({ length: 2 * WAYS }, (_, way) => {
    const angle = (Math.PI * way) / WAYS;
    const steps: number[] = [];
    for (let s = 1; s <= reachCells + 1e-9; s++)
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
