import { FOOT_M } from '../units/length';
import { refuse, type Refusal } from './cast-site';

/** A lead's fall on one line, learnt on spots of known depth. */
export type LeadCalibration = {
  rateMPerS: number;
  rateSigmaMPerS: number; // standard error of the rate
  scatterM: number; // of one depth about the rate
  spots: number;
  longestS?: number | undefined; // the longest fall it was learnt on
};

export type KnownFall = { seconds: number; depthM: number };

/** Starting and stopping a count by hand, seconds, one σ: common practice, no published source. */
const TIMING_S = 0.2;

/**
 * A lead's rate of fall from counts on spots of known depth: regression through the origin, rate = Σtd / Σt², its
 * standard error s / √Σt² with s² = Σ(d − rate·t)² / (n − 1). Scatter is never taken smaller than a hand can time.
 * At least three spots, not all of one depth.
 */
export function calibrateLead(
  falls: readonly KnownFall[],
): { ok: true; calibration: LeadCalibration } | Refusal {
  if (
    falls.some(({ seconds, depthM }) => !(seconds > 0) || !(depthM > 0) || !Number.isFinite(seconds + depthM))
  ) {
    return refuse(
      'Every calibration needs a count and a depth greater than nothing',
      'Correct the empty or zero row',
    );
  }
  const depths = falls.map(({ depthM }) => depthM);
  if (falls.length < 3 || Math.max(...depths) - Math.min(...depths) < 0.5) {
    const words = 'A lead is calibrated on at least three spots, half a metre or more apart in depth';
    return refuse(words, 'Count the fall over a shallow, a middling and a deep spot read by float');
  }
  const timesSquared = falls.reduce((sum, { seconds }) => sum + seconds * seconds, 0);
  const rateMPerS = falls.reduce((sum, { seconds, depthM }) => sum + seconds * depthM, 0) / timesSquared;
  const squares = falls.reduce((sum, { seconds, depthM }) => sum + (depthM - rateMPerS * seconds) ** 2, 0);
  const residualM = Math.sqrt(squares / (falls.length - 1));
  const scatterM = Math.max(residualM, TIMING_S * rateMPerS);
  const rateSigmaMPerS = scatterM / Math.sqrt(timesSquared);
  const longestS = Math.max(...falls.map(({ seconds }) => seconds));
  return { ok: true, calibration: { rateMPerS, rateSigmaMPerS, scatterM, spots: falls.length, longestS } };
}

/** Depth of a counted fall by a calibrated lead, metres, with σ of the rate and of one fall. */
export function fallDepth(seconds: number, lead: LeadCalibration): { depthM: number; sigmaM: number } {
  return {
    depthM: seconds * lead.rateMPerS,
    sigmaM: Math.hypot(seconds * lead.rateSigmaMPerS, lead.scatterM),
  };
}

/** Said of a count well beyond those a lead was calibrated on; null where there is nothing to say. */
export function beyondCalibrationWords(seconds: number, { longestS }: LeadCalibration): string | null {
  if (longestS === undefined || seconds <= 1.5 * longestS) return null;
  return `Counted ${seconds} s, but this lead was calibrated on falls of ${longestS} s at most: so much deeper its rate is a guess`;
}

/**
 * What an uncalibrated count is worth, in words: it is shown beside the cast and never plotted. A foot a second on a
 * held line is common practice, no published source; a free one-ounce lead falls some seven times faster.
 */
export function uncalibratedFallWords(seconds: number): string {
  const heldM = seconds * FOOT_M;
  return `Counted down ${seconds} s: about ${heldM.toFixed(1)} m on a held line, several times more on a free one. This lead is not calibrated, so the count is not used as a depth`;
}
