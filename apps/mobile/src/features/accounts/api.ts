import {
  AccountView,
  type AskReset,
  type ChangeDetails,
  type ResetPassword,
  type SignUp,
} from '@mereward/shared/accounts/contract';
import { InvitationShown } from '@mereward/shared/fisheries/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing, refreshSession } from '@/lib/api';
import { forgetEverythingRead } from '@/lib/queries';
import { sessionStore } from '@/lib/session-store';

export const signUp = (input: SignUp) => api.post('/accounts', input, nothing);
export const sendVerificationAgain = (email: string) =>
  api.post('/accounts/verify-again', { email }, nothing);
export const verifyEmail = (token: string) => api.post('/accounts/verify', { token }, nothing);
export const askReset = (input: AskReset) => api.post('/accounts/reset-request', input, nothing);
export const resetPassword = (input: ResetPassword) => api.post('/accounts/reset', input, nothing);

export async function changeDetails(input: ChangeDetails): Promise<void> {
  sessionStore.update(await api.patch('/accounts/me', input, AccountView));
}

/** What a mailed invitation is to. Its token is a secret, so the answer is not kept on the device. */
export const useInvitation = (token: string) =>
  useQuery({
    queryKey: ['accounts', 'invitation', token],
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
