import { useSyncExternalStore } from 'react';
import { outboxSignal } from '@/lib/outbox-signal';

function subscribe(tell: () => void): () => void {
  window.addEventListener('online', tell);
  window.addEventListener('offline', tell);
  return () => {
    window.removeEventListener('online', tell);
    window.removeEventListener('offline', tell);
  };
}

/** True when the browser has no network, or the server gave no answer at the last try to send. */
export function useNoSignal(): boolean {
  const reached = outboxSignal.useReached();
  const online = useSyncExternalStore(
    subscribe,
    () => navigator.onLine,
    () => true,
  );
  return !online || reached === false;
}
