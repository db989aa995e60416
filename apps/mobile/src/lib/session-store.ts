import { AccountView, type SignedIn } from '@mereward/shared/accounts/contract';
import { storage } from '@/lib/storage';

export type Session =
  | { state: 'unknown'; account: AccountView | null } // not asked yet; the account is the last one known here
  | { state: 'stranger'; account: null }
  | { state: 'signed-in'; account: AccountView };

type Access = { token: string; endsAtMs: number };

const ACCOUNT_KEY = 'mereward.account';

function remembered(text: string | null): AccountView | null {
  if (text === null) return null;
  try {
    return AccountView.safeParse(JSON.parse(text)).data ?? null;
  } catch {
    return null;
  }
}

let access: Access | null = null; // in memory only: a page that is gone has no key left behind
let session: Session = { state: 'unknown', account: remembered(storage.peek(ACCOUNT_KEY)) };
const readers = new Set<() => void>();

function become(next: Session): void {
  session = next;
  readers.forEach((tell) => tell());
}

/** Who is at this device, and the short-lived access token. The refresh token is a cookie no script can read. */
export const sessionStore = {
  get: (): Session => session,
  subscribe: (reader: () => void): (() => void) => {
    readers.add(reader);
    return () => readers.delete(reader);
  },
  token: (nowMs: number): string | null => (access && access.endsAtMs > nowMs ? access.token : null),
  forgetToken: (): void => {
    access = null;
  },
  enter: (signedIn: SignedIn, nowMs: number): void => {
    access = { token: signedIn.accessToken, endsAtMs: nowMs + (signedIn.expiresInS - 20) * 1000 };
    void storage.set(ACCOUNT_KEY, JSON.stringify(signedIn.account));
    become({ state: 'signed-in', account: signedIn.account });
  },
  update: (account: AccountView): void => {
    void storage.set(ACCOUNT_KEY, JSON.stringify(account));
    become({ state: 'signed-in', account });
  },
  leave: (): void => {
    access = null;
    void storage.remove(ACCOUNT_KEY);
    become({ state: 'stranger', account: null });
  },
  /** Reads who was here last. True when somebody was, and the cookie is worth trying. */
  recall: async (): Promise<boolean> => {
    const account = remembered(await storage.get(ACCOUNT_KEY));
    if (session.state !== 'unknown') return false;
    become(account ? { state: 'unknown', account } : { state: 'stranger', account: null });
    return account !== null;
  },
};

// Signed out in one window is signed out in all: nobody else at this device should read on in another.
storage.watch(ACCOUNT_KEY, (text) => {
  const other = remembered(text);
  if (other?.id === session.account?.id) return;
  access = null;
  become(other ? { state: 'unknown', account: other } : { state: 'stranger', account: null });
});
