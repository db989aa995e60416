/** At most one word a second about a lake: a match of forty tickets is one change to whoever looks on. */
const APART_MS = 1000;

export type ToldLakes = { changed: (lakeId: string) => void; stop: () => void };

/** Passes on that a lake changed: at once, and what follows within a second as one more word at its end. */
export function tellingLakes(tell: (lakeId: string) => void, apartMs = APART_MS): ToldLakes {
  const resting = new Map<string, { timer: NodeJS.Timeout; changed: boolean }>();
  const rest = (lakeId: string): void => {
    const timer = setTimeout(() => {
      const changed = resting.get(lakeId)?.changed === true;
      resting.delete(lakeId);
      if (changed) say(lakeId);
    }, apartMs);
    timer.unref();
    resting.set(lakeId, { timer, changed: false });
  };
  const say = (lakeId: string): void => {
    rest(lakeId);
    tell(lakeId);
  };
  return {
    changed(lakeId) {
      const here = resting.get(lakeId);
      if (here) here.changed = true;
      else say(lakeId);
    },
    stop() {
      for (const { timer } of resting.values()) clearTimeout(timer);
      resting.clear();
    },
  };
}
