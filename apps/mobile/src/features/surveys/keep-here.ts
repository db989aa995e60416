import {
  LevelRecorded,
  type GaugeBoardView,
  type LakeView,
  type RecordLevel,
} from '@mereward/shared/lakes/contract';
import { levelWarnings } from '@mereward/shared/lakes/water-level';
import { CastView, VisitView, type CloseVisit, type OpenVisit } from '@mereward/shared/surveys/contract';
import {
  closingOf,
  keepingOf,
  openingOf,
  readingOf,
  takingBackOf,
  undoingOf,
  type CastMade,
} from '@/features/surveys/visit-events';
import { deliver } from '@/lib/deliver';
import { withdraw } from '@/lib/outbox';

/** What was kept, as the server answered it or as this device shows it meanwhile. */
export type Kept<T> = { value: T; waits: boolean };

type Place = number | null; // in the queue, of a refused one whose place it takes

export async function openVisitHere(
  { visit, shown, typed }: { visit: OpenVisit; shown: VisitView; typed: unknown },
  instead: Place,
): Promise<Kept<VisitView>> {
  const done = await deliver(openingOf(visit, shown, typed), instead);
  if (done.state === 'waiting') return { value: shown, waits: true };
  return { value: VisitView.safeParse(done.answer).data ?? shown, waits: false };
}

export async function keepCastHere(made: CastMade, instead: Place): Promise<Kept<CastView>> {
  const done = await deliver(keepingOf(made), instead);
  if (done.state === 'waiting') return { value: made.shown, waits: true };
  return { value: CastView.safeParse(done.answer).data ?? made.shown, waits: false };
}

/** Takes a cast back: out of the queue when it has not left yet, else on the server, in its turn. Answers whether that waits. */
export async function undoCastHere(visit: VisitView, cast: CastView, at: string): Promise<boolean> {
  if (await withdraw(cast.id)) return false;
  return (await deliver(undoingOf(visit, cast, at))).state === 'waiting';
}

/** Answers whether the closing waits. */
export async function closeVisitHere(
  { visit, closing, typed }: { visit: VisitView; closing: CloseVisit; typed: unknown },
  instead: Place,
): Promise<boolean> {
  return (await deliver(closingOf(visit, closing, typed), instead)).state === 'waiting';
}

type LevelMade = { lake: LakeView; board: GaugeBoardView; reading: RecordLevel; typed: unknown; by: string };

/** What is unusual about a reading is told on this device too, against the newest reading that was read here. */
export async function recordLevelHere(made: LevelMade, instead: Place): Promise<Kept<LevelRecorded>> {
  const { board, reading, by } = made;
  const { id, at, levelM, note } = reading;
  const done = await deliver(readingOf(made), instead);
  const known = done.state === 'sent' ? LevelRecorded.safeParse(done.answer).data : undefined;
  if (known) return { value: known, waits: false };
  const newest = board.readings[0];
  const before = newest ? { levelM: newest.levelM, at: new Date(newest.at) } : null;
  const warnings = levelWarnings(board.details, { levelM, at: new Date(at) }, before);
  return { value: { reading: { id, at, levelM, by, note }, warnings }, waits: done.state === 'waiting' };
}

export async function takeBackLevelHere(
  { lake, board }: { lake: LakeView; board: GaugeBoardView },
  readingId: string,
  at: string,
): Promise<void> {
  if (await withdraw(readingId)) return;
  await deliver(takingBackOf({ lake, board }, readingId, at));
}
