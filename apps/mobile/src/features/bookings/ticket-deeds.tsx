import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { LinkButton } from '@/components/link-button';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useBookingDeed } from '@/features/bookings/booking-api';
import { clockTime } from '@/lib/format-time';

/** What a holder does on the day: arrive, choose a peg, move, finish early. */
export function TicketDeeds({ booking }: { booking: BookingView }) {
  const { may, id } = booking;
  const arrive = useBookingDeed(id, 'check-in');
  const finish = useBookingDeed(id, 'finish');
  const [asking, setAsking] = useState(false);
  if (!may.checkIn && !may.claimPeg && !may.move && !may.finish) return null;
  return (
    <View style={{ gap: space.small }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {may.checkIn ? (
          <Button
            label="I am here"
            kind="main"
            bank
            busy={arrive.isPending}
            onPress={() => arrive.mutate()}
          />
        ) : null}
        {may.claimPeg ? (
          <LinkButton
            label="Choose my peg"
            href={`/tickets/bookings/${id}/move?claim=yes`}
            kind="main"
            bank
          />
        ) : null}
        {may.move ? <LinkButton label="Move it" href={`/tickets/bookings/${id}/move`} bank /> : null}
        {may.finish ? <Button label="Finish early" bank onPress={() => setAsking(true)} /> : null}
      </View>
      {may.checkIn ? (
        <Text size="small" tone="inkSoft">
          Say so when you stand at your peg: the bailiff sees it.
        </Text>
      ) : null}
      <ProblemNote problem={arrive.error ?? finish.error} />
      <Confirm
        open={asking}
        title="Finish now?"
        words={`The peg is free for others at once; your ticket would run until ${clockTime(booking.until, booking.zone)}. Nothing is given back for the rest.`}
        act="Finish now"
        busy={finish.isPending}
        onClose={() => setAsking(false)}
        onAct={() => finish.mutate(undefined, { onSettled: () => setAsking(false) })}
      />
    </View>
  );
}
