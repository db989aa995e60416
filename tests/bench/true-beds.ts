import type { SamplePoints } from '@mereward/shared/charts/sample-points';
import { barredBed, gaussian, seeded } from './beds';

/** An invented bed over 200 × 200 m and how it was sounded. Depths in metres. */
export type TrueBed = {
  name: 'smooth' | 'barred' | 'noisy tracks';
  depthM: (x: number, y: number) => number;
  noiseM: number; // σ of one sounding, told to whoever makes a surface of them
  soundings: (count: number) => SamplePoints;
};

/** A silted bowl: nothing shorter than some thirty metres. */
const smoothBed = (x: number, y: number): number =>
  3 + 1.1 * Math.sin(x / 31) * Math.cos(y / 37) + 0.4 * Math.cos((x + y) / 23);

/** Bars, hollows and a shelf that falls a metre over some eight. */
const shelvedBed = (x: number, y: number): number =>
  barredBed(x, y) + 0.5 * Math.tanh((y - 120 - 12 * Math.sin(x / 30)) / 4);

function scattered(depthM: TrueBed['depthM'], seed: number): TrueBed['soundings'] {
  return (count) => {
    const random = seeded(seed);
    const [xM, yM] = [new Float64Array(count), new Float64Array(count)];
    for (let i = 0; i < count; i++) {
      xM[i] = 200 * random();
      yM[i] = 200 * random();
    }
    const valueM = xM.map((x, i) => depthM(x, yM[i]!));
    return { xM, yM, valueM, errorVarianceM2: new Float64Array(count) };
  };
}

/** Up and down in tracks five times as far apart as the soundings on them, wandering; every sounding with its own error. */
function tracked(depthM: TrueBed['depthM'], noiseM: number, seed: number): TrueBed['soundings'] {
  return (count) => {
    const random = seeded(seed);
    const apartM = Math.sqrt((5 * 200 * 200) / count);
    const tracks = Math.round(200 / apartM);
    const onTrack = Math.ceil(count / tracks);
    const [xM, yM] = [new Float64Array(count), new Float64Array(count)];
    for (let i = 0; i < count; i++) {
      const track = Math.floor(i / onTrack);
      const along = (200 * ((i % onTrack) + random())) / onTrack;
      const wander = 0.6 * apartM * Math.sin(along / 17 + 2 * track);
      xM[i] = Math.min(200, Math.max(0, (track + 0.5) * (200 / tracks) + wander));
      yM[i] = track % 2 === 0 ? along : 200 - along;
    }
    const valueM = xM.map((x, i) => depthM(x, yM[i]!) + noiseM * gaussian(random));
    return { xM, yM, valueM, errorVarianceM2: new Float64Array(count).fill(noiseM * noiseM) };
  };
}

const TRACK_NOISE_M = 0.05;

export const TRUE_BEDS: readonly TrueBed[] = [
  { name: 'smooth', depthM: smoothBed, noiseM: 0, soundings: scattered(smoothBed, 20260201) },
  { name: 'barred', depthM: shelvedBed, noiseM: 0, soundings: scattered(shelvedBed, 20260202) },
  {
    name: 'noisy tracks',
    depthM: shelvedBed,
    noiseM: TRACK_NOISE_M,
    soundings: tracked(shelvedBed, TRACK_NOISE_M, 20260203),
  },
];
