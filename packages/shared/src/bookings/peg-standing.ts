import { overlaps, type Interval } from '../time/interval';
import type { PegState } from './availability-contract';
import { whyNoRoom, type Room, type Taken } from './peg-room';

/** A stretch of a peg’s calendar; `fishingUntil` is where its turnaround begins. People and rods are nought in what is no booking. */
export type PegSpan = Interval & {
  state: Exclude<PegState, 'free'>;
  fishingUntil: Date;
  people: number;
  rods: number;
  words: string; // of a closure, what everybody is told
};

/** What somebody wants of a peg: the hours, and how long it is kept for them. */
export type PegWish = { hours: Interval; kept: Interval; people: number; rods: number };

export type PegStanding = { state: PegState; whyNot: string | null };

const FREE: PegStanding = { state: 'free', whyNot: null };

/**
 * How a peg stands for what somebody wants. A closure outweighs a block, and that a booking; where places are let one
 * by one it is free while there is room. The last word is the database’s.
 */
export function pegStanding(room: Room, spans: readonly PegSpan[], wish: PegWish): PegStanding {
  const inTheWay = spans.filter((span) => overlaps(span, wish.kept));
  const closed = inTheWay.find(({ state }) => state === 'closed');
  if (closed) return { state: 'closed', whyNot: closed.words };
  if (inTheWay.some(({ state }) => state === 'blocked'))
    return { state: 'blocked', whyNot: 'Kept back by the fishery for part of that time.' };
  const wanted: Taken = {
    ...(room.exclusive ? wish.kept : wish.hours),
    people: wish.people,
    rods: wish.rods,
  };
  const whyNot = whyNoRoom(room, inTheWay.map(takenOf(room.exclusive)), wanted);
  if (whyNot === null) return FREE;
  const firm = inTheWay.filter(({ state }) => state === 'taken').map(takenOf(room.exclusive));
  if (whyNoRoom(room, firm, wanted) !== null) return { state: 'taken', whyNot };
  return {
    state: 'held',
    whyNot: 'Somebody is booking it just now. It comes free again if they don’t finish.',
  };
}

/** Nobody else may come into a turnaround; where a peg is shared only those fishing are counted. */
const takenOf =
  (exclusive: boolean) =>
  ({ from, until, fishingUntil, people, rods }: PegSpan): Taken => ({
    from,
    until: exclusive ? until : fishingUntil,
    people,
    rods,
  });

/** How many more people a shared peg has room for throughout those hours, rods allowing for one each. */
export function placesLeft(room: Room, spans: readonly PegSpan[], wish: PegWish): number {
  let left = 0;
  const most = Math.min(room.people ?? 0, room.rods ?? Infinity);
  while (
    left < most &&
    pegStanding(room, spans, { ...wish, people: left + 1, rods: left + 1 }).state === 'free'
  )
    left += 1;
  return left;
}
