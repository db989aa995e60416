import { createHmac } from 'node:crypto';
import type { Kept, Message } from './kept';

/** What may be made to go wrong, for tests and for looking at what the program says then. */
export type Faults = {
  slowMs: number; // before every answer
  failing: number; // so many next requests are answered 500, before anything is done
  failingAfter: number; // so many next requests are done and answered 500 all the same
  loseMessages: boolean; // as if the network ate them
  duplicate: number; // each message comes this many times more
  reorder: boolean; // newest first, a second's messages at once
  refundsFail: boolean;
};

export const NO_FAULTS: Faults = {
  slowMs: 0,
  failing: 0,
  failingAfter: 0,
  loseMessages: false,
  duplicate: 0,
  reorder: false,
  refundsFail: false,
};

const RETRY_AFTER_MS = [1_000, 5_000, 30_000, 120_000, 600_000, 3_600_000];
const ANSWER_WITHIN_MS = 10_000;

type Ground = { kept: Kept; save: () => void; faults: Faults; secret: string; to: () => string | null };

/** Signed messages to one address, each until it is answered with 2xx, farther and farther apart. */
export function openDeliveries(ground: Ground) {
  const { kept, save, faults } = ground;
  const timers = new Set<NodeJS.Timeout>();
  const held: string[] = [];

  const later = (ms: number, act: () => void): void => {
    const timer = setTimeout(() => {
      timers.delete(timer);
      act();
    }, ms);
    timer.unref();
    timers.add(timer);
  };

  const forget = (messageId: string): void => {
    kept.waiting = kept.waiting.filter((each) => each.messageId !== messageId);
    save();
  };

  const tryOnce = async (messageId: string, attempt: number): Promise<void> => {
    const message = kept.messages.find(({ id }) => id === messageId);
    const url = ground.to();
    if (!message || url === null) return forget(messageId);
    if (await delivered(url, message, ground.secret)) return forget(messageId);
    const wait = RETRY_AFTER_MS[attempt];
    if (wait === undefined) return forget(messageId);
    kept.waiting = kept.waiting.map((each) =>
      each.messageId === messageId ? { messageId, attempt: attempt + 1 } : each,
    );
    save();
    later(wait, () => void tryOnce(messageId, attempt + 1));
  };

  const send = (messageId: string): void => {
    for (let copy = 0; copy <= faults.duplicate; copy += 1) void tryOnce(messageId, 0);
  };

  for (const { messageId, attempt } of kept.waiting) later(500, () => void tryOnce(messageId, attempt));

  return {
    deliver(message: Message): void {
      if (faults.loseMessages) return;
      kept.waiting.push({ messageId: message.id, attempt: 0 });
      save();
      if (!faults.reorder) return send(message.id);
      held.push(message.id);
      if (held.length === 1) later(1000, () => held.splice(0).reverse().forEach(send));
    },
    close(): void {
      for (const timer of timers) clearTimeout(timer);
    },
  };
}

/** As Stripe signs: t, a dot and the body, under the endpoint's secret as text. */
export function signatureOf(body: string, secret: string, atS: number): string {
  return `t=${atS},v1=${createHmac('sha256', secret).update(`${atS}.${body}`).digest('hex')}`;
}

async function delivered(url: string, message: Message, secret: string): Promise<boolean> {
  const body = JSON.stringify(message);
  const signature = signatureOf(body, secret, Math.floor(Date.now() / 1000));
  try {
    const answer = await fetch(url, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'stripe-signature': signature },
      body,
      signal: AbortSignal.timeout(ANSWER_WITHIN_MS),
    });
    await answer.arrayBuffer();
    return answer.ok;
  } catch {
    return false;
  }
}
