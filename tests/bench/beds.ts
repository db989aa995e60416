import type { SamplePoints } from '@mereward/shared/charts/sample-points';

/** Numbers in [0, 1) from a fixed seed. Source: Park & Miller, Communications of the ACM 31, 1988. */
export function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

export function gaussian(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** A bed with bars and hollows over 200 × 200 m, metres deep. */
export const barredBed = (x: number, y: number): number =>
  3 + Math.sin(x / 19) * Math.cos(y / 23) + 0.8 * Math.exp(-(((x - 0.6 * y - 40) / 12) ** 2));

export function barredSoundings(count: number, noiseM: number): SamplePoints {
  const random = seeded(20260101);
  const points: SamplePoints = {
    xM: new Float64Array(count),
    yM: new Float64Array(count),
    valueM: new Float64Array(count),
    errorVarianceM2: new Float64Array(count),
  };
  for (let i = 0; i < count; i++) {
    points.xM[i] = 200 * random();
    points.yM[i] = 200 * random();
    points.valueM[i] = barredBed(points.xM[i]!, points.yM[i]!) + noiseM * gaussian(random);
  }
  return points;
}

/** Centres of 200 × 200 cells of a metre. */
export function metreCells(): { xM: Float64Array; yM: Float64Array } {
  return {
    xM: Float64Array.from({ length: 40_000 }, (_, i) => (i % 200) + 0.5),
    yM: Float64Array.from({ length: 40_000 }, (_, i) => Math.floor(i / 200) + 0.5),
  };
}

export function rmse(got: Float64Array, truth: (i: number) => number): number {
  let squares = 0;
  let count = 0;
  got.forEach((value, i) => {
    const difference = value - truth(i);
    if (Number.isNaN(difference)) return;
    squares += difference * difference;
    count++;
  });
  return Math.sqrt(squares / count);
}
