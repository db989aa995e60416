import type { Interval } from '../time/interval';
import { isQuiet, QUIET_FROM, quietEnd } from '../time/quiet-hours';
import { civilTime, instantOf } from '../time/zoned';

/** Common practice, no published source: half an hour to claim a place. */
export const CLAIM_MINUTES = 30;

const MINUTE_MS = 60_000;

/**
 * When a place that has come free is offered and how long it is kept. Quiet hours (the lake’s clock) don’t count: what
 * of the half hour is left at 22:00 goes on at 07:00. Null when it would start before the half hour is over, so that
 * nobody is offered a place they can’t take.
 */
export function claimWindow(
  freedAt: Date,
  { start, zone, claimMinutes = CLAIM_MINUTES }: { start: Date; zone: string; claimMinutes?: number },
): Interval | null {
  const from = isQuiet(freedAt, zone) ? quietEnd(freedAt, zone) : freedAt;
  const quiet = instantOf(`${civilTime(from, zone).slice(0, 10)}T${QUIET_FROM}`, zone).at;
  const whole = new Date(from.getTime() + claimMinutes * MINUTE_MS);
  const left = whole.getTime() - quiet.getTime();
  const until = left <= 0 ? whole : new Date(quietEnd(quiet, zone).getTime() + left);
  return until.getTime() <= start.getTime() ? { from, until } : null;
}

export type WaitingPlace = {
  id: string;
  joinedAt: Date; // by the server’s clock
  state: 'waiting' | 'offered' | 'taken' | 'left';
  passedOver: readonly string[]; // freed places they let go by
};

/** The order of a list: who joined first, ids where two joined in the same instant. Nobody is moved by hand. */
export const inOrder = <Place extends WaitingPlace>(places: readonly Place[]): Place[] =>
  [...places].sort(
    (a, b) => a.joinedAt.getTime() - b.joinedAt.getTime() || (a.id < b.id ? -1 : a.id > b.id ? 1 : 0),
  );

/** Who is offered a freed place: the first who still waits and has not let this one go by; null when nobody. */
export const nextInLine = <Place extends WaitingPlace>(
  places: readonly Place[],
  freedId: string,
): Place | null =>
  inOrder(places).find(({ state, passedOver }) => state === 'waiting' && !passedOver.includes(freedId)) ??
  null;

/** Somebody’s own place in the line, from 1; null when they are not waiting. Shown to nobody else. */
export function placeInLine(places: readonly WaitingPlace[], id: string): number | null {
  const index = inOrder(places)
    .filter(({ state }) => state === 'waiting' || state === 'offered')
    .findIndex((each) => each.id === id);
  return index < 0 ? null : index + 1;
}
