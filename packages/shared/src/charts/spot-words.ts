import type { Bottom, Grade } from '../surveys/contract';
import { dayWords } from '../time/civil-day';
import { FOOT_M } from '../units/length';
import { BOTTOM_WORDS } from './bottom-words';

/** Sticks as an angler names them: "12 ft", "10 ft", "2 m", "3.66 m". */
export function stickWords(stickSpacingM: number): string {
  const feet = stickSpacingM / FOOT_M;
  const wholeFeet = Math.round(feet);
  if (Math.abs(feet - wholeFeet) < 0.002) return `${wholeFeet} ft`;
  return `${Number(stickSpacingM.toFixed(2))} m`;
}

/** A count as it is read out: "14 wraps", "14 wraps + 0.62 m". Less than half a centimetre over is nothing over. */
export function countWords(wrapsWhole: number, remainderM: number): string {
  const wraps = wrapsWhole === 1 ? '1 wrap' : `${wrapsWhole} wraps`;
  return remainderM < 0.005 ? wraps : `${wraps} + ${remainderM.toFixed(2)} m`;
}

/** Charted depth as it stands with the water now, metres; below nought the place is dry. */
export const depthTodayM = (depthAtDatumM: number, levelM: number, datumM: number): number =>
  depthAtDatumM + levelM - datumM;

/** A depth as it may be published: to a tenth of a metre, never finer. */
export const depthWords = (depthM: number): string => (depthM <= 0 ? 'dry bank' : `${depthM.toFixed(1)} m`);

export type SpotFacts = {
  wrapsWhole: number;
  remainderM: number;
  stickSpacingM: number;
  depthM: number | null; // at datum
  survey: { depthM: number; levelM: number } | null; // below the water at the cast it is quoted from, and its level
  datumM: number;
  levelM: number | null; // now
  bottom: Bottom | null;
  grade: Grade | null;
  surveyedOn: string | null;
  chartVersion: string | null;
};

/**
 * All of a spot in one sentence: how to reach it, the depth today, then what that comes from. What this reader may not
 * see is null and is left out.
 */
export function spotWords(spot: SpotFacts): string {
  const reach = `${countWords(spot.wrapsWhole, spot.remainderM)} (${stickWords(spot.stickSpacingM)})`;
  const facts = [
    depthPart(spot),
    spot.bottom === null ? null : BOTTOM_WORDS[spot.bottom],
    spot.grade === null ? null : `grade ${spot.grade}`,
    spot.surveyedOn === null ? null : `surveyed ${dayWords(spot.surveyedOn)}`,
    spot.chartVersion === null ? null : `chart ${spot.chartVersion}`,
  ].filter((part) => part !== null);
  return facts.length === 0 ? reach : `${reach}: ${facts.join(', ')}`;
}

function depthPart({ depthM, survey, datumM, levelM }: SpotFacts): string | null {
  if (depthM === null) return null;
  const then = survey
    ? `${depthWords(survey.depthM)} at survey level ${survey.levelM.toFixed(2)}`
    : `${depthWords(depthM)} at chart datum ${datumM.toFixed(2)}`;
  if (levelM === null) return then;
  const todayM = depthTodayM(depthM, levelM, datumM);
  return todayM <= 0 ? `dry bank today (${then})` : `about ${depthWords(todayM)} today (${then})`;
}
