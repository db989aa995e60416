import { expect, test } from 'vitest';
import { bookingEvent, type CalendarBooking } from './booking-calendar';

const booking: CalendarBooking = {
  id: '5b1f0f6a-0000-4000-8000-000000000001',
  code: '7KDMXP',
  version: 3,
  changedAt: new Date('2027-07-01T09:00:00Z'),
  from: new Date('2027-07-17T11:00:00Z'),
  until: new Date('2027-07-18T11:00:00Z'),
  status: 'confirmed',
  ticketName: '24 hours',
  pegs: ['FO7', 'FO8'],
  lakeName: 'Far Ostle',
  fisheryName: 'Ostlemere Waters',
};
const at = 'https://mereward.example:8443';

test('an event says where, until when and by which code', () => {
  expect(bookingEvent(booking, at)).toMatchObject({
    uid: `booking-${booking.id}@mereward.example`,
    sequence: 3,
    summary: 'Fishing: pegs FO7, FO8, Far Ostle',
    description: '24 hours, code 7KDMXP',
    location: 'Far Ostle, Ostlemere Waters',
    status: 'confirmed',
    url: `${at}/tickets/bookings/${booking.id}`,
  });
});

test('a cancelled booking keeps its UID and says so, one without a peg names the water', () => {
  const gone = bookingEvent({ ...booking, status: 'cancelled_by_fishery', version: 4, pegs: [] }, at);
  expect(gone).toMatchObject({ uid: bookingEvent(booking, at).uid, sequence: 4, status: 'cancelled' });
  expect(gone.summary).toBe('Fishing: Far Ostle');
  expect(bookingEvent({ ...booking, pegs: [], lakeName: null }, at).summary).toBe(
    'Fishing: Ostlemere Waters',
  );
});
