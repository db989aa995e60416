import type { CastObservation, Kit, ReductionStep } from './contract';
import { SIGMA } from './error-budget';
import { metres, plusMinus, step } from './reduction-step';

type FloatReading = Pick<CastObservation, 'pulls' | 'pullsAgain' | 'floatSight'>;
type FloatKit = Pick<Kit, 'pullM' | 'floatOffsetM'>;

export type FloatDepth = {
  depthM: number;
  sigmaM: number;
  pulls: number; // as used: the mean of two readings
  repeated: boolean; // two readings no more than a pull apart
  steps: ReductionStep[];
};

/**
 * Depth by marker float, metres: the float shows somewhere inside the last pull, so d = (n − ½)·p + c with the
 * rectangular σ = p/√12, the σ of n pulls of p, and that of c. Two readings no more than a pull apart are meaned; that
 * doesn't shrink the rectangular part, since both end at the same pull. Null when no reading was taken;
 * `disagree` when two readings are more than a pull apart, and neither is used.
 */
export function floatDepth(reading: FloatReading, kit: FloatKit): FloatDepth | 'disagree' | null {
  const { pulls, pullsAgain } = reading;
  if (pulls === null) return null;
  if (pullsAgain !== null && Math.abs(pulls - pullsAgain) > 1) return 'disagree';
  const used = pullsAgain === null ? pulls : (pulls + pullsAgain) / 2;
  const depthM = (used - 0.5) * kit.pullM + kit.floatOffsetM;
  const goodM = Math.hypot(kit.pullM / Math.sqrt(12), used * kit.pullM * SIGMA.pullShare, SIGMA.floatOffsetM);
  const sigmaM = reading.floatSight === 'poor' ? goodM * SIGMA.poorFloatShare : goodM;
  const counted = pullsAgain === null ? `${pulls} pulls` : `${pulls} and ${pullsAgain} pulls`;
  const depthStep = step(
    ['float', 'Depth by float', 'd = (n − ½)·p + c'],
    [
      ['counted', counted],
      ['n', `${used}`],
      ['p, one pull', metres(kit.pullM, 4)],
      ['c, float and link', metres(kit.floatOffsetM)],
      ['float seen', reading.floatSight ?? 'not said'],
    ],
    { value: metres(depthM), sigma: plusMinus(sigmaM, 'm') },
  );
  return { depthM, sigmaM, pulls: used, repeated: pullsAgain !== null, steps: [depthStep] };
}
