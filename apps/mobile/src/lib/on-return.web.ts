/** Calls back when the page comes into sight again, or the browser finds a network. Answers how to stop that. */
export function onReturn(act: () => void): () => void {
  const shown = (): void => {
    if (document.visibilityState === 'visible') act();
  };
  window.addEventListener('online', act);
  window.addEventListener('focus', shown);
  document.addEventListener('visibilitychange', shown);
  return () => {
    window.removeEventListener('online', act);
    window.removeEventListener('focus', shown);
    document.removeEventListener('visibilitychange', shown);
  };
}
