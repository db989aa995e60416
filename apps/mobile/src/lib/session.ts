import { useSyncExternalStore } from 'react';
import { api, nothing, refreshSession } from '@/lib/api';
import { forgetDrafts } from '@/lib/drafts';
import { onReturn } from '@/lib/on-return';
import { forgetEverythingRead } from '@/lib/queries';
import { sessionStore, type Session } from '@/lib/session-store';
import { storage } from '@/lib/storage';
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

/** Kept while somebody has signed out here without a signal, and the server has still to be told. */
const OWED_KEY = 'mereward.sign-out-owed';

/** Ends on the server what was ended here without a signal: until then its cookie, which no script can take away, is good. */
async function payOwedSignOut(): Promise<void> {
  if ((await storage.get(OWED_KEY)) === null || sessionStore.get().state !== 'stranger') return;
  await api.del('/accounts/session', nothing);
  await storage.remove(OWED_KEY);
}

/** At start: whoever was here last is signed in again by the cookie. Without a signal they stay as last known. */
export async function resumeSession(): Promise<void> {
  const payLater = (): void => void payOwedSignOut().catch(() => undefined);
  onReturn(payLater);
  if (await sessionStore.recall()) await refreshSession().catch(() => false);
  else payLater();
}

export async function signIn(input: SignIn): Promise<void> {
  const signedIn = await api.post('/accounts/session', input, SignedIn);
  await storage.remove(OWED_KEY); // another cookie stands in its place
  sessionStore.enter(signedIn, Date.now());
}

/**
 * Signs out here, or on every device. What was read and begun here is forgotten with it; what waits to be sent stays
 * sealed. Here it works without a signal too: a phone may be handed on at the water.
 */
export async function signOut(where: 'here' | 'everywhere'): Promise<void> {
  const accountId = sessionStore.get().account?.id;
  try {
    await api.del(where === 'here' ? '/accounts/session' : '/accounts/sessions', nothing);
  } catch (fault) {
    if (where === 'everywhere' || !(fault instanceof TypeError)) throw fault;
    await storage.set(OWED_KEY, 'yes');
  }
  sessionStore.leave();
  if (accountId !== undefined) await forgetDrafts(accountId);
}
