import type { SamplePoints } from './sample-points';

/** Distances over which a margin is taken to run out to the lake's floor, metres. Common practice, no published source. */
const LENGTHS_M = [3, 4.5, 7, 10, 15, 22, 33, 50, 80] as const;

/**
 * The external drift: 1 − e^(−d/L) of the distance d to the shore, both in metres. It rises steeply in the margin and is all
 * but level beyond 3 L, as beds do; a long L is nearly the distance itself.
 */
export function shoreDrift(shoreDistanceM: Float64Array, lengthM: number): Float64Array {
  return shoreDistanceM.map((distanceM) => 1 - Math.exp(-distanceM / lengthM));
}

/** The length that explains the samples' depths best by least squares, and what it leaves; null when none explains any. */
export function fitShoreDrift(
  points: SamplePoints,
  shoreDistanceM: Float64Array,
): { lengthM: number; residual: SamplePoints } | null {
  let best: { lengthM: number; residual: SamplePoints; squares: number } | null = null;
  for (const lengthM of LENGTHS_M) {
    const trial = leftBy(points, shoreDrift(shoreDistanceM, lengthM));
    if (trial !== null && (best === null || trial.squares < best.squares)) best = { lengthM, ...trial };
  }
  return best;
}

function leftBy(
  points: SamplePoints,
  drift: Float64Array,
): { residual: SamplePoints; squares: number } | null {
  const { valueM } = points;
  const count = drift.length;
  let sd = 0;
  let sz = 0;
  let sdd = 0;
  let sdz = 0;
  for (let i = 0; i < count; i++) {
    sd += drift[i]!;
    sz += valueM[i]!;
    sdd += drift[i]! * drift[i]!;
    sdz += drift[i]! * valueM[i]!;
  }
  const spread = sdd - (sd * sd) / count;
  if (!(spread > 1e-9)) return null;
  const slope = (sdz - (sd * sz) / count) / spread;
  const level = (sz - slope * sd) / count;
  const left = valueM.map((z, i) => z - level - slope * drift[i]!);
  return { residual: { ...points, valueM: left }, squares: left.reduce((sum, r) => sum + r * r, 0) };
}
