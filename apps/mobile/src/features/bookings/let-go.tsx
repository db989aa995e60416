import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { ProblemNote } from '@/components/problem-note';
import { letGoOfHold } from '@/features/bookings/booking-api';

/** Gives the peg back to others before the hold runs out. */
export function LetGo({ booking }: { booking: BookingView }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const letGo = useMutation({
    mutationFn: () => letGoOfHold(booking.id),
    onSuccess: () => router.replace('/tickets'),
  });
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <Button label="Let it go" kind="quiet" onPress={() => setAsking(true)} />
      <ProblemNote problem={letGo.error} />
      <Confirm
        open={asking}
        title="Let the peg go?"
        words="It is free for others at once. Nothing was paid, so nothing is to be given back."
        act="Let it go"
        danger
        busy={letGo.isPending}
        onClose={() => setAsking(false)}
        onAct={() => letGo.mutate(undefined, { onSettled: () => setAsking(false) })}
      />
    </View>
  );
}
