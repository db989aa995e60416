import { useSyncExternalStore } from 'react';
import { api, nothing, refreshSession } from '@/lib/api';
import { forgetDrafts } from '@/lib/drafts';
import { forgetEverythingRead } from '@/lib/queries';
import { sessionStore, type Session } from '@/lib/session-store';
import { SignedIn, type AccountView, type Role, type SignIn } from '@mereward/shared/accounts/contract';

// What one person read is not the next one's, however the change came about: here, in another window, by running out.
let reader = sessionStore.get().account?.id;
sessionStore.subscribe(() => {
  const now = sessionStore.get().account?.id;
  if (now === reader) return;
  reader = now;
  void forgetEverythingRead();
});

export type CurrentSession = {
  state: Session['state'];
  account: AccountView | null;
  /** Roles held anywhere. What may be done to one thing is in its own `may`. */
  roles: readonly Role[];
  rolesAt: (fisheryId: string) => readonly Role[];
};

/** Who is at this device. While `state` is `unknown` the account is the last one known here. */
export function useSession(): CurrentSession {
  const { state, account } = useSyncExternalStore(sessionStore.subscribe, sessionStore.get, sessionStore.get);
  const held = account?.roles ?? [];
  return {
    state,
    account,
    roles: [...new Set(held.map(({ role }) => role))],
    rolesAt: (fisheryId) => held.filter((one) => one.fisheryId === fisheryId).map(({ role }) => role),
  };
}

/** At start: whoever was here last is signed in again by the cookie. Without a signal they stay as last known. */
export async function resumeSession(): Promise<void> {
  if (await sessionStore.recall()) await refreshSession().catch(() => false);
}

export async function signIn(input: SignIn): Promise<void> {
  const signedIn = await api.post('/accounts/session', input, SignedIn);
  sessionStore.enter(signedIn, Date.now());
}

/** Signs out here, or on every device. What was read and begun here is forgotten with it. */
export async function signOut(where: 'here' | 'everywhere'): Promise<void> {
  const accountId = sessionStore.get().account?.id;
  await api.del(where === 'here' ? '/accounts/session' : '/accounts/sessions', nothing);
  sessionStore.leave();
  if (accountId !== undefined) await forgetDrafts(accountId);
}
