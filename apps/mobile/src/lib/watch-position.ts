import type { PositionListener } from '@/lib/watched-position';

/** Tells where this device is as it moves; only the web program can, so far. Answers how to stop. */
export function watchPosition({ onTrouble }: PositionListener): () => void {
  onTrouble('not-here');
  return () => undefined;
}
