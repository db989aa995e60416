import { useSyncExternalStore } from 'react';

const dark = window.matchMedia('(prefers-color-scheme: dark)');

const subscribe = (tell: () => void): (() => void) => {
  dark.addEventListener('change', tell);
  return () => dark.removeEventListener('change', tell);
};

/**
 * True while the device is set to dark. Read as a store: a piece drawn just as the device changes would otherwise keep the old
 * colours, since the platform's own hook begins to listen only afterwards.
 */
export const useDeviceDark = (): boolean => useSyncExternalStore(subscribe, () => dark.matches);
