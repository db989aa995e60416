import { AppState } from 'react-native';

/** Calls back as the program goes out of sight and may be ended. Answers how to stop that. */
export function onLeaving(act: () => void): () => void {
  const watch = AppState.addEventListener('change', (state) => {
    if (state !== 'active') act();
  });
  return () => watch.remove();
}
