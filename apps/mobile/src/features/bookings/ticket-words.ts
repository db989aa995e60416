import type { TicketView } from '@mereward/shared/bookings/contract';
import { clockTime, dayAndTime, dayName } from '@/lib/format-time';
import { civilTime } from '@/lib/zoned-time';

type Times = Pick<TicketView, 'from' | 'until' | 'zone'>;

/** "Sat 4 July 2026, 07:00 to 20:00", or both days where it runs over midnight. */
export function ticketTimes({ from, until, zone }: Times): string {
  const day = (at: string): string => civilTime(Date.parse(at), zone).slice(0, 10);
  if (day(from) === day(until)) return `${dayAndTime(from, zone)} to ${clockTime(until, zone)}`;
  return `${dayAndTime(from, zone)} to ${dayAndTime(until, zone)}`;
}

export type TicketState = 'running' | 'to come' | 'over';

export function ticketState({ from, until }: Times, nowMs: number): TicketState {
  if (Date.parse(until) <= nowMs) return 'over';
  return Date.parse(from) <= nowMs ? 'running' : 'to come';
}

/** The day a ticket begins on, in words. */
export const ticketDay = ({ from, zone }: Times): string =>
  dayName(civilTime(Date.parse(from), zone).slice(0, 10));
