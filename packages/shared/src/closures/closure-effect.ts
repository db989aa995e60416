import type { ClosureChoice, ClosureEffect, ClosureReason, ClosureScope } from './contract';
import { civilDay } from '../time/civil-day';
import { addDays, civilTime, HOUR_MS, instantOf } from '../time/zoned';

/** A closure as it holds: `until` null while nobody has lifted it and no end is set. Half-open. */
export type Closure = {
  scope: ClosureScope;
  reason: ClosureReason;
  effect: ClosureEffect;
  from: Date;
  until: Date | null;
  liftedAt: Date | null;
};

/** A booking as far as a closure looks at it. */
export type BookedStay = {
  lakeId: string;
  pegId: string | null; // null: a peg is chosen on arrival
  from: Date;
  until: Date;
  season: boolean;
};

export const CLOSURE_REASON_WORDS: Readonly<Record<ClosureReason, string>> = {
  byelaw_close_season: 'Close season by byelaw',
  own_close_season: 'Close season of the fishery',
  spawning: 'Fish are spawning',
  oxygen: 'Low oxygen',
  algae: 'Algae',
  flood: 'Flood',
  ice: 'Ice',
  wind: 'Wind',
  works: 'Works',
  netting: 'Netting',
  match: 'Match',
  disease_control: 'Disease control',
  incident: 'Incident',
  private_event: 'Private event',
};

/** Reasons that are law: no one here may let anybody fish in spite of them. */
const LEGAL: readonly ClosureReason[] = ['byelaw_close_season', 'disease_control'];
export const isLegal = (reason: ClosureReason): boolean => LEGAL.includes(reason);

/** When it really ends: lifted early, at its set end, or not yet (null). */
export function closedUntil({ until, liftedAt }: Closure): Date | null {
  if (liftedAt === null) return until;
  return until !== null && until < liftedAt ? until : liftedAt;
}

export function closureState(closure: Closure, now: Date): 'to_come' | 'in_force' | 'over' {
  const end = closedUntil(closure);
  if (end !== null && (now >= end || end <= closure.from)) return 'over';
  return now < closure.from ? 'to_come' : 'in_force';
}

/** What a closure does to a booking. A season ticket runs on; who holds one is told. */
export type ClosureBite = 'none' | 'tell' | 'warn' | 'keep_out' | 'choose' | 'refund';

/**
 * What a closure does to a booking of some hours: nothing where times or places don’t meet. One that shares only an
 * end with it is let be. A closed method takes no peg away: nights hit stays over a midnight, nets and boats are told.
 */
export function affects(closure: Closure, stay: BookedStay, zone: string): ClosureBite {
  const end = closedUntil(closure);
  const meets =
    closure.from < stay.until && (end === null || stay.from < end) && (end === null || closure.from < end);
  if (!meets || !inScope(closure.scope, stay, zone)) return 'none';
  if (stay.season) return 'tell';
  if (closure.scope.kind === 'method' && closure.scope.method !== 'night') return 'warn';
  return BITES[closure.effect];
}

const BITES = {
  block: 'keep_out',
  move: 'choose',
  refund: 'refund',
  allow_with_warning: 'warn',
} as const satisfies Record<ClosureEffect, ClosureBite>;

function inScope(scope: ClosureScope, { lakeId, pegId, from, until }: BookedStay, zone: string): boolean {
  switch (scope.kind) {
    case 'fishery':
      return true;
    case 'lakes':
      return scope.lakeIds.includes(lakeId);
    case 'pegs':
      return pegId !== null && scope.pegIds.includes(pegId);
    case 'method': {
      if (scope.lakeIds !== null && !scope.lakeIds.includes(lakeId)) return false;
      const lastDay = civilDay(new Date(until.getTime() - 1), zone);
      return scope.method !== 'night' || civilDay(from, zone) !== lastDay;
    }
  }
}

/** May a new booking be made in spite of it? Only where it warns; a manager with a reason may where it is no law. */
export function mayBookInSpite(closure: Closure, bite: ClosureBite, byManager: boolean): boolean {
  if (bite === 'none' || bite === 'tell' || bite === 'warn') return true;
  return byManager && !isLegal(closure.reason);
}

/** Common practice, no published source: by ten the next morning, or the ticket’s start with two hours to answer. */
export function choiceDeadline(toldAt: Date, start: Date, zone: string): Date {
  const morning = instantOf(`${addDays(civilTime(toldAt, zone).slice(0, 10), 1)}T10:00`, zone).at;
  if (start >= morning) return morning;
  return new Date(Math.max(start.getTime(), toldAt.getTime() + 2 * HOUR_MS));
}

/** What becomes of a booking that a closure hit: what was chosen in time, else all the money back; null while waiting. */
export function choiceOutcome(
  chosen: { choice: ClosureChoice; at: Date } | null,
  deadline: Date,
  now: Date,
): ClosureChoice | null {
  if (chosen && chosen.at < deadline) return chosen.choice;
  return now >= deadline ? 'refund' : null;
}
