/** A browser may refuse storage altogether (private windows, full disk): then nothing is kept, and nothing breaks. */
function attempt<T>(act: () => T, otherwise: T): T {
  try {
    return act();
  } catch {
    return otherwise;
  }
}

const peek = (key: string): string | null => attempt(() => localStorage.getItem(key), null);

/** Small text kept on this device. Losing it costs convenience, never a record. */
export const storage = {
  get: async (key: string): Promise<string | null> => peek(key),
  set: async (key: string, value: string): Promise<void> =>
    attempt(() => localStorage.setItem(key, value), undefined),
  remove: async (key: string): Promise<void> => attempt(() => localStorage.removeItem(key), undefined),
  keys: async (): Promise<readonly string[]> => attempt(() => Object.keys(localStorage), []),
  /** What can be had without waiting. */
  peek,
  /** Calls back when another window of this browser changes what is kept under a key. */
  watch: (key: string, changed: (value: string | null) => void): void => {
    window.addEventListener('storage', (event) => {
      if (event.key === key || event.key === null) changed(peek(key));
    });
  },
};
