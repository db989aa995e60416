import { cancellationSteps } from '@mereward/shared/bookings/cancellation-words';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { PriceLines } from '@/features/bookings/price-lines';
import { useClock } from '@/features/bookings/use-clock';

/** Times, price, and what a cancellation would give back: all of it before paying. */
export function BookingTold({ booking }: { booking: BookingView }) {
  const { details, grossPence, paidPence, currency, from, zone } = booking;
  const nowMs = useClock(60_000);
  const steps = cancellationSteps(details.cancellation, {
    start: new Date(from),
    now: new Date(nowMs),
    zone,
  });
  return (
    <View style={{ gap: space.medium }}>
      <Text weight="semibold">{ticketTimes(booking)}</Text>
      <PriceLines
        lines={details.lines}
        grossPence={grossPence}
        currency={currency}
        total={paidPence >= grossPence && grossPence > 0 ? 'Paid' : 'To pay'}
      />
      <Section title="If you cancel" bare>
        {steps.map((words) => (
          <Text key={words}>{words}</Text>
        ))}
        <Text tone="inkSoft">If the fishery has to close: all of it back or a move, as you choose.</Text>
      </Section>
    </View>
  );
}
