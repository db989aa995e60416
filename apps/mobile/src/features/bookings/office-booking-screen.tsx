import { useLocalSearchParams } from 'expo-router';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { BookingSheet } from '@/features/bookings/booking-sheet';
import { useOfficeBooking } from '@/features/bookings/office-api';
import { StaffDeeds } from '@/features/bookings/staff-deeds';

/** One booking in the office, and what may be done with it. */
export function OfficeBookingScreen() {
  const { bookingId, made } = useLocalSearchParams<{ bookingId: string; made?: string }>();
  const booking = useOfficeBooking(bookingId);
  return (
    <Page
      title={booking.data ? booking.data.holder : 'Booking'}
      {...(booking.data ? { over: booking.data.fisheryName } : {})}
      back={{ label: 'Bookings', href: '/office/bookings' }}
    >
      <Loaded query={booking} waiting="Reading the booking…">
        {(value) => (
          <>
            <BookingSheet booking={value} />
            <Section title="What may be done">
              <StaffDeeds booking={value} {...(made === 'yes' ? { first: 'money' as const } : {})} />
            </Section>
          </>
        )}
      </Loaded>
    </Page>
  );
}
