import { leaveOneOut, summarise } from './cross-validation';
import type { CrossValidation, LeaveOneOut } from './cross-validation';
import { askedSoundings, foretell, meanLogDensity } from './foretelling';
import type { Asked } from './foretelling';
import { localSpread } from './local-spread';
import type { Misses } from './local-spread';
import { surfaceCandidates } from './surface-candidates';
import type { Candidate, CandidateInput } from './surface-candidates';
import type { VariogramModel } from './variogram';

export type ChosenSurface = {
  best: Candidate;
  candidates: Candidate[];
  misses: Misses; // of the best, with each sounding's neighbourhood left out
  residuals: LeaveOneOut; // of the best, as the chart itself is kriged
  validation: CrossValidation;
  words: string;
};

export type ChoiceInput = CandidateInput & {
  maxGapM: number; // widest gap that is still drawn
  awayM: Float64Array; // from places drawn on the chart to their nearest sounding
};

const NEARLY_AS_GOOD = 1.04;
const MODEL_WORDS: Record<VariogramModel, string> = {
  spherical: 'spherical',
  exponential: 'exponential',
  gaussian: 'Gaussian',
  matern32: 'Matérn 3/2',
  matern52: 'Matérn 5/2',
};

/**
 * Tries every way of making the surface and keeps the one that foretells left-out soundings best. Of those within 4 % of
 * the least leave-one-out error the one is taken that gives soundings most likelihood when those round about are left out
 * too, as far as places of the chart lie from their nearest sounding: σ is needed between casts, where leaving out one of
 * two close readings teaches nothing. Their sills are first scaled so that such soundings are missed by what σ says, unless
 * that would foretell worse. `report` hears the share done.
 */
export function chooseSurface(input: ChoiceInput, report: (share: number) => void): ChosenSurface {
  const asked = askedSoundings(input.points, input.soundingCount, input.awayM);
  const candidates = surfaceCandidates(input, asked, (share) => report(0.6 * share));
  const least = Math.min(...candidates.map((c) => c.rmseM));
  const near = candidates.filter((c) => c.rmseM <= least * NEARLY_AS_GOOD).map((c) => madeHonest(c, asked));
  const best = near.reduce((a, b) => (b.gapScore > a.gapScore ? b : a));
  const misses = missesOf(best, asked);
  const residuals = spreadResiduals(leaveOneOut(best.setup), misses, input);
  report(1);
  const validation = summarise(residuals, input.soundingCount);
  return {
    best,
    candidates,
    misses,
    residuals,
    validation,
    words: reason(best, candidates, validation),
  };
}

/**
 * The candidate with sill and nugget scaled together until soundings left out with their neighbourhood are missed by what σ
 * says: standardised variance 1, in three steps. Left as it was when that would foretell single soundings worse.
 */
function madeHonest(candidate: Candidate, asked: Asked): Candidate {
  let { setup } = candidate;
  for (let step = 0; step < 3; step++) {
    const { standardisedVariance } = summarise(foretell(setup, asked, 'apart'));
    const { variogram } = setup;
    const scale = Math.min(10, Math.max(0.1, standardisedVariance));
    setup = {
      ...setup,
      variogram: {
        ...variogram,
        nuggetM2: variogram.nuggetM2 * scale,
        partialSillM2: variogram.partialSillM2 * scale,
      },
    };
  }
  const { rmseM, standardisedVariance } = summarise(foretell(setup, asked, 'alone'));
  if (rmseM > candidate.rmseM) return candidate; // σ alone is scaled then, place by place
  const gapScore = meanLogDensity(foretell(setup, asked, 'apart'));
  return { ...candidate, setup, rmseM, standardisedVariance, gapScore };
}

/** A miss tells of the bed only as far as the bed, and not the sounding's own error, makes up its variance. */
function missesOf({ setup }: Candidate, asked: Asked): Misses {
  const { residualM, varianceM2 } = foretell(setup, asked, 'apart');
  const { xM, yM, errorVarianceM2 } = setup.samples;
  const ofBed = varianceM2.map((v, i) => 1 - Math.min(1, errorVarianceM2[asked.rows[i]!]! / v));
  return {
    xM: Float64Array.from(asked.rows, (row) => xM[row]!),
    yM: Float64Array.from(asked.rows, (row) => yM[row]!),
    squaredSigmas: residualM.map((r, i) => 1 + ofBed[i]! * ((r * r) / varianceM2[i]! - 1)),
  };
}

/** Leave-one-out of the soundings with the variance the chart itself states: kriging's part widened place by place. */
function spreadResiduals(
  { residualM, varianceM2 }: LeaveOneOut,
  misses: Misses,
  { points, soundingCount, maxGapM }: ChoiceInput,
): LeaveOneOut {
  const { xM, yM, errorVarianceM2 } = points;
  const places = { xM: xM.subarray(0, soundingCount), yM: yM.subarray(0, soundingCount) };
  const spread = localSpread(misses, places, maxGapM);
  return {
    residualM: residualM.slice(0, soundingCount),
    varianceM2: spread.map((s, i) => (varianceM2[i]! - errorVarianceM2[i]!) * s + errorVarianceM2[i]!),
  };
}

/** In words, for the report: "Matérn 3/2 variogram, fitted robustly, with the distance to the shore". */
export function nameOf({ model, estimate, driftLengthM }: Candidate): string {
  const fitted = estimate === 'robust' ? ', fitted robustly' : '';
  return `${MODEL_WORDS[model]} variogram${fitted}${driftLengthM === null ? '' : ', with the distance to the shore'}`;
}

function reason(best: Candidate, candidates: readonly Candidate[], validation: CrossValidation): string {
  const cm = (metres: number) => `${Math.round(metres * 100)} cm`;
  const worst = Math.max(...candidates.map((c) => c.rmseM));
  return (
    `${nameOf(best)}: left out one at a time, soundings are foretold within ${cm(validation.rmseM)} (root mean square); ` +
    `the ${candidates.length} ways tried ran up to ${cm(worst)}, and of those nearly as good this one is the most ` +
    'truthful about its own error between casts.'
  );
}
