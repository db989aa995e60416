import { useState } from 'react';
import type { Chosen } from '@/features/charts/outline-drawing';
import type { Sketch } from '@/features/lakes/outline-sketch';

const MOST_STEPS = 100;

/** A sketch being worked on: what is chosen in it, and the way back. */
export function useSketch(sketch: Sketch, onChange: (sketch: Sketch) => void) {
  const [past, setPast] = useState<readonly Sketch[]>([]);
  const [chosen, setChosen] = useState<Chosen>(null);
  const remember = (): void => setPast([...past.slice(1 - MOST_STEPS), sketch]);
  return {
    chosen,
    setChosen,
    mayUndo: past.length > 0,
    /** A whole step: it can be undone. */
    change: (next: Sketch, choose: Chosen = null): void => {
      if (next === sketch) return;
      remember();
      setChosen(choose);
      onChange(next);
    },
    /** A step of a drag: only its beginning is remembered. */
    drag: (next: Sketch, begins: boolean): void => {
      if (begins) remember();
      onChange(next);
    },
    undo: (): void => {
      const before = past.at(-1);
      if (!before) return;
      setPast(past.slice(0, -1));
      setChosen(null);
      onChange(before);
    },
  };
}
