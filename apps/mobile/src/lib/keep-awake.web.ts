/** Asks that the screen stay lit while something listens, where the browser can. Answers how to let go. */
export function keepAwake(): () => void {
  if (!('wakeLock' in navigator)) return () => undefined;
  let lock: WakeLockSentinel | null = null;
  let over = false;
  const ask = (): void => {
    if (over || document.visibilityState !== 'visible') return;
    navigator.wakeLock.request('screen').then(
      (granted) => {
        lock = granted;
        if (over) void granted.release();
      },
      () => undefined, // a low battery may refuse: then the screen goes dark as always
    );
  };
  ask();
  document.addEventListener('visibilitychange', ask); // a page out of sight loses it
  return () => {
    over = true;
    document.removeEventListener('visibilitychange', ask);
    void lock?.release();
  };
}
