import { useEffect, useRef, useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { lookAtPayment, paymentPage } from '@/features/bookings/booking-api';
import { BookingTold } from '@/features/bookings/booking-told';
import { HoldAgain } from '@/features/bookings/hold-again';
import { HoldClock } from '@/features/bookings/hold-clock';
import { LetGo } from '@/features/bookings/let-go';
import { latestPayment, paymentStage } from '@/features/bookings/payment-words';
import { money } from '@/lib/format';
import { goTo } from '@/lib/go-to';

const ASK_MS = 3000;
const ASK_DECLINED_MS = 10_000; // another card may be tried in another window

type Props = { booking: BookingView; onAsk: () => void };

/**
 * Between the payment page and the ticket. Nothing is called paid before the provider said so to the server; until it
 * does, the server is asked to ask.
 */
export function PayingBooking({ booking, onAsk }: Props) {
  const payment = latestPayment(booking.payments);
  const stage = paymentStage(payment);
  const looking = useLooking(booking.id, stage === 'declined' ? ASK_DECLINED_MS : ASK_MS);
  const [ranOut, setRanOut] = useState(false);
  if (ranOut && stage !== 'under way') return <HoldAgain booking={booking} />;
  return (
    <>
      {booking.holdUntil === null ? null : (
        <HoldClock
          until={booking.holdUntil}
          zone={booking.zone}
          onOver={() => {
            setRanOut(true);
            onAsk();
          }}
        />
      )}
      <Stage stage={stage} fault={payment?.fault ?? ''} />
      <ProblemNote problem={looking} />
      <PayAgain booking={booking} stage={stage} />
      <BookingTold booking={booking} />
      {stage === 'under way' ? null : <LetGo booking={booking} />}
    </>
  );
}

/** Has the server ask the provider every few seconds; gives what the last asking failed with. */
function useLooking(bookingId: string, everyMs: number): Error | null {
  const look = useMutation({ mutationFn: () => lookAtPayment(bookingId) });
  const ask = useRef(look.mutate);
  useEffect(() => {
    ask.current = look.mutate;
  });
  useEffect(() => {
    ask.current();
    const timer = setInterval(() => ask.current(), everyMs);
    return () => clearInterval(timer);
  }, [everyMs, bookingId]);
  return look.error;
}

type StageName = ReturnType<typeof paymentStage>;

function Stage({ stage, fault }: { stage: StageName; fault: string }) {
  switch (stage) {
    case 'declined':
      return (
        <Note kind="danger" title="The card was declined" live>
          <Text>{fault === '' ? 'The card’s bank said no.' : fault}</Text>
          <Text>Nothing was taken. The peg is still held: try again, or use another card.</Text>
        </Note>
      );
    case 'challenge':
      return (
        <Note kind="caution" title="Your bank asks whether it is you" live>
          Answer it on the payment page or in your bank’s own program. The peg is held up to fifteen minutes
          meanwhile.
        </Note>
      );
    case 'under way':
      return <Waiting words="Paid on the card; waiting for the provider’s word…" />;
    case 'not paid':
      return <Waiting words="Asking the card provider whether it is paid…" />;
  }
}

function PayAgain({ booking, stage }: { booking: BookingView; stage: StageName }) {
  const page = useMutation({
    mutationFn: () => paymentPage(booking.id),
    onSuccess: ({ url }) => goTo(url),
  });
  if (stage === 'under way') return null;
  const owed = money(booking.grossPence - booking.paidPence, booking.currency);
  return (
    <View style={{ gap: space.small }}>
      {stage === 'not paid' ? (
        <Text tone="inkSoft">
          If you came back without paying, go to the payment page again. It can’t be paid twice.
        </Text>
      ) : null}
      <ProblemNote problem={page.error} />
      <Button
        label={stage === 'declined' ? `Pay ${owed} again` : `To the payment page, ${owed}`}
        kind="main"
        bank
        busy={page.isPending}
        busyLabel="Opening the page…"
        onPress={() => page.mutate()}
      />
    </View>
  );
}
