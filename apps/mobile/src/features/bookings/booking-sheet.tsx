import type { BookingView } from '@mereward/shared/bookings/contract';
import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import { View } from 'react-native';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Note } from '@/components/note';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { pegsOf, STAFF_LOOKS } from '@/features/bookings/office-booking-words';
import { paidWords } from '@/features/bookings/paid-words';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { METHOD_WORDS } from '@/features/payments/method-words';
import { ReceiptFacts } from '@/features/payments/receipt-facts';
import { REFUND_LOOKS } from '@/features/payments/refund-words';
import { money } from '@/lib/format';
import { clockTime, dayAndTime } from '@/lib/format-time';

/** A booking as staff read it: who, which peg, when, is it good, is it paid. */
export function BookingSheet({ booking }: { booking: BookingView }) {
  const { details, zone, status, notYet, holdUntil } = booking;
  const juniors = details.tickets.filter(({ kind }) => kind === 'junior').length;
  return (
    <View style={{ gap: space.medium }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'center' }}>
        <Text size="lead" weight="semibold">
          {bookingCodeWords(booking.code)}
        </Text>
        <StatusShape {...STAFF_LOOKS[status]} />
      </View>
      {notYet.length > 0 ? (
        <Note kind="caution" title="The ticket is not good yet">
          {notYet.map((why) => (
            <Text key={why}>{why}</Text>
          ))}
        </Note>
      ) : null}
      <Facts
        facts={[
          { term: 'Holder', fact: booking.holder },
          { term: 'Ticket', fact: details.ticketName },
          { term: 'Pegs', fact: [pegsOf(booking), booking.lakeName].filter(Boolean).join(', ') },
          { term: 'When', fact: ticketTimes(booking) },
          {
            term: 'Held until',
            fact: holdUntil && status === 'hold' ? clockTime(holdUntil, zone) : null,
          },
          {
            term: 'People and rods',
            fact: `${String(booking.people)} and ${String(booking.rods)}${juniors > 0 ? `, ${String(juniors)} ${juniors === 1 ? 'junior' : 'juniors'}` : ''}`,
          },
          {
            term: 'Others',
            fact: details.tickets
              .map(({ name }) => name)
              .filter((name) => name !== '' && name !== booking.holder)
              .join(', '),
          },
          {
            term: 'Guardian',
            fact: details.guardian ? `${details.guardian.name}, ${details.guardian.phone}` : null,
          },
          { term: 'Vehicle', fact: details.vehicle },
          { term: 'In an emergency', fact: details.emergencyContact },
          { term: 'Note', fact: details.note },
          { term: 'Money', fact: paidWords(booking) },
        ]}
      />
      <MoneyParts booking={booking} />
    </View>
  );
}

function MoneyParts({ booking: { payments, refunds, receipts, zone } }: { booking: BookingView }) {
  return (
    <View>
      {payments.length > 0 || refunds.length > 0 ? (
        <Disclosure title="Payments and refunds">
          <Facts
            facts={[
              ...payments.map((payment) => ({
                term: `${METHOD_WORDS[payment.method]}, ${dayAndTime(payment.takenAt ?? payment.madeAt, zone)}`,
                fact: `${money(payment.amountPence, payment.currency)} ${payment.takenAt ? 'taken' : payment.fault || 'not taken'}`,
              })),
              ...refunds.map((refund) => ({
                term: `Back, ${dayAndTime(refund.doneAt ?? refund.askedAt, zone)}`,
                fact: `${money(refund.amountPence, refund.currency)} ${REFUND_LOOKS[refund.status].word}: ${refund.reason}`,
              })),
            ]}
          />
        </Disclosure>
      ) : null}
      {receipts.map((receipt) => (
        <Disclosure
          key={receipt.id}
          title={`${receipt.kind === 'receipt' ? 'Receipt' : 'Credit note'} ${receipt.number}`}
        >
          <ReceiptFacts receipt={receipt} />
        </Disclosure>
      ))}
    </View>
  );
}
