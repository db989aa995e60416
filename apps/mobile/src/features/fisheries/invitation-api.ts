import { AccountView } from '@mereward/shared/accounts/contract';
import { InvitationShown } from '@mereward/shared/fisheries/contract';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { sessionStore } from '@/lib/session-store';

/** What a mailed invitation is to. Its token is a secret, so the answer is not kept on the device. */
export const useInvitation = (token: string) =>
  useQuery({
    queryKey: ['fisheries', 'invitation', token],
    queryFn: ({ signal }) => api.get(`/invitations/${encodeURIComponent(token)}`, InvitationShown, signal),
    enabled: token !== '',
    meta: { keep: false },
  });

/** Takes an invitation up; the new role is in force at once, so all that was read without it is out of date. */
export function useAcceptInvitation() {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: async (token: string) => {
      sessionStore.update(await api.post('/invitations/accept', { token }, AccountView));
    },
    onSuccess: () => queries.invalidateQueries({ refetchType: 'none' }),
  });
}
