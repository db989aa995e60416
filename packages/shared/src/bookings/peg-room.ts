import { overlaps, type Interval } from '../time/interval';

/** How long a peg is kept: the ticket’s hours and the time to clear and settle after them. Half-open. */
export const keptInterval = ({ from, until }: Interval, turnaroundMinutes: number): Interval => ({
  from,
  until: new Date(until.getTime() + turnaroundMinutes * 60_000),
});

export type Taken = Interval & { people: number; rods: number };
/** What a peg (or a lake) has room for; null where nothing is counted. Exclusive: one booking at a time. */
export type Room = { people: number | null; rods: number | null; exclusive: boolean };

/** The most people and the most rods there at any one instant of a stretch. */
export function mostAtOnce(taken: readonly Taken[], stretch: Interval): { people: number; rods: number } {
  const inside = taken.filter((each) => overlaps(each, stretch));
  const most = (count: (each: Taken) => number): number =>
    Math.max(
      0,
      ...inside.map((start) => {
        const at = Math.max(start.from.getTime(), stretch.from.getTime());
        return inside
          .filter((each) => each.from.getTime() <= at && at < each.until.getTime())
          .reduce((sum, each) => sum + count(each), 0);
      }),
    );
  return { people: most(({ people }) => people), rods: most(({ rods }) => rods) };
}

/**
 * Why there is no room, in words; null when there is. `taken` and `wanted` with their turnaround. For offering pegs:
 * the last word is the database’s.
 */
export function whyNoRoom(room: Room, taken: readonly Taken[], wanted: Taken): string | null {
  const there = mostAtOnce(taken, wanted);
  if (room.people !== null && wanted.people > room.people)
    return `There is room for ${room.people === 1 ? 'one person' : `${room.people} people`} here.`;
  if (room.rods !== null && wanted.rods > room.rods) return `There is room for ${room.rods} rods here.`;
  if (room.exclusive && taken.some((each) => overlaps(each, wanted)))
    return 'It is taken for part of that time.';
  if (room.people !== null && there.people + wanted.people > room.people)
    return 'There are as many people here as there is room for.';
  if (room.rods !== null && there.rods + wanted.rods > room.rods)
    return 'There are as many rods here as there is room for.';
  return null;
}
