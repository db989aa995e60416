import { useSyncExternalStore } from 'react';
import { heldKey } from '@/lib/device-key';
import type { DeviceDb, OutboxRow } from '@/lib/device-rows';
import { deviceStore } from '@/lib/device-store';
import { OutboxEvent, Refusal, type OutboxEntry } from '@/lib/outbox-event';
import { seal, unseal } from '@/lib/sealing';
import { sessionStore } from '@/lib/session-store';
import { tabTalk } from '@/lib/tab-talk';

export type OutboxSnapshot = {
  /** What this person has made here, oldest first; `sent` ones until what they changed is read again. */
  entries: readonly OutboxEntry[];
  /** Things of other people that wait sealed on this device. */
  others: number;
  /** False until the device has been looked at once. */
  looked: boolean;
  /** This person's things that can't be opened before they have been online here once. */
  locked: number;
};

let snapshot: OutboxSnapshot = { entries: [], others: 0, locked: 0, looked: false };
const readers = new Set<() => void>();
const opened = new Map<number, { id: string; event: OutboxEvent }>(); // an entry's content never changes: opened once

const subscribe = (reader: () => void): (() => void) => {
  readers.add(reader);
  return () => readers.delete(reader);
};
const current = (): OutboxSnapshot => snapshot;

/** The queue as this person may see it. */
export const useOutbox = (): OutboxSnapshot => useSyncExternalStore(subscribe, current, current);
export const outboxNow = current;

const about = ({ accountId, id }: Pick<OutboxRow, 'accountId' | 'id'>, part: 'event' | 'refusal'): string =>
  `${accountId} ${id} ${part}`;

type Place = OutboxRow & { seq: number };
const placed = (rows: OutboxRow[]): Place[] =>
  rows.flatMap((row) => (row.seq ? [{ ...row, seq: row.seq }] : []));

async function entryOf(key: CryptoKey, row: Place): Promise<OutboxEntry | null> {
  const { seq, id, state, attempts } = row;
  const known = opened.get(seq);
  const event =
    known?.id === id
      ? known.event
      : OutboxEvent.safeParse(await unseal(key, row.sealed, about(row, 'event'))).data;
  if (event === undefined) return null;
  opened.set(seq, { id, event });
  const said = row.refusal && Refusal.safeParse(await unseal(key, row.refusal, about(row, 'refusal'))).data;
  return { ...event, seq, state, attempts, refusal: said ?? null };
}

async function looked(): Promise<OutboxSnapshot> {
  const db = await deviceStore();
  const accountId = sessionStore.get().account?.id ?? null;
  const rows = db ? placed(await db.getAll('outbox')) : [];
  const own = rows.filter((row) => row.accountId === accountId);
  const key = accountId === null ? null : await heldKey(accountId);
  const entries = key
    ? (await Promise.all(own.map((row) => entryOf(key, row)))).filter((e) => e !== null)
    : [];
  if ((sessionStore.get().account?.id ?? null) !== accountId) return looked(); // somebody came or went meanwhile
  return {
    entries,
    others: rows.filter((row) => row.accountId !== accountId && row.state !== 'sent').length,
    locked: own.length - entries.length,
    looked: true,
  };
}

let looking: Promise<unknown> = Promise.resolve();

/** Reads the queue anew, here and, unless they asked, in the other tabs. */
export function lookAgain(tell = true): Promise<OutboxSnapshot> {
  if (tell) tabTalk.say();
  const next = looking.then(async () => {
    snapshot = await looked().catch(() => ({ ...snapshot, looked: true })); // the database went away: as last seen
    readers.forEach((read) => read());
    return snapshot;
  });
  looking = next.catch(() => undefined);
  return next;
}

/** What is known here is another's from now on: nothing of it stays in memory, and nothing that was sent on the device. */
export async function forgetOpened(): Promise<void> {
  opened.clear();
  snapshot = { ...snapshot, entries: [] };
  readers.forEach((read) => read());
  const accountId = sessionStore.get().account?.id;
  await changeRows((row) => (row.state === 'sent' && row.accountId !== accountId ? null : row));
  await lookAgain(false);
}

/** This device can't keep things to be sent later: no database, or no key yet. */
export class CannotWait extends Error {
  override readonly name = 'CannotWait';
}

/**
 * Keeps an event for sending: sealed, in the order of the calls. `instead` gives it the place of a refused one.
 * Throws `CannotWait`, or the browser's own fault when there is no room.
 */
export async function keepForSending(event: OutboxEvent, instead: number | null): Promise<void> {
  const db = await deviceStore();
  const accountId = sessionStore.get().account?.id;
  const key = accountId === undefined ? null : await heldKey(accountId);
  if (!db || !key || accountId === undefined) throw new CannotWait();
  const row: OutboxRow = {
    id: event.id,
    accountId,
    state: 'waiting',
    attempts: 0,
    refusal: null,
    sealed: await seal(key, event, about({ accountId, id: event.id }, 'event')),
  };
  const work = db.transaction('outbox', 'readwrite', { durability: 'strict' });
  const before = instead === null ? undefined : await work.store.get(instead);
  const same = await work.store.index('id').get(event.id);
  if (same && same.seq !== before?.seq)
    await work.done; // pressed twice
  else {
    await work.store.put(before?.state === 'refused' && before.seq ? { ...row, seq: before.seq } : row);
    await work.done;
  }
  await lookAgain();
}

/**
 * Puts changed things at the end of the queue in place of what they were, in their order and all at once. What has left
 * meanwhile stays as it is.
 */
export async function moveToEnd(
  moves: readonly { entry: OutboxEntry; changed: OutboxEvent }[],
): Promise<void> {
  const db = await deviceStore();
  const accountId = sessionStore.get().account?.id;
  const key = accountId === undefined ? null : await heldKey(accountId);
  if (!db || !key || accountId === undefined) throw new CannotWait();
  const rows = await Promise.all(
    moves.map(async ({ entry, changed }) => ({
      seq: entry.seq,
      sealed: await seal(key, changed, about({ accountId, id: entry.id }, 'event')),
    })),
  );
  const work = db.transaction('outbox', 'readwrite', { durability: 'strict' });
  for (const { seq, sealed } of rows) {
    const before = await work.store.get(seq);
    if (before?.accountId !== accountId) continue;
    if (before.state === 'sent' || (before.state === 'waiting' && before.attempts > 0)) continue;
    await work.store.delete(seq);
    await work.store.put({
      id: before.id,
      accountId,
      state: 'waiting',
      attempts: 0,
      refusal: null,
      sealed,
    });
  }
  await work.done;
  await lookAgain();
}

/** Changes rows in one transaction; null takes a row away. */
async function changeRows(change: (row: Place) => OutboxRow | null): Promise<void> {
  const db = await deviceStore();
  if (!db) return;
  const work = db.transaction('outbox', 'readwrite', { durability: 'strict' });
  for (const row of placed(await work.store.getAll())) {
    const next = change(row);
    if (next === null) await work.store.delete(row.seq);
    else if (next !== row) await work.store.put(next);
  }
  await work.done;
}

/** Changes one row by its number; answers whether it was there to be changed. */
async function changeRow(seq: number, change: (row: Place) => OutboxRow | null): Promise<boolean> {
  let there = false;
  await changeRows((row) => {
    if (row.seq !== seq) return row;
    const next = change(row);
    there = next !== row;
    return next;
  });
  return there;
}

/** Before it is sent: from now on the server may have it. False when it is no longer there to be sent. */
export const markLeaving = (seq: number): Promise<boolean> =>
  changeRow(seq, (row) => (row.state === 'waiting' ? { ...row, attempts: row.attempts + 1 } : row));

export async function markSent(seq: number): Promise<void> {
  await changeRow(seq, (row) => ({ ...row, state: 'sent' }));
  await lookAgain();
}

export async function markRefused({ seq, id }: OutboxEntry, refusal: Refusal): Promise<void> {
  const accountId = sessionStore.get().account?.id ?? '';
  const key = await heldKey(accountId);
  const sealed = key ? await seal(key, refusal, about({ accountId, id }, 'refusal')) : null;
  await changeRow(seq, (row) => ({ ...row, state: 'refused', refusal: sealed }));
  await lookAgain();
}

/** A refused one is tried once more as it is. */
export async function waitAgain(seq: number): Promise<void> {
  await changeRow(seq, (row) =>
    row.state === 'refused' ? { ...row, state: 'waiting', refusal: null } : row,
  );
  await lookAgain();
}

/** Takes something out of the queue for good. */
export async function takeAway(seq: number): Promise<void> {
  await changeRow(seq, () => null);
  await lookAgain();
}

/** Takes back what has certainly not left yet. False when it may be on the server, where it must be undone instead. */
export async function withdraw(id: string): Promise<boolean> {
  let there = false;
  await changeRows((row) => {
    if (row.id !== id || row.state === 'sent' || (row.state === 'waiting' && row.attempts > 0)) return row;
    there = true;
    return null;
  });
  await lookAgain();
  return there;
}

/** What was sent and has been read again since need not be shown from here any more. */
export async function dropSent(isRead: (entry: OutboxEntry) => boolean): Promise<void> {
  const read = snapshot.entries.filter((entry) => entry.state === 'sent' && isRead(entry));
  if (read.length === 0) return;
  const seqs = new Set(read.map(({ seq }) => seq));
  await changeRows((row) => (seqs.has(row.seq) && row.state === 'sent' ? null : row));
  await lookAgain(false);
}

/** The rows of one person as they stand, for the sender: two tabs may have changed them since this one looked. */
export async function waitingOf(db: DeviceDb, { accountId, key }: { accountId: string; key: CryptoKey }) {
  const own = placed(await db.getAll('outbox')).filter((row) => row.accountId === accountId);
  return (await Promise.all(own.map((row) => entryOf(key, row)))).filter((entry) => entry !== null);
}
