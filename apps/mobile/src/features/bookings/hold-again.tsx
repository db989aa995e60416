import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { choiceOf, findAddress } from '@/features/bookings/find-choice';
import { carryDetails } from '@/features/bookings/details-draft';
import { useHold } from '@/features/bookings/use-hold';

/** A hold that ran out: nothing typed is lost, and the same may be held again while nobody else has it. */
export function HoldAgain({ booking }: { booking: BookingView }) {
  const { details, lakeId, fisheryId, paidPence } = booking;
  const first = details.tickets[0];
  const choice = {
    ...choiceOf({}),
    fisheryId,
    day: details.day,
    kindId: first?.ticketTypeId ?? null,
    start: details.start,
    rods: first && first.rods > 0 ? first.rods : null,
    pegId: first?.pegId ?? null,
  };
  const hold = useHold(choice, (held) => carryDetails(booking, held));
  return (
    <View style={{ gap: space.medium }}>
      <Note kind="caution" title="The hold ran out" live>
        <Text>
          {paidPence > 0
            ? 'A payment came after that, so all of it goes back to the card by itself.'
            : 'Nothing was paid. What you typed is kept on this phone.'}
        </Text>
        <Text>The peg is free for anybody until it is held again.</Text>
      </Note>
      <ProblemNote problem={hold.error} />
      {lakeId === null ? null : (
        <Button
          label="Hold it again"
          kind="main"
          bank
          busy={hold.isPending}
          busyLabel="Holding…"
          onPress={() => hold.mutate({ lakeId, party: details.tickets })}
        />
      )}
      <LinkButton label="See what is free" href={findAddress(choice) as `/${string}`} />
    </View>
  );
}
