import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useCancelFor, useWhatGoesBack } from '@/features/bookings/office-api';
import { money } from '@/lib/format';

type Props = { booking: BookingView; onDone: () => void; onLeave: () => void };

/** Cancels somebody's booking, with what goes back said first. */
export function CancelFor({ booking, onDone, onLeave }: Props) {
  const quote = useWhatGoesBack(booking.id, true);
  const cancel = useCancelFor(booking.id);
  return (
    <Loaded query={quote} waiting="Working out what goes back…">
      {({ refundPence, words }) => (
        <View style={{ gap: space.medium }}>
          <Text>{words}</Text>
          <Text weight="semibold">
            {refundPence > 0
              ? `${money(refundPence, booking.currency)} goes back to ${booking.holder}.`
              : booking.paidPence > 0
                ? 'Nothing goes back by the terms it was sold with.'
                : 'Nothing was paid.'}
          </Text>
          <Text tone="inkSoft">The peg is free again for that time. This can’t be undone.</Text>
          <ProblemNote problem={cancel.error} />
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
            <Button
              label="Cancel the booking"
              kind="danger"
              busy={cancel.isPending}
              onPress={() => cancel.mutate(undefined, { onSuccess: onDone })}
            />
            <Button label="Leave it" onPress={onLeave} />
          </View>
        </View>
      )}
    </Loaded>
  );
}
