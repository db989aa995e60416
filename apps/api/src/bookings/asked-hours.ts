import type { FreeAsked } from '@mereward/shared/bookings/availability-contract';
import { keptInterval } from '@mereward/shared/bookings/peg-room';
import type { PegWish } from '@mereward/shared/bookings/peg-standing';
import type { Duration, TicketType } from '@mereward/shared/tickets/contract';
import {
  ticketInterval,
  type LakePlace,
  type Refusal,
  type TicketHours,
} from '@mereward/shared/tickets/ticket-interval';
import { dayAndClock } from '@mereward/shared/time/day-names';
import { addDays, instantOf } from '@mereward/shared/time/zoned';

/** A day without a kind of ticket: common practice, no published source. */
const DAYLIGHT: Duration = { kind: 'dawn_dusk', beforeSunriseMinutes: 60, afterSunsetMinutes: 60 };

type Asked = Pick<FreeAsked, 'start' | 'nights'>;

/** The hours somebody asks for on a day, at one lake. */
export function askedHours(
  day: string,
  asked: Asked,
  { type, place }: { type: TicketType | null; place: LakePlace },
): TicketHours | Refusal {
  const choice = { day, start: asked.start ?? null };
  if (type) return ticketInterval(type.duration, choice, place);
  if (asked.nights === 0) return ticketInterval(DAYLIGHT, choice, place);
  const { zone } = place;
  const from = instantOf(`${day}T12:00`, zone).at;
  const until = instantOf(`${addDays(day, asked.nights)}T12:00`, zone).at;
  return { from, until, words: [from, until].map((at) => dayAndClock(at.toISOString(), zone)).join(' to ') };
}

/** What is wanted of each peg for those hours. */
export const wishFor = (
  hours: TicketHours,
  { people, rods }: Pick<FreeAsked, 'people' | 'rods'>,
  type: TicketType | null,
): PegWish => ({ hours, kept: keptInterval(hours, type?.turnaroundMinutes ?? 0), people, rods });
