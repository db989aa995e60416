import type { LevelNow } from '../lakes/contract';
import { FOOT_M, fromMetres } from '../units/length';
import { length } from '../units/length-words';
import { depthTodayM } from './spot-words';

type LengthUnit = 'm' | 'ft';

/** Steps between isobaths that read well in feet, for those that read well in metres. */
export function stepFor(contourStepM: number, unit: LengthUnit): number {
  if (unit === 'm') return contourStepM;
  if (contourStepM < 0.4) return FOOT_M;
  return contourStepM < 0.8 ? 2 * FOOT_M : 5 * FOOT_M;
}

/** A figure on an isobath: as many decimals as the step needs, no unit. */
export function isobathFigure(depthM: number, stepM: number, unit: LengthUnit): string {
  const step = fromMetres(stepM, unit);
  const decimals = Number.isInteger(Math.round(step * 1000) / 1000)
    ? 0
    : step >= 0.5 - 1e-9 && unit === 'm'
      ? 1
      : 2;
  return fromMetres(depthM, unit).toFixed(decimals);
}

/** A depth as published: to a tenth, "dry bank" where the bed is out of the water. */
export function depthNow(depthM: number, unit: LengthUnit): string {
  return depthM <= 0 ? 'dry bank' : length(depthM, { length: unit });
}

/** The depth today where the level is known, else at datum, and which of the two it is. */
export function depthShown(
  depthAtDatumM: number,
  water: { levelM: number | null; datumM: number },
): { depthM: number; when: 'today' | 'at datum' } {
  return water.levelM === null
    ? { depthM: depthAtDatumM, when: 'at datum' }
    : { depthM: depthTodayM(depthAtDatumM, water.levelM, water.datumM), when: 'today' };
}

/** The level a peg's depths stand at, for the foot of its chart. `when`: the reading's day and time in words. */
export function levelLine(levelNow: LevelNow | null, when: string): string {
  if (!levelNow) return 'no level read yet, so depths are at datum';
  return `the chart’s depths are at datum; the water stands at ${levelNow.boardReadsM.toFixed(2)} m on ${levelNow.boardCode}, read ${when}`;
}
