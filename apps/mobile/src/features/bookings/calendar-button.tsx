import type { BookingView } from '@mereward/shared/bookings/contract';
import { calendarText, calendarUid } from '@mereward/shared/writing/calendar';
import { Button } from '@/components/button';
import { placeName } from '@/features/bookings/booking-words';
import { pageOrigin } from '@/lib/link-part';
import { saveText } from '@/lib/save-file';

/** The ticket's times as a file for a calendar program. Made here, so it needs no signal. */
export function CalendarButton({ booking }: { booking: BookingView }) {
  const save = (): void =>
    void saveText(`ticket-${booking.code}.ics`, ticketCalendar(booking), 'text/calendar');
  return <Button label="Into my calendar" onPress={save} />;
}

function ticketCalendar(booking: BookingView): string {
  const origin = pageOrigin() ?? '';
  const host = origin.replace(/^https?:\/\//, '') || 'mereward';
  return calendarText({
    name: booking.fisheryName,
    method: 'PUBLISH',
    zone: booking.zone,
    events: [
      {
        uid: calendarUid('booking', booking.id, host),
        sequence: booking.version,
        stampedAt: new Date(),
        from: new Date(booking.from),
        until: new Date(booking.until),
        summary: `Fishing: ${placeName(booking)}`,
        description: `${booking.details.ticketName}, code ${booking.code}`,
        location: [placeName(booking), booking.fisheryName].join(', '),
        status: 'confirmed',
        url: origin === '' ? '' : `${origin}/tickets/bookings/${booking.id}`,
      },
    ],
  });
}
