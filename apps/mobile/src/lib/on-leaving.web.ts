/** Calls back as the page goes out of sight and may be ended. Answers how to stop that. */
export function onLeaving(act: () => void): () => void {
  const hidden = (): void => {
    if (document.visibilityState === 'hidden') act();
  };
  window.addEventListener('pagehide', act);
  document.addEventListener('visibilitychange', hidden);
  return () => {
    window.removeEventListener('pagehide', act);
    document.removeEventListener('visibilitychange', hidden);
  };
}
