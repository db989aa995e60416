import {
  AccountView,
  type AskReset,
  type ChangeDetails,
  type ResetPassword,
  type SignUp,
} from '@mereward/shared/accounts/contract';
import { api, nothing } from '@/lib/api';
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
