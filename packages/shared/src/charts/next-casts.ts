import { krigedCovariance, preparePlaces, type PreparedPlaces } from './kriged-covariance';
import type { GlobalKriging } from './kriging-global';
import type { Targets } from './sample-points';

/** A cast that could be made: where it would land, and the variance of the depth it would read, m². */
export type Candidate = { xM: number; yM: number; driftM?: number; errorVarianceM2: number };

/** Casts chosen of one peg's candidates, the most telling first. `gainShare`: of the mean variance over the water now. */
export type ChosenCast = { candidate: number; gainShare: number };

/** A cast that takes less than this share of the lake's mean variance is not worth walking for. */
export const LEAST_GAIN = 0.0005;

/**
 * The casts that most reduce the mean kriging variance over the given places of the water, for each peg by itself: greedy,
 * one after another. Adding a sample at x with error variance τ² changes the covariance of what is unknown at a and b by
 * exactly −C(a,x) C(x,b) / (C(x,x) + nugget + τ²) (the nugget only where it is noise), so nothing is solved anew; the value
 * read does not matter, only where it is read. `varianceErrorM2` is the standard error of the mean as if the places had
 * been drawn by chance; spread evenly they do better.
 * Source: Cressie, Statistics for Spatial Data, 1993, section 5.6.1 (spatial sampling by prediction variance); the update is
 * the Gaussian conditioning identity.
 */
export function nextCasts(
  model: GlobalKriging,
  water: Targets,
  { pegs, most }: { pegs: readonly (readonly Candidate[])[]; most: number },
): { meanVarianceM2: number; varianceErrorM2: number; casts: ChosenCast[][] } {
  const places = preparePlaces(model, water);
  const count = places.varianceM2.length;
  const meanVarianceM2 = places.varianceM2.reduce((sum, v) => sum + v, 0) / count;
  const squares = places.varianceM2.reduce((sum, v) => sum + (v - meanVarianceM2) ** 2, 0);
  const varianceErrorM2 = count > 1 ? Math.sqrt(squares / (count - 1) / count) : Infinity;
  const casts = pegs.map((candidates) => chooseOf(places, candidates, { most, meanVarianceM2 }));
  return { meanVarianceM2, varianceErrorM2, casts };
}

type Wanted = { most: number; meanVarianceM2: number };

function chooseOf(places: PreparedPlaces, candidates: readonly Candidate[], wanted: Wanted): ChosenCast[] {
  if (candidates.length === 0 || !(wanted.meanVarianceM2 > 0)) return [];
  const { model } = places;
  const count = candidates.length;
  const own = preparePlaces(model, targetsOf(model, candidates));
  const waterCount = places.varianceM2.length;
  const withWater = new Float64Array(count * waterCount);
  const among = new Float64Array(count * count);
  for (let i = 0; i < count; i++) {
    for (let t = 0; t < waterCount; t++)
      withWater[i * waterCount + t] = krigedCovariance([own, i], [places, t]);
    for (let j = 0; j <= i; j++) {
      const covariance = krigedCovariance([own, i], [own, j]);
      among[i * count + j] = covariance;
      among[j * count + i] = covariance;
    }
  }
  const noiseM2 = model.setup.nuggetIs === 'noise' ? model.setup.variogram.nuggetM2 : 0;
  const readM2 = (i: number) => among[i * count + i]! + noiseM2 + candidates[i]!.errorVarianceM2;
  const gain = (i: number): number => {
    let squares = 0;
    for (let t = i * waterCount, end = t + waterCount; t < end; t++) squares += withWater[t]! * withWater[t]!;
    return squares / waterCount / Math.max(readM2(i), 1e-12) / wanted.meanVarianceM2;
  };
  const chosen: ChosenCast[] = [];
  const left = new Set(candidates.keys());
  for (let order = 0; order < Math.min(wanted.most, count); order++) {
    let best = 0;
    let bestGain = -1;
    for (const i of left) {
      const each = gain(i);
      if (each > bestGain) [best, bestGain] = [i, each];
    }
    if (bestGain < LEAST_GAIN) break;
    left.delete(best);
    chosen.push({ candidate: best, gainShare: bestGain });
    condition({ withWater, among, count, waterCount }, best, readM2(best));
  }
  return chosen;
}

type Covariances = { withWater: Float64Array; among: Float64Array; count: number; waterCount: number };

/** Takes a reading at candidate `at` into every covariance. */
function condition({ withWater, among, count, waterCount }: Covariances, at: number, readM2: number): void {
  const toAt = Float64Array.from(
    { length: count },
    (_, i) => among[i * count + at]! / Math.max(readM2, 1e-12),
  );
  const atWater = withWater.slice(at * waterCount, (at + 1) * waterCount);
  const atAmong = among.slice(at * count, (at + 1) * count);
  for (let i = 0; i < count; i++) {
    const share = toAt[i]!;
    for (let t = 0, p = i * waterCount; t < waterCount; t++, p++)
      withWater[p] = withWater[p]! - share * atWater[t]!;
    for (let j = 0, p = i * count; j < count; j++, p++) among[p] = among[p]! - share * atAmong[j]!;
  }
}

function targetsOf(model: GlobalKriging, candidates: readonly Candidate[]): Targets {
  const places = {
    xM: Float64Array.from(candidates, ({ xM }) => xM),
    yM: Float64Array.from(candidates, ({ yM }) => yM),
  };
  if (model.setup.driftM === undefined) return places;
  return { ...places, driftM: Float64Array.from(candidates, ({ driftM }) => driftM ?? 0) };
}
