import type { CastObservation, Kit, ReductionStep } from './contract';
import { refuse, type CastSite, type Refusal } from './cast-site';
import { DEEPEST_M, SIGMA } from './error-budget';
import { floatDepth } from './float-depth';
import { beyondCalibrationWords, fallDepth, uncalibratedFallWords } from './lead-fall';
import { metres, plusMinus, step } from './reduction-step';

/** The depth of one reading below the water of that hour; null figures when none can be used. */
export type CastDepth = {
  ok: true;
  depthM: number | null;
  sigmaM: number | null;
  repeated: boolean;
  byFall: boolean;
  warnings: string[];
  steps: ReductionStep[];
};

/** Depth by float; else by the counted fall of a calibrated lead; an uncalibrated count is told and never used. */
export function castDepth(cast: CastObservation, kit: Kit, site: CastSite): CastDepth | Refusal {
  const float = floatDepth(cast, kit);
  const answer = float && float !== 'disagree' ? byFloat(float, cast) : byFall(cast, site);
  if (float === 'disagree') {
    const words = `The two float readings, ${cast.pulls} and ${cast.pullsAgain} pulls, are more than a pull apart, so neither is used: read it again`;
    answer.warnings.unshift(words);
  }
  if (answer.depthM !== null && !(answer.depthM >= 0)) {
    return refuse(
      `The depth comes out as ${answer.depthM.toFixed(2)} m, above the water`,
      'Check the pulls and the float’s offset',
    );
  }
  if (answer.depthM !== null && answer.depthM > DEEPEST_M) {
    const words = `The depth comes out as ${answer.depthM.toFixed(1)} m, past the ${DEEPEST_M} m that a bank survey can mean`;
    return refuse(words, 'Check the pulls and the length of a pull');
  }
  return answer;
}

function byFloat(
  float: { depthM: number; sigmaM: number; repeated: boolean; steps: ReductionStep[] },
  cast: CastObservation,
): CastDepth {
  const sinkM = softBottomSigmaM(cast);
  const sigmaM = Math.hypot(float.sigmaM, sinkM);
  const warnings = cast.floatSight === 'poor' ? ['The float was seen poorly: weed may have held it'] : [];
  if (sinkM > 0)
    warnings.push(
      'On a soft bottom the lead sinks in, so the hard bed may lie deeper or shallower than read',
    );
  return { ...float, ok: true, sigmaM, byFall: false, warnings };
}

/** The lead sinks into soft silt and the link holds the ring up: neither is the same from cast to cast. */
function softBottomSigmaM({ drop, cameBack }: CastObservation): number {
  if (drop !== 'soft_slow') return 0;
  return cameBack?.includes('black_silt') ? SIGMA.deepSiltM : SIGMA.softBottomM;
}

function byFall({ dropCountS }: CastObservation, { lead }: CastSite): CastDepth {
  const none = { ok: true, repeated: false } as const;
  if (dropCountS === null || dropCountS === 0) {
    return { ...none, depthM: null, sigmaM: null, byFall: false, warnings: [], steps: [] };
  }
  if (!lead) {
    const warnings = [uncalibratedFallWords(dropCountS)];
    return { ...none, depthM: null, sigmaM: null, byFall: false, warnings, steps: [] };
  }
  const { depthM, sigmaM } = fallDepth(dropCountS, lead);
  const fallStep = step(
    ['fall', 'Depth by counted fall', 'd = t · rate'],
    [
      ['t', `${dropCountS} s`],
      [
        'rate of this lead',
        `${lead.rateMPerS.toFixed(3)} ± ${lead.rateSigmaMPerS.toFixed(3)} m/s, from ${lead.spots} spots`,
      ],
    ],
    { value: metres(depthM), sigma: plusMinus(sigmaM, 'm') },
  );
  const beyond = beyondCalibrationWords(dropCountS, lead);
  return { ...none, depthM, sigmaM, byFall: true, warnings: beyond ? [beyond] : [], steps: [fallStep] };
}
