import type { LakeView } from '@mereward/shared/lakes/contract';
import type { VisitView } from '@mereward/shared/surveys/contract';
import { fromMetres } from '@mereward/shared/units/length';
import { dayAndTime, dayName } from '@/lib/format-time';
import { figure } from '@/lib/format';

/** A reading as it stands on the board, in the board's own unit: "0.62 m". */
export function boardReads(lake: LakeView | undefined, boardId: string, levelM: number): string {
  const unit = lake?.boards.find(({ id }) => id === boardId)?.details.unit ?? 'm';
  return `${figure(fromMetres(levelM, unit), 2)}\u00A0${unit}`;
}

export const visitGauge = (lake: LakeView | undefined, visit: VisitView): string =>
  `${visit.lakeName} · gauge ${boardReads(lake, visit.boardId, visit.gaugeStartM)}`;

/** The civil day of an instant at the fishery: "Sat 3 April 2027". */
export const dayAt = (at: string, zone: string): string =>
  dayName(new Intl.DateTimeFormat('en-CA', { timeZone: zone }).format(new Date(at)));

export const countWords = (count: number, one: string): string =>
  `${figure(count)} ${count === 1 ? one : `${one}s`}`;

/** "12 casts", "12 casts, 4,310 soundings": what a visit holds. */
export function visitCountWords({
  castCount,
  soundingCount,
}: Pick<VisitView, 'castCount' | 'soundingCount'>): string {
  const soundings = soundingCount > 0 ? [countWords(soundingCount, 'sounding')] : [];
  const casts = castCount > 0 || soundingCount === 0 ? [countWords(castCount, 'cast')] : [];
  return [...casts, ...soundings].join(', ');
}

/** "0.54 m on board B1, 2 days ago", or that nobody has read it. */
export function levelWords(lake: LakeView): string {
  const { levelNow } = lake;
  if (levelNow === null) return 'Nobody has read a gauge board here yet.';
  const board = lake.boards.find(({ details }) => details.code === levelNow.boardCode);
  const reads = boardReads(lake, board?.id ?? '', levelNow.boardReadsM);
  return `Board ${levelNow.boardCode} read ${reads}, ${dayAndTime(levelNow.at, lake.zone)}`;
}
