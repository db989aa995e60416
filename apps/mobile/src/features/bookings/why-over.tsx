import type { BookingView } from '@mereward/shared/bookings/contract';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { HoldAgain } from '@/features/bookings/hold-again';
import { ReceiptsPart } from '@/features/bookings/receipts-part';
import { money } from '@/lib/format';

/** A booking that holds no peg any more: what became of it and of the money. */
export function WhyOver({ booking }: { booking: BookingView }) {
  const { status, paidPence, refundedPence, currency, refunds } = booking;
  const onTheWay = refunds
    .filter((refund) => refund.status === 'queued' || refund.status === 'proposed')
    .reduce((sum, { amountPence }) => sum + amountPence, 0);
  return (
    <>
      {status === 'expired' ? (
        <HoldAgain booking={booking} />
      ) : (
        <Note
          kind="plain"
          title={
            status === 'cancelled_by_angler'
              ? 'You cancelled this ticket'
              : 'The fishery cancelled this ticket'
          }
        >
          {ticketTimes(booking)}
        </Note>
      )}
      {paidPence > 0 ? (
        <Text>
          {`${money(paidPence, currency)} was paid, ${money(refundedPence, currency)} has been given back${
            onTheWay > 0 ? `, ${money(onTheWay, currency)} is on its way` : ''
          }.`}
        </Text>
      ) : null}
      <ReceiptsPart booking={booking} />
      {status === 'expired' ? null : <LinkButton label="Find another peg" href="/tickets" kind="main" />}
    </>
  );
}
