import { queryClient } from '@/lib/queries';
import { dropOtherKeys, keyOf } from '@/lib/device-key';
import { onReturn } from '@/lib/on-return';
import { dropSent, forgetOpened, lookAgain } from '@/lib/outbox';
import { sendWaiting } from '@/lib/outbox-sender';
import { outboxSignal } from '@/lib/outbox-signal';
import { KEEP_MS } from '@/lib/read-rows';
import { sessionStore } from '@/lib/session-store';
import { tabTalk } from '@/lib/tab-talk';

let begun = false;
let who: string | null = null;

const here = (): string | null => sessionStore.get().account?.id ?? null;

/** Somebody came, went, or was known again: only their own things are open here from now on. */
async function whoIsHere(): Promise<void> {
  const now = here();
  if (now !== who) {
    who = now;
    await dropOtherKeys(now);
    await forgetOpened();
  }
  if (now === null || sessionStore.get().state !== 'signed-in') return;
  await keyOf(now);
  await lookAgain(false);
  await sendWaiting();
}

/**
 * What a sent thing changed has been read again: the screens need not show it from here any more. Reading shows as well
 * as sending whether the server answers.
 */
function followReading(): void {
  queryClient.getQueryCache().subscribe((event) => {
    if (event.type !== 'updated') return;
    const { action, query } = event;
    if (action.type === 'failed' || action.type === 'error') {
      if (action.error instanceof TypeError) outboxSignal.heard(false);
    } else if (action.type === 'success' && !action.manual) {
      outboxSignal.heard(true);
      void dropSent(({ touches }) => JSON.stringify(touches[0]) === query.queryHash);
    }
  });
}

/** Begins to watch for what waits on this device, and for moments to send it. Called once, as the program opens. */
export function watchOutbox(): void {
  if (begun) return;
  begun = true;
  who = here();
  followReading();
  tabTalk.hear(() => void lookAgain(false));
  onReturn(() => void sendWaiting());
  sessionStore.subscribe(() => void whoIsHere());
  void dropOtherKeys(who)
    .then(() => lookAgain(false))
    .then(() => dropSent(({ at }) => Date.parse(at) < Date.now() - KEEP_MS)) // no reading it could stand beside is kept
    .then(whoIsHere)
    .then(sendWaiting);
}
