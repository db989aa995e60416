import { DeviceKeyView } from '@mereward/shared/accounts/contract';
import { api } from '@/lib/api';
import { deviceStore } from '@/lib/device-store';
import { canSeal, sealingKey } from '@/lib/sealing';
import { sessionStore } from '@/lib/session-store';

let held: { accountId: string; key: CryptoKey } | null = null;

const isHere = (accountId: string): boolean => sessionStore.get().account?.id === accountId;

/** The key of the account at this device, where it is known here; no script can read it out of the browser. */
export async function heldKey(accountId: string): Promise<CryptoKey | null> {
  if (held?.accountId === accountId) return held.key;
  if (!canSeal()) return null;
  const key = await (await deviceStore())?.get('keys', accountId).catch(() => undefined);
  if (key === undefined || !isHere(accountId)) return null;
  held = { accountId, key };
  return key;
}

/** The same, asked of the server when it is not known here yet. Null without a signal. */
export async function keyOf(accountId: string): Promise<CryptoKey | null> {
  const known = await heldKey(accountId);
  if (known !== null || !canSeal()) return known;
  try {
    const { key: text } = await api.post('/accounts/me/device-key', {}, DeviceKeyView);
    const key = await sealingKey(text);
    if (!isHere(accountId)) return null; // somebody else sat down meanwhile
    held = { accountId, key };
    await (await deviceStore())?.put('keys', key, accountId);
    return key;
  } catch {
    return null;
  }
}

/** At sign-out, and when another comes: what lies sealed here stays sealed until its owner signs in again. */
export async function dropOtherKeys(accountId: string | null): Promise<void> {
  if (held?.accountId !== accountId) held = null;
  const db = await deviceStore();
  if (!db) return;
  const others = (await db.getAllKeys('keys')).filter((id) => id !== accountId);
  await Promise.all(others.map((id) => db.delete('keys', id)));
}
