import type { TicketView } from '@mereward/shared/bookings/contract';
import { clockTime, dayAndTime } from '@/lib/format-time';
import { civilTime } from '@/lib/zoned-time';

type Times = Pick<TicketView, 'from' | 'until' | 'zone'>;

/** "Sat 4 July 2026, 07:00 to 20:00", or both days where it runs over midnight. */
export function ticketTimes({ from, until, zone }: Times): string {
  const day = (at: string): string => civilTime(Date.parse(at), zone).slice(0, 10);
  if (day(from) === day(until)) return `${dayAndTime(from, zone)} to ${clockTime(until, zone)}`;
  return `${dayAndTime(from, zone)} to ${dayAndTime(until, zone)}`;
}
