import { useSyncExternalStore } from 'react';

const LOOK_EVERY_MS = 3_600_000;

let newer = false;
let waiting: ServiceWorker | null = null;
let asked = false;
let watching = false;
const readers = new Set<() => void>();

function isNewer(worker: ServiceWorker | null): void {
  waiting = worker;
  newer = true;
  readers.forEach((tell) => tell());
}

/** A worker that comes while another serves this page brings a newer program; it waits until it is asked for. */
function follow(registration: ServiceWorkerRegistration): void {
  const serves = (): boolean => navigator.serviceWorker.controller !== null;
  if (registration.waiting && serves()) isNewer(registration.waiting);
  registration.addEventListener('updatefound', () => {
    const coming = registration.installing;
    coming?.addEventListener('statechange', () => {
      if (coming.state === 'installed' && serves()) isNewer(coming);
    });
  });
  const look = (): void => void registration.update().catch(() => undefined); // no signal: later
  setInterval(look, LOOK_EVERY_MS);
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'visible') look();
  });
}

async function register(): Promise<void> {
  const served = navigator.serviceWorker.controller !== null;
  navigator.serviceWorker.addEventListener('controllerchange', () => {
    if (asked) window.location.reload();
    else if (served) isNewer(null); // another window took the newer program: this one goes on until it is reloaded
  });
  follow(await navigator.serviceWorker.register('/sw.js'));
}

/** The program's own newer versions. */
export const programVersion = {
  /** Keeps the program on the device for when there is no signal, once the page has loaded, and watches for a newer one. */
  watch: (): void => {
    if (watching || !('serviceWorker' in navigator) || process.env.NODE_ENV !== 'production') return;
    watching = true;
    const begin = (): void => void setTimeout(() => void register().catch(() => undefined), 1_000); // a private window may refuse
    if (document.readyState === 'complete') begin();
    else window.addEventListener('load', begin, { once: true });
  },
  useNewer: (): boolean =>
    useSyncExternalStore(
      (reader) => {
        readers.add(reader);
        return () => readers.delete(reader);
      },
      () => newer,
      () => false,
    ),
  /** Takes the newer version, which loads this page anew. Forms keep what is typed. */
  take: (): void => {
    asked = true;
    if (waiting === null) window.location.reload();
    else waiting.postMessage({ type: 'SKIP_WAITING' });
  },
};
