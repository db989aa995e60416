import type { BookingView } from '@mereward/shared/bookings/contract';
import { useLocalSearchParams } from 'expo-router';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Waiting } from '@/components/waiting';
import { useBooking } from '@/features/bookings/booking-api';
import { BOOKING_LOOKS, placeName } from '@/features/bookings/booking-words';
import { HeldBooking } from '@/features/bookings/held-booking';
import { PayingBooking } from '@/features/bookings/paying-booking';
import { TicketPart } from '@/features/bookings/ticket-part';
import { WhyOver } from '@/features/bookings/why-over';
import { StatusShape } from '@/components/status-shape';
import { useSession } from '@/lib/session';

const BACK = { label: 'My tickets', href: '/tickets/mine' } as const;

/** One booking from hold to ticket, as the server knows it. */
export function BookingScreen() {
  const { bookingId } = useLocalSearchParams<{ bookingId: string }>();
  const { state, account } = useSession();
  if (account === null)
    return (
      <Page title="Your booking">
        {state === 'unknown' ? (
          <Waiting words="Seeing who is here…" />
        ) : (
          <Empty
            title="Sign in to see it"
            action={
              <LinkButton
                label="Sign in"
                href={`/sign-in?next=${encodeURIComponent(`/tickets/bookings/${bookingId}`)}`}
                kind="main"
              />
            }
          >
            A booking is shown to its holder and to the fishery’s staff.
          </Empty>
        )}
      </Page>
    );
  return <OwnBooking bookingId={bookingId} />;
}

function OwnBooking({ bookingId }: { bookingId: string }) {
  const query = useBooking(bookingId);
  const booking = query.data;
  return (
    <Page
      title={booking ? placeName(booking) : 'Your booking'}
      back={BACK}
      {...(booking
        ? { over: booking.fisheryName, end: <StatusShape {...BOOKING_LOOKS[booking.status]} /> }
        : {})}
    >
      <Loaded query={query} waiting="Reading the booking…">
        {(view) => <ByState booking={view} onAsk={() => void query.refetch()} />}
      </Loaded>
    </Page>
  );
}

function ByState({ booking, onAsk }: { booking: BookingView; onAsk: () => void }) {
  switch (booking.status) {
    case 'hold':
      return <HeldBooking key={booking.id} booking={booking} onAsk={onAsk} />;
    case 'pending_payment':
      return <PayingBooking key={booking.id} booking={booking} onAsk={onAsk} />;
    case 'confirmed':
    case 'checked_in':
    case 'completed':
    case 'choosing':
    case 'no_show':
      return <TicketPart booking={booking} />;
    case 'expired':
    case 'cancelled_by_angler':
    case 'cancelled_by_fishery':
      return <WhyOver booking={booking} />;
  }
}
