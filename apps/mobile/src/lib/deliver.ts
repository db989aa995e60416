import { Problem } from '@mereward/shared/problems/problem';
import { api, nothing } from '@/lib/api';
import { askToStay } from '@/lib/ask-to-stay';
import { NowhereKept } from '@/lib/nowhere-kept';
import { CannotWait, keepForSending, outboxNow, takeAway } from '@/lib/outbox';
import type { OutboxEvent } from '@/lib/outbox-event';
import { endOf, sendWaiting } from '@/lib/outbox-sender';

const PATIENCE_MS = 5_000;

/** Sent, with the server's answer where this page heard it; or kept here until there is a signal. */
export type Delivered = { state: 'sent'; answer: unknown } | { state: 'waiting' };

/**
 * Keeps an event on this device and sends it when its turn comes. Waits a little for the answer: with a signal it is as
 * if it had been sent straight away, and a refusal is thrown for the form to show. `instead`: the number in the queue
 * of a refused one whose place it takes.
 */
export async function deliver(event: OutboxEvent, instead: number | null = null): Promise<Delivered> {
  try {
    await keepForSending(event, instead);
  } catch (fault) {
    return { state: 'sent', answer: await sentAtOnce(event, fault instanceof CannotWait) };
  }
  askToStay();
  await Promise.race([sendWaiting(), new Promise((later) => setTimeout(later, PATIENCE_MS))]);
  const end = endOf(event.id);
  if (end === null) return { state: 'waiting' };
  if ('answer' in end) return { state: 'sent', answer: end.answer };
  const place = outboxNow().entries.find(({ id }) => id === event.id);
  if (place && instead === null) await takeAway(place.seq); // it is still in the form, which shows why
  throw end.refusal;
}

/** Where nothing can wait it is sent as it always was. */
async function sentAtOnce({ method, path, body }: OutboxEvent, asEver: boolean): Promise<unknown> {
  try {
    return await (method === 'DELETE' ? api.del(path, nothing) : api.post(path, body, nothing));
  } catch (fault) {
    if (fault instanceof Problem || asEver) throw fault;
    throw new NowhereKept();
  }
}
