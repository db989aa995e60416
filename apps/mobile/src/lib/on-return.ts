import { AppState } from 'react-native';

/** Calls back when the program comes into sight again, and there may be a signal once more. Answers how to stop that. */
export function onReturn(act: () => void): () => void {
  const watch = AppState.addEventListener('change', (state) => {
    if (state === 'active') act();
  });
  return () => watch.remove();
}
