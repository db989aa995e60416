import { useRef } from 'react';
import type { BookedTicket, BookingView, HoldPegs } from '@mereward/shared/bookings/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { bookingKeys, holdPegs } from '@/features/bookings/booking-api';
import type { FindChoice, PartyMember } from '@/features/bookings/find-choice';
import { newId } from '@/lib/new-id';
import { queryClient } from '@/lib/queries';
import { useSession } from '@/lib/session';

type Member = PartyMember & Partial<Pick<BookedTicket, 'name' | 'bornOn'>>;
export type Holding = { lakeId: string; party: readonly Member[] };

/** Takes pegs for ten minutes and goes on to the booking. Pressed again after a lost answer it asks for the same. */
export function useHold(
  choice: Pick<FindChoice, 'fisheryId' | 'day' | 'start'>,
  before?: (held: BookingView) => Promise<void>,
) {
  const router = useRouter();
  const { account } = useSession();
  const asked = useRef({ text: '', id: '' });
  return useMutation({
    mutationFn: async ({ lakeId, party }: Holding) => {
      const wish: Omit<HoldPegs, 'id'> = {
        lakeId,
        day: choice.day ?? '',
        start: choice.start,
        tickets: party.map((member, i) => ({
          name: i === 0 && member.kind === 'holder' ? (account?.name ?? '') : '',
          bornOn: null,
          ...member,
        })),
      };
      const text = JSON.stringify(wish);
      if (asked.current.text !== text) asked.current = { text, id: newId() };
      const held = await holdPegs({ id: asked.current.id, ...wish });
      await before?.(held);
      return held;
    },
    onSuccess: ({ id }) => router.push(`/tickets/bookings/${id}`),
    onError: (fault) => {
      if (!(fault instanceof Problem)) return; // no answer: the same may have been held, and is asked for again
      asked.current = { text: '', id: '' };
      void queryClient.invalidateQueries({ queryKey: bookingKeys.free(choice.fisheryId ?? '') });
    },
  });
}
