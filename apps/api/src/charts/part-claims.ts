import { surfacePart, type SurfacePart } from '@mereward/shared/charts/surface-parts';

/** Work two threads do together: both take the next part that nobody has, and write its answers where both can see them. */
export type SharedParts = {
  parts: readonly SurfacePart[];
  starts: readonly number[];
  joined: Float64Array; // shared memory
  marks: Int32Array; // shared memory: the next part to take, then for each part whether it is done
};

const DONE = 1;
const FAILED = 2;

function doPart({ parts, starts, joined }: SharedParts, part: number): void {
  joined.set(surfacePart(parts[part]!), starts[part]!);
}

/** Takes parts until none is left. */
export function doFreeParts(shared: SharedParts, after: () => void): void {
  for (;;) {
    const part = Atomics.add(shared.marks, 0, 1);
    if (part >= shared.parts.length) return;
    let end: number;
    try {
      doPart(shared, part);
      end = DONE;
    } catch {
      end = FAILED; // whoever waits does it again, and hears why
    }
    Atomics.store(shared.marks, part + 1, end);
    Atomics.notify(shared.marks, part + 1);
    after();
  }
}

/** Waits until every part is done; does what failed, or wasn't finished in so many milliseconds, itself. */
export function finishParts(shared: SharedParts, patienceMs: number): void {
  for (let part = 0; part < shared.parts.length; part++) {
    Atomics.wait(shared.marks, part + 1, 0, patienceMs);
    if (Atomics.load(shared.marks, part + 1) !== DONE) doPart(shared, part);
  }
}
