import { InvitationShown } from '@mereward/shared/fisheries/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing, refreshSession } from '@/lib/api';
import { forgetEverythingRead } from '@/lib/queries';

/** What a mailed invitation is to. Its token is a secret, so the answer is not kept on the device. */
export const useInvitation = (token: string) =>
  useQuery({
    queryKey: ['fisheries', 'invitation', token],
    queryFn: ({ signal }) => api.get(`/invitations/${encodeURIComponent(token)}`, InvitationShown, signal),
    enabled: token !== '',
    meta: { keep: false },
  });

/** Takes an invitation up; the new role is in force at once, so what was read without it is read anew. */
export const useAcceptInvitation = () =>
  useMutation({
    mutationFn: async (token: string) => {
      await api.post('/invitations/accept', { token }, nothing);
      await refreshSession();
      await forgetEverythingRead();
    },
  });
