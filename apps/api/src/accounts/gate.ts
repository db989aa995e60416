/** Says that so many already wait that one more would only wait in vain. */
export class GateFull extends Error {
  override readonly name = 'GateFull';
}

/** Lets at most `places` in at once; up to `queue` others wait their turn, first come first in. */
export function gate(places: number, queue: number): <T>(work: () => Promise<T>) => Promise<T> {
  let free = places;
  const waiting: (() => void)[] = [];
  const enter = async () => {
    if (free > 0) free -= 1;
    else if (waiting.length >= queue) throw new GateFull();
    else await new Promise<void>((turn) => waiting.push(turn));
  };
  const leave = () => {
    const next = waiting.shift();
    if (next) next();
    else free += 1;
  };
  return async (work) => {
    await enter();
    try {
      return await work();
    } finally {
      leave();
    }
  };
}
