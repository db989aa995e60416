import { WaitingList, WaitingView, type JoinWaiting } from '@mereward/shared/bookings/waiting-contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { bookingKeys } from '@/features/bookings/booking-api';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const waitingKey = [...bookingKeys.all, 'waiting'] as const;

/** The lines the reader stands in, for days to come. */
export const useMyWaiting = (signedIn: boolean) =>
  useQuery({
    queryKey: waitingKey,
    queryFn: ({ signal }) => api.get('/waiting/mine', WaitingList, signal),
    enabled: signedIn,
  });

export const useJoinWaiting = (lakeId: string) =>
  useMutation({
    mutationFn: (input: JoinWaiting) => api.post(`/lakes/${lakeId}/waiting`, input, WaitingView),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: waitingKey }),
  });

export const useLeaveWaiting = () =>
  useMutation({
    mutationFn: (waitingId: string) => api.del(`/waiting/${waitingId}`, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: waitingKey }),
  });

export const usePassOffer = () =>
  useMutation({
    mutationFn: (waitingId: string) => api.post(`/waiting/${waitingId}/pass`, undefined, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: bookingKeys.all }),
  });
