/** Lets at most `places` in at once; the others wait their turn, first come first in. */
export function gate(places: number): <T>(work: () => Promise<T>) => Promise<T> {
  let free = places;
  const waiting: (() => void)[] = [];
  const enter = async () => {
    if (free > 0) free -= 1;
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
