import { leaveOneOut, summarise } from './cross-validation';
import type { CrossValidation, LeaveOneOut } from './cross-validation';
import type { KrigingSetup } from './kriging-setup';
import type { SamplePoints } from './sample-points';
import { empiricalVariogram, VARIOGRAM_MODELS } from './variogram';
import type { VariogramModel } from './variogram';
import { fitVariogram } from './variogram-fit';

/** One way of making the surface, and how well it foretells soundings left out. */
export type Candidate = {
  model: VariogramModel;
  withShoreDistance: boolean;
  setup: KrigingSetup;
  validation: CrossValidation; // over the soundings; shore points are not scored
  residuals: LeaveOneOut;
};

export type ChosenSurface = { best: Candidate; candidates: Candidate[]; words: string };

export type ChoiceInput = {
  points: SamplePoints; // soundings first
  soundingCount: number;
  shoreDistanceM: Float64Array; // of each sample
};

const NEARLY_AS_GOOD = 1.02;
const MODEL_WORDS: Record<VariogramModel, string> = {
  spherical: 'spherical',
  exponential: 'exponential',
  gaussian: 'Gaussian',
  matern32: 'Matérn 3/2',
};

/**
 * Fits every variogram model, with and without the distance to the shore as external drift, and keeps the one with the
 * least leave-one-out error; of those within 2 % of it, the one whose stated σ is most honest (standardised variance
 * nearest 1), then the first tried. `report` is told the share done.
 */
export function chooseSurface(input: ChoiceInput, report: (share: number) => void): ChosenSurface {
  const candidates: Candidate[] = [];
  const tries = [false, true].flatMap((drift) => VARIOGRAM_MODELS.map((model) => ({ drift, model })));
  tries.forEach(({ drift, model }, i) => {
    const candidate = tryModel(input, model, drift);
    if (candidate !== null) candidates.push(candidate);
    report((i + 1) / tries.length);
  });
  const least = Math.min(...candidates.map((c) => c.validation.rmseM));
  const near = candidates.filter((c) => c.validation.rmseM <= least * NEARLY_AS_GOOD);
  const best = near.reduce((a, b) => (dishonesty(b) < dishonesty(a) ? b : a));
  return { best, candidates, words: reason(best, candidates) };
}

const dishonesty = ({ validation }: Candidate) =>
  Math.abs(Math.log(Math.max(1e-9, validation.standardisedVariance)));

function tryModel(input: ChoiceInput, model: VariogramModel, withShoreDistance: boolean): Candidate | null {
  const { points, soundingCount, shoreDistanceM } = input;
  const fitted = withShoreDistance ? detrended(input) : points;
  if (fitted === null) return null;
  const bins = empiricalVariogram(fitted, { exactFrom: soundingCount });
  const fit = fitVariogram(bins, model);
  // A flat bed leaves no variation to model; the least sill keeps the system solvable and σ at a millimetre.
  const partialSillM2 = Math.max(fit.partialSillM2, 1e-6);
  // A Gaussian without nugget is singular to rounding; one part in a thousand of the sill is the usual cure.
  const nuggetM2 = model === 'gaussian' ? Math.max(fit.nuggetM2, 1e-3 * partialSillM2) : fit.nuggetM2;
  const setup: KrigingSetup = {
    samples: points,
    variogram: { model, nuggetM2, partialSillM2, rangeM: fit.rangeM },
    nuggetIs: 'noise',
    ...(withShoreDistance ? { driftM: shoreDistanceM } : {}),
  };
  const residuals = leaveOneOut(setup);
  return { model, withShoreDistance, setup, residuals, validation: summarise(residuals, soundingCount) };
}

/** The samples less a straight line in the distance to the shore; null when all lie equally far from it. */
function detrended({ points, shoreDistanceM }: ChoiceInput): SamplePoints | null {
  const count = shoreDistanceM.length;
  let sd = 0;
  let sz = 0;
  let sdd = 0;
  let sdz = 0;
  for (let i = 0; i < count; i++) {
    const d = shoreDistanceM[i]!;
    const z = points.valueM[i]!;
    sd += d;
    sz += z;
    sdd += d * d;
    sdz += d * z;
  }
  const spread = sdd - (sd * sd) / count;
  if (!(spread > 1e-9)) return null;
  const slope = (sdz - (sd * sz) / count) / spread;
  return { ...points, valueM: points.valueM.map((z, i) => z - slope * shoreDistanceM[i]!) };
}

function reason(best: Candidate, candidates: readonly Candidate[]): string {
  const cm = (metres: number) => `${Math.round(metres * 100)} cm`;
  const drift = best.withShoreDistance ? ' with the distance to the shore' : '';
  const worst = Math.max(...candidates.map((c) => c.validation.rmseM));
  return (
    `${MODEL_WORDS[best.model]} variogram${drift}: left out one at a time, soundings are foretold within ` +
    `${cm(best.validation.rmseM)} (root mean square); the ${candidates.length} ways tried ran up to ${cm(worst)}.`
  );
}
