import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { useCancelBooking, useCancellationQuote } from '@/features/bookings/booking-api';
import { placeName } from '@/features/bookings/booking-words';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { money } from '@/lib/format';

/** Cancels a ticket, telling first what goes back. Shown only where it may be done. */
export function CancelBooking({ booking }: { booking: BookingView }) {
  const [asking, setAsking] = useState(false);
  if (!booking.may.cancel) return null;
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <Button label="Cancel this ticket…" kind="danger" onPress={() => setAsking(true)} />
      <Sheet open={asking} onClose={() => setAsking(false)} title="Cancel this ticket?">
        {asking ? <Cancelling booking={booking} onDone={() => setAsking(false)} /> : null}
      </Sheet>
    </View>
  );
}

function Cancelling({ booking, onDone }: { booking: BookingView; onDone: () => void }) {
  const quote = useCancellationQuote(booking.id, true);
  const cancel = useCancelBooking(booking.id);
  return (
    <>
      <Text>{`${placeName(booking)}, ${ticketTimes(booking)}.`}</Text>
      <Loaded query={quote} waiting="Reckoning what goes back…">
        {({ refundPence, words }) => (
          <>
            <Text size="lead" weight="semibold">
              {booking.paidPence === 0
                ? 'Nothing was paid.'
                : `${money(refundPence, booking.currency)} of ${money(booking.paidPence, booking.currency)} goes back`}
            </Text>
            <Text>{words}</Text>
            <Text tone="inkSoft">
              {refundPence > 0
                ? 'A card gets it back within some days, as its bank has it. The peg is free for others at once.'
                : 'The peg is free for others at once. This can’t be undone.'}
            </Text>
            <ProblemNote problem={cancel.error} />
            <Button label="Leave it" onPress={onDone} />
            <Button
              label={
                refundPence > 0 ? `Cancel, ${money(refundPence, booking.currency)} back` : 'Cancel the ticket'
              }
              kind="danger"
              busy={cancel.isPending}
              busyLabel="Cancelling…"
              onPress={() => cancel.mutate(undefined, { onSuccess: onDone })}
            />
          </>
        )}
      </Loaded>
    </>
  );
}
