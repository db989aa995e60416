const channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel('mereward.outbox');

/** Tells the other windows of this program that the queue has changed. */
export const tabTalk = {
  say: (): void => channel?.postMessage('changed'),
  hear: (act: () => void): void => channel?.addEventListener('message', act),
};
