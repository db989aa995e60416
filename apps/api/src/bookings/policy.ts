import type { Role } from '@mereward/shared/accounts/contract';
import { addDays, startOfDay } from '@mereward/shared/time/zoned';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { Interval } from '@mereward/shared/time/interval';
import { holdsAny, type Actor } from '../ctx';

/** Who writes and cancels tickets for others, and sees all of them. */
export const TICKET_WRITERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];
/** Who checks tickets on the bank: yesterday's, today's and tomorrow's. */
export const TICKET_CHECKERS = ['head_bailiff', 'bailiff'] as const satisfies readonly Role[];
/** Who settles how pegs are let: money, cancelling, holds. */
export const TERMS_SETTERS = ['owner', 'manager'] as const satisfies readonly Role[];
/** Who sees who has a peg, whatever the day. */
export const BOARD_READERS = [...TICKET_WRITERS, 'head_bailiff'] as const satisfies readonly Role[];
/** Who keeps pegs back. */
export const PEG_BLOCKERS = TICKET_WRITERS;
/** Who is told how to reach an angler, and when they were born. */
export const CONTACT_READERS = ['manager', 'office'] as const satisfies readonly Role[];
/** Who moves others to another peg or day: the office, and the head bailiff on the bank. */
export const TICKET_MOVERS = [...TICKET_WRITERS, 'head_bailiff'] as const satisfies readonly Role[];
export const TICKET_READERS = [...TICKET_WRITERS, ...TICKET_CHECKERS] as const satisfies readonly Role[];

/** How somebody stands to one booking. */
export type Standing = {
  holder: boolean;
  writes: boolean; // for others
  moves: boolean;
  checks: boolean; // on the bank
  contacts: boolean; // may be told how to reach its people
  money: boolean; // may be told of its payments
};

type Seen = Interval & { fisheryId: string; accountId: string | null; zone: string };

/** Yesterday, today and tomorrow at the lake. */
export function daysAround(now: Date, zone: string): Interval {
  const today = civilDay(now, zone);
  return { from: startOfDay(addDays(today, -1), zone), until: startOfDay(addDays(today, 2), zone) };
}

/** Null for somebody to whom this booking isn't there. */
export function standingTo(actor: Actor, seen: Seen, now: Date): Standing | null {
  if (actor.kind === 'stranger') return null;
  const holder = seen.accountId === actor.id;
  const holds = (roles: readonly Role[]): boolean => holdsAny(actor, seen.fisheryId, roles);
  const around = daysAround(now, seen.zone);
  const near = seen.from < around.until && around.from < seen.until;
  const checks = holds(BOARD_READERS) || (holds(TICKET_CHECKERS) && near);
  if (!holder && !checks) return null;
  return {
    holder,
    writes: holds(TICKET_WRITERS),
    moves: holds(TICKET_MOVERS),
    checks,
    contacts: holder || holds(CONTACT_READERS),
    money: holder || holds(TICKET_WRITERS),
  };
}
