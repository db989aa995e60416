import { ChoiceView, type Choose } from '@mereward/shared/bookings/choosing-contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { bookingKeys } from '@/features/bookings/booking-api';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const choiceKey = (token: string) => [...bookingKeys.all, 'choice', token] as const;

/** What a closure leaves to choose, for whoever holds the letter. */
export const useChoice = (token: string) =>
  useQuery({
    queryKey: choiceKey(token),
    queryFn: ({ signal }) => api.get(`/choices/${encodeURIComponent(token)}`, ChoiceView, signal),
    meta: { keep: false }, // its address opens it to anybody
  });

export const useChoose = (token: string) =>
  useMutation({
    mutationFn: (input: Choose) => api.post(`/choices/${encodeURIComponent(token)}`, input, ChoiceView),
    onSuccess: (view) => {
      queryClient.setQueryData(choiceKey(token), view);
      void queryClient.invalidateQueries({ queryKey: bookingKeys.mine });
    },
    onError: () => queryClient.invalidateQueries({ queryKey: choiceKey(token) }),
  });
