import { Problem } from '@mereward/shared/problems/problem';
import { problemOf } from '@/lib/answer';
import { askAs } from '@/lib/api';
import { keyOf } from '@/lib/device-key';
import { deviceStore } from '@/lib/device-store';
import { noNetwork } from '@/lib/no-network';
import { oneAtATime } from '@/lib/one-at-a-time';
import { markLeaving, markRefused, markSent, outboxNow, waitingOf } from '@/lib/outbox';
import type { OutboxEntry, OutboxEvent } from '@/lib/outbox-event';
import { nextToSend, outcomeOf, pauseMs, type SendOutcome } from '@/lib/outbox-order';
import { outboxSignal } from '@/lib/outbox-signal';
import { queryClient } from '@/lib/queries';
import { sessionStore } from '@/lib/session-store';

const ANSWER_WITHIN_MS = 30_000;

/** How the newest tries of this page ended, for whoever waits beside the form: the answer, or the refusal. */
const ended = new Map<string, { answer: unknown } | { refusal: Problem }>();
const failedAt = new Map<number, { times: number; nextAtMs: number }>();
let failures = 0;
let timer: ReturnType<typeof setTimeout> | undefined;

type Sent = { outcome: SendOutcome; answer?: unknown; refusal?: Problem };

/** One try at the server. */
async function tryOnce(accountId: string, { method, path, body }: OutboxEvent): Promise<Sent> {
  try {
    const signal = AbortSignal.timeout(ANSWER_WITHIN_MS);
    const response = await askAs(accountId, path, {
      method,
      body: method === 'DELETE' ? undefined : body,
      signal,
    });
    if (response === null) return { outcome: 'sign-in' };
    const json = /\bjson\b/.test(response.headers.get('content-type') ?? '');
    const outcome = outcomeOf({ status: response.status, json, redirected: response.redirected });
    if (outcome === 'done')
      return { outcome, answer: response.status === 204 ? undefined : await response.json() };
    return outcome === 'refused' ? { outcome, refusal: await problemOf(response) } : { outcome };
  } catch (fault) {
    return { outcome: fault instanceof Problem ? 'server-fault' : 'no-answer' }; // a fetch that failed, or took too long
  }
}

async function settle(entry: OutboxEntry, { outcome, answer, refusal }: Sent): Promise<'go-on' | 'stop'> {
  const { seq, id, touches } = entry;
  outboxSignal.heard(outcome !== 'no-answer');
  switch (outcome) {
    case 'done':
      ended.set(id, { answer });
      failedAt.delete(seq);
      await markSent(seq);
      outboxSignal.sent(new Date().toISOString());
      for (const queryKey of touches) void queryClient.invalidateQueries({ queryKey, exact: true });
      return 'go-on';
    case 'refused':
      if (refusal) ended.set(id, { refusal });
      await markRefused(entry, {
        kind: refusal?.kind ?? 'internal',
        title: refusal?.title ?? '',
        detail: refusal?.detail,
        errors: refusal ? [...refusal.errors] : undefined,
      });
      return 'go-on';
    case 'server-fault': {
      const times = (failedAt.get(seq)?.times ?? 0) + 1;
      failedAt.set(seq, { times, nextAtMs: performance.now() + pauseMs(times) });
      return 'go-on';
    }
    case 'sign-in':
    case 'try-later':
    case 'no-answer':
      return 'stop';
  }
}

const pausing = ({ seq }: OutboxEntry): boolean => (failedAt.get(seq)?.nextAtMs ?? 0) > performance.now();

/** Sends what waits, oldest first, until nothing can go. */
async function run(): Promise<void> {
  for (;;) {
    const db = await deviceStore();
    const accountId = sessionStore.get().account?.id;
    const key = db && accountId !== undefined ? await keyOf(accountId) : null;
    if (!db || accountId === undefined || !key) return;
    const next = nextToSend(await waitingOf(db, { accountId, key }), pausing);
    if (next === null) {
      failures = 0;
      return;
    }
    if (noNetwork()) return; // nothing leaves, so it can still be taken back without asking the server
    if (!(await markLeaving(next.seq))) continue;
    if ((await settle(next, await tryOnce(accountId, next))) === 'go-on') continue;
    failures += 1;
    return;
  }
}

function tryLater(): void {
  clearTimeout(timer);
  if (!outboxNow().entries.some(({ state }) => state === 'waiting') && outboxNow().locked === 0) return;
  const least = noNetwork() ? 5 : 1; // the browser says so itself when a network comes
  timer = setTimeout(() => void sendWaiting(), pauseMs(Math.max(least, failures)));
}

let running: Promise<void> = Promise.resolve();

/** Sends what waits; of several windows one at a time. Settles when nothing more can be sent for now. */
export function sendWaiting(): Promise<void> {
  running = running
    .then(() => oneAtATime('mereward.outbox', run))
    .catch(() => undefined)
    .then(tryLater);
  return running;
}

/** How a try of this page ended, told once. */
export function endOf(id: string): { answer: unknown } | { refusal: Problem } | null {
  const end = ended.get(id) ?? null;
  ended.delete(id);
  return end;
}
