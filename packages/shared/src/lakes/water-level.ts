import { FOOT_M } from '../units/length';
import type { GaugeBoardDetails, LevelWarning } from './contract';

/** A number read off the board, as metres. */
export const readingM = (number: number, unit: GaugeBoardDetails['unit']): number =>
  unit === 'ft' ? number * FOOT_M : number;

/**
 * The board's reading as a level that rises with the water, metres. A board fitted upside down is turned about
 * the chart datum, so that level − datum is the rise of the water on every board.
 */
export const levelOver = (
  boardReadsM: number,
  board: { higherNumberHigherWater: boolean },
  datumM: number,
) => (board.higherNumberHigherWater ? boardReadsM : 2 * datumM - boardReadsM);

/** More than this in a day is unusual on a stillwater without flood: common practice, no published source. */
const JUMP_M_PER_DAY = 0.2;
const DAY_S = 86_400;

type Read = { levelM: number; at: Date };

/**
 * What to tell whoever has just read the board. `levelM` and the board's limits are metres as the board reads;
 * a limit is passed in the sense of the water, whichever way the board is painted.
 */
export function levelWarnings(board: GaugeBoardDetails, fresh: Read, before: Read | null): LevelWarning[] {
  const warnings = limitWarnings(board, fresh.levelM);
  if (!before) return warnings;
  const days = (fresh.at.getTime() - before.at.getTime()) / 1000 / DAY_S;
  if (days < 0) {
    const words = `A newer reading of ${board.code} is on record: this one is kept in its place in time, and today’s level stays as it was.`;
    return [...warnings, { kind: 'older_than_newest', words }];
  }
  const changeM = fresh.levelM - before.levelM;
  if (Math.abs(changeM) <= JUMP_M_PER_DAY * Math.max(1, days)) return warnings;
  const way = changeM > 0 ? 'more' : 'less';
  const words = `That is ${Math.abs(changeM).toFixed(2)} m ${way} than the reading before (${before.levelM.toFixed(2)} m). Look again: if it was misread, take this reading back and record the right one.`;
  return [...warnings, { kind: 'jump', words }];
}

function limitWarnings(board: GaugeBoardDetails, levelM: number): LevelWarning[] {
  const sense = board.higherNumberHigherWater ? 1 : -1;
  const reaches = (limitM: number | null) => limitM !== null && sense * (levelM - limitM) >= 0;
  const fallsTo = (limitM: number | null) => limitM !== null && sense * (limitM - levelM) >= 0;
  const at = `${board.code} reads ${levelM.toFixed(2)} m`;
  if (reaches(board.alarmHighM)) {
    const words = `High water: ${at}, at or past the alarm of ${metres(board.alarmHighM)}. Tell the manager; look at low pegs, paths and parking.`;
    return [{ kind: 'alarm_high', words }];
  }
  if (fallsTo(board.alarmLowM)) {
    const words = `Low water: ${at}, at or past the alarm of ${metres(board.alarmLowM)}. Tell the manager; fish are crowded and banks are steep.`;
    return [{ kind: 'alarm_low', words }];
  }
  const high = board.normalHighM !== null && sense * (levelM - board.normalHighM) > 0;
  const low = board.normalLowM !== null && sense * (board.normalLowM - levelM) > 0;
  if (!high && !low) return [];
  const range = `${metres(board.normalLowM)} to ${metres(board.normalHighM)}`;
  const words = `${at}, ${high ? 'higher' : 'lower'} water than its normal range (${range}).`;
  return [{ kind: 'outside_normal', words }];
}

const metres = (limitM: number | null): string => (limitM === null ? 'no limit' : `${limitM.toFixed(2)} m`);

/** Limits that contradict each other, with the field each fault belongs to. */
export function boardFaults(board: GaugeBoardDetails): { field: string; words: string }[] {
  const sense = board.higherNumberHigherWater ? 1 : -1;
  const order: [keyof GaugeBoardDetails & `${string}M`, keyof GaugeBoardDetails & `${string}M`, string][] = [
    ['normalLowM', 'normalHighM', 'The normal range'],
    ['alarmLowM', 'alarmHighM', 'The pair of alarms'],
  ];
  return order.flatMap(([low, high, what]) => {
    const lowM = board[low];
    const highM = board[high];
    if (lowM === null || highM === null || sense * (highM - lowM) > 0) return [];
    const turned =
      sense < 0
        ? ' On a board where a higher number is lower water, the low limit is the higher number.'
        : '';
    return [
      { field: high, words: `${what} is the wrong way round: high water must lie above low water.${turned}` },
    ];
  });
}
