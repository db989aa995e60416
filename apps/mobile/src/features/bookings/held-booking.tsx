import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { BookingTold } from '@/features/bookings/booking-told';
import { askedOf } from '@/features/bookings/details-fields';
import { BookingDetailsForm } from '@/features/bookings/details-form';
import { HoldAgain } from '@/features/bookings/hold-again';
import { HoldClock } from '@/features/bookings/hold-clock';
import { LetGo } from '@/features/bookings/let-go';
import { useLettingTerms } from '@/features/bookings/terms-api';
import { useFishery } from '@/features/fisheries/office-api';
import { RulesToRead } from '@/features/rules/rules-to-read';
import { useTicketTypes } from '@/features/tickets/office-api';

type Props = { booking: BookingView; onAsk: () => void };

/** A peg kept for ten minutes: what it costs, what is still asked for, and the way to pay. */
export function HeldBooking({ booking, onAsk }: Props) {
  const until = booking.holdUntil;
  const [ranOut, setRanOut] = useState(() => until !== null && Date.parse(until) <= Date.now());
  if (ranOut || until === null) return <HoldAgain booking={booking} />;
  return (
    <>
      <HoldClock
        until={until}
        zone={booking.zone}
        onOver={() => {
          setRanOut(true);
          onAsk();
        }}
      />
      <BookingTold booking={booking} />
      <Section title="Rules">
        <RulesToRead bookingId={booking.id} zone={booking.zone} />
      </Section>
      <Section title="Who comes">
        <Asking booking={booking} />
      </Section>
      <LetGo booking={booking} />
    </>
  );
}

function Asking({ booking }: { booking: BookingView }) {
  const fishery = useFishery(booking.fisheryId);
  const kinds = useTicketTypes(booking.fisheryId);
  const terms = useLettingTerms(booking.fisheryId);
  return (
    <Loaded query={fishery} waiting="Reading what is asked…">
      {({ details: { jurisdiction } }) => (
        <Loaded query={kinds} waiting="Reading what is asked…">
          {({ ticketTypes }) => (
            <Loaded query={terms} waiting="Reading how it is paid…">
              {(how) => (
                <BookingDetailsForm asked={askedOf(booking, jurisdiction, ticketTypes)} terms={how} />
              )}
            </Loaded>
          )}
        </Loaded>
      )}
    </Loaded>
  );
}
