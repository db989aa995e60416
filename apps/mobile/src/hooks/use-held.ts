import { useState } from 'react';

/**
 * Something with a version, held still while a form changes it: a fresh reading must not sweep away what is typed.
 * `newer` is what has come in since.
 */
export function useHeld<T extends { version: number }>(now: T) {
  const [held, hold] = useState(now);
  return { held, hold, newer: now.version > held.version ? now : null };
}
