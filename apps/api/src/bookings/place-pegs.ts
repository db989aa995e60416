import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type { BookedTicket } from '@mereward/shared/bookings/contract';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import type { Interval } from '@mereward/shared/time/interval';
import type { EntityManager } from 'typeorm';
import { brokenConstraint } from '../conflict';
import type { Ctx } from '../ctx';
import { pegFault } from './let-faults';
import { takePegs, type PegWanted } from './peg-calendar';

export type Placing = {
  bookingId: string;
  lake: Lake;
  zone: string;
  hours: Interval;
  turnaroundMinutes: number;
  state: 'held' | 'taken';
  tickets: readonly { ticket: BookedTicket; peg: Peg | null }[];
};

/** Writes a booking's pegs into the calendar, all of them or none, or says in words which can't be had and what can. */
export async function placePegs(ctx: Ctx, placing: Placing): Promise<void> {
  refuseCrowded(placing);
  const { bookingId, lake, hours, turnaroundMinutes, state } = placing;
  const wanted = {
    bookingId,
    lakeId: lake.id,
    ...hours,
    turnaroundMinutes,
    state,
    pegs: wantedPegs(placing),
  };
  const taken = await takePegs(ctx.tx, wanted).catch((error: unknown) => {
    throw roomProblem(error, lake) ?? error;
  });
  if (taken.length > 0) throw await justTaken(ctx, placing, taken);
}

/** People and rods for each peg once, however many tickets are on it. */
export function wantedPegs({ tickets }: Pick<Placing, 'tickets'>): PegWanted[] {
  const onPegs = new Map<string, PegWanted>();
  const roving: PegWanted[] = [];
  for (const { ticket } of tickets) {
    const { pegId, people, rods } = ticket;
    const there = pegId === null ? undefined : onPegs.get(pegId);
    if (there)
      onPegs.set(there.pegId ?? '', { ...there, people: there.people + people, rods: there.rods + rods });
    else if (pegId === null) roving.push({ pegId, people, rods });
    else onPegs.set(pegId, { pegId, people, rods });
  }
  return [...onPegs.values(), ...roving];
}

/** More people or rods than a peg has room for by itself, said before the calendar is asked. */
function refuseCrowded(placing: Placing): void {
  const wanted = new Map(wantedPegs(placing).map((each) => [each.pegId, each]));
  const errors = placing.tickets.flatMap(({ peg }, index): ProblemError[] => {
    const asked = peg && wanted.get(peg.id);
    if (!peg || !asked) return [];
    const { people, rods } = peg.details;
    const detail =
      asked.people > people
        ? `Peg ${peg.number} has room for ${people === 1 ? 'one person' : `${people} people`}.`
        : asked.rods > rods
          ? `Peg ${peg.number} has room for ${rods === 1 ? 'one rod' : `${rods} rods`}.`
          : null;
    return detail === null ? [] : [{ pointer: `/tickets/${index}/pegId`, detail }];
  });
  const [first] = errors;
  if (!first) return;
  throw new Problem('conflict', first.detail, {
    detail: 'Nothing was kept. Take a second peg beside it, or a peg with more room.',
    errors,
  });
}

export function roomProblem(error: unknown, { name }: Lake): Problem | null {
  switch (brokenConstraint(error)) {
    case 'peg_time_peg_room':
      return new Problem('conflict', 'That peg has no room for so many people or rods then', {
        detail: 'Nothing was kept. Choose another peg, or come with fewer.',
      });
    case 'peg_time_lake_room':
      return new Problem('conflict', `${name} is full at that time`, {
        detail: 'Nothing was kept. Choose another day, or another lake.',
      });
    case 'peg_time_once':
      return new Problem('conflict', 'That peg was just taken', {
        detail: 'Nothing was kept. Choose another peg or another time.',
      });
    default:
      return null;
  }
}

const MOST_OFFERED = 3;

/** Somebody was quicker: which pegs are gone, and the nearest ones that are free for the same hours. */
async function justTaken(ctx: Ctx, placing: Placing, taken: readonly string[]): Promise<Problem> {
  const gone = placing.tickets.flatMap(({ peg }, index) =>
    peg && taken.includes(peg.id) ? [{ peg, index }] : [],
  );
  const [first] = gone;
  const offered = first ? await freeNear(ctx, placing, first.peg) : [];
  const numbers = [...new Set(gone.map(({ peg }) => peg.number))];
  const title =
    numbers.length === 1
      ? `Peg ${numbers.join('')} was just taken`
      : `Pegs ${listed(numbers)} were just taken`;
  const detail =
    offered.length === 0
      ? 'Nothing was kept. No other peg of this lake is free for the same hours: choose another time.'
      : `Nothing was kept. Free for the same hours: ${listed(offered.map(({ number }) => number))}.`;
  return new Problem('conflict', title, {
    detail,
    errors: [
      ...gone.map(({ peg, index }) => ({
        pointer: `/tickets/${index}/pegId`,
        detail: `Peg ${peg.number} is taken for part of that time.`,
      })),
      ...offered.map(({ id, number }) => ({ pointer: `/offers/${id}`, detail: number })),
    ],
  });
}

const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`;

/** Pegs of the lake free for the same hours and big enough, the nearest first. */
async function freeNear({ tx, now }: Ctx, placing: Placing, like: Peg): Promise<Peg[]> {
  const { lake, hours, turnaroundMinutes, tickets } = placing;
  const most = (count: (ticket: BookedTicket) => number): number =>
    Math.max(...tickets.map(({ ticket }) => count(ticket)));
  const ids = await freeIds(tx, { lake, hours, turnaroundMinutes, now });
  const own = new Set(tickets.map(({ ticket }) => ticket.pegId));
  const pegs = await tx.findBy(Peg, { lakeId: lake.id });
  const farM = ({ details }: Peg): number =>
    geodesicBetween(like.details.position, details.position).distanceM;
  return pegs
    .filter(
      (peg) =>
        ids.has(peg.id) &&
        !own.has(peg.id) &&
        pegFault(peg, placing) === null &&
        peg.details.people >= most(({ people }) => people) &&
        peg.details.rods >= most(({ rods }) => rods),
    )
    .sort((a, b) => farM(a) - farM(b))
    .slice(0, MOST_OFFERED);
}

type Asked = Pick<Placing, 'lake' | 'hours' | 'turnaroundMinutes'> & { now: Date };

async function freeIds(
  tx: EntityManager,
  { lake, hours, turnaroundMinutes, now }: Asked,
): Promise<Set<string>> {
  const rows: { id: string }[] = await tx.query(
    `SELECT p.id FROM peg p
      WHERE p.lake_id = $1 AND NOT EXISTS (
        SELECT 1 FROM peg_time t LEFT JOIN booking b ON b.id = t.booking_id
         WHERE t.peg_id = p.id AND t.during && tstzrange($2::timestamptz, $3::timestamptz + make_interval(mins => $4))
           AND NOT (t.state = 'held' AND b.hold_until <= $5))`,
    [lake.id, hours.from, hours.until, turnaroundMinutes, now],
  );
  return new Set(rows.map(({ id }) => id));
}
