import { calendarUid, type CalendarEvent } from '../writing/calendar';
import type { BookingState } from './booking-state';

/** A booking as far as a calendar tells of it. */
export type CalendarBooking = {
  id: string;
  code: string;
  version: number;
  changedAt: Date;
  from: Date;
  until: Date;
  status: BookingState;
  ticketName: string;
  pegs: readonly string[]; // numbers; none: a peg is chosen on arrival, or none is taken
  lakeName: string | null; // null: good on every lake
  fisheryName: string;
};

const CANCELLED: ReadonlySet<BookingState> = new Set<BookingState>([
  'cancelled_by_angler',
  'cancelled_by_fishery',
  'expired',
]);

/**
 * A booking as an event for its holder’s calendar. The UID never changes and the sequence goes up with the version, so
 * that a moved booking moves and a cancelled one goes. `publicUrl`: the server’s address. Source: RFC 5545 section 3.8.7.4.
 */
export function bookingEvent(booking: CalendarBooking, publicUrl: string): CalendarEvent {
  const { pegs, lakeName, fisheryName } = booking;
  const place = [
    pegs.length === 0 ? null : `${pegs.length === 1 ? 'peg' : 'pegs'} ${pegs.join(', ')}`,
    lakeName,
  ].filter((part) => part !== null);
  return {
    uid: calendarUid('booking', booking.id, new URL(publicUrl).hostname),
    sequence: booking.version,
    stampedAt: booking.changedAt,
    from: booking.from,
    until: booking.until,
    summary: `Fishing: ${place.length === 0 ? fisheryName : place.join(', ')}`,
    description: `${booking.ticketName}, code ${booking.code}`,
    location: [...(lakeName === null ? [] : [lakeName]), fisheryName].join(', '),
    status: CANCELLED.has(booking.status) ? 'cancelled' : 'confirmed',
    url: `${publicUrl}/tickets/bookings/${booking.id}`,
  };
}
