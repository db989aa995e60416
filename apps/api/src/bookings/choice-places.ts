import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { BookingDetails } from '@mereward/shared/bookings/contract';
import type { PlaceOffered } from '@mereward/shared/bookings/choosing-contract';
import { toldLine } from '@mereward/shared/lakes/lake-places';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import type { TicketType as TicketTypeDetails } from '@mereward/shared/tickets/contract';
import { ticketInterval } from '@mereward/shared/tickets/ticket-interval';
import { grossOf, priceLines, priceOn } from '@mereward/shared/tickets/ticket-price';
import { civilDay } from '@mereward/shared/time/civil-day';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { Interval } from '@mereward/shared/time/interval';
import { addDays, civilTime, instantOf } from '@mereward/shared/time/zoned';
import { In, IsNull, type EntityManager } from 'typeorm';
import { originOfLake } from '../lakes/found';
import type { HitPeg } from './closure-hits';

/** How far ahead another day may be chosen. Common practice, no published source. */
const DAYS_AHEAD = 60;

/** What looks for a place: the pegs it had, its times, and the kind of ticket it would be. */
export type Seeking = {
  fisheryId: string;
  zone: string;
  lake: Lake;
  type: TicketTypeDetails | null; // null: a ticket of the lodge, of so many hours
  start: string | null;
  was: readonly HitPeg[];
  from: Date;
  until: Date;
  now: Date;
};

export type Place = Interval & { day: string; pegIds: (string | null)[][] };

/** The hours a booking would have on another day, or null where there are none. */
export function hoursOn(seeking: Seeking, day: string): Interval | null {
  const { type, lake, zone, start } = seeking;
  if (!type) {
    const clock = civilTime(seeking.from, zone).slice(11);
    const from = instantOf(`${day}T${clock}`, zone).at;
    return { from, until: new Date(from.getTime() + seeking.until.getTime() - seeking.from.getTime()) };
  }
  if ((type.firstDay !== null && day < type.firstDay) || (type.lastDay !== null && day > type.lastDay))
    return null;
  if (!priceOn(type.prices, day)) return null;
  const hours = ticketInterval(type.duration, { day, start }, { position: originOfLake(lake), zone });
  return 'refused' in hours ? null : hours;
}

/** Days on which the whole booking finds pegs, the next first. */
export async function daysWithRoom(tx: EntityManager, seeking: Seeking): Promise<PlaceOffered[]> {
  const today = civilDay(seeking.now, seeking.zone);
  const days = Array.from({ length: DAYS_AHEAD }, (_, i) => addDays(today, i)).flatMap((day) => {
    const hours = hoursOn(seeking, day);
    return hours && hours.from > seeking.now ? [{ day, ...hours }] : [];
  });
  const pegs = await pegsFor(tx, seeking);
  const free = await freeOn(tx, { pegs, days, turnaround: turnaroundOf(seeking) });
  const wanted = Math.max(1, seeking.was.length);
  return days.flatMap(({ day, from, until }, index) => {
    const count = free[index]?.length ?? 0;
    if (count < wanted) return [];
    const words = `${dayAndClock(from.toISOString(), seeking.zone)} to ${dayAndClock(until.toISOString(), seeking.zone)}`;
    return [{ day, from: from.toISOString(), until: until.toISOString(), words, free: count }];
  });
}

const turnaroundOf = ({ was, type }: Seeking): number =>
  type?.turnaroundMinutes ?? was[0]?.turnaroundMinutes ?? 0;

/** Pegs that may be let to this booking at all, nearest by the walking order to those it had. */
async function pegsFor(tx: EntityManager, { lake, type, was }: Seeking): Promise<Peg[]> {
  const all = await tx.find(Peg, { where: { lakeId: lake.id }, order: { walkingOrder: 'ASC' } });
  const people = Math.max(1, ...was.map((each) => each.people));
  const rods = Math.max(0, ...was.map((each) => each.rods));
  const had = all.find(({ id }) => was.some(({ pegId }) => pegId === id));
  const drawn = { places: lake.details.places, origin: originOfLake(lake) };
  const fit = all.filter(
    ({ id, details }) =>
      details.status !== 'closed' &&
      whyNotLet({ overheadLine: toldLine(details, drawn) }) === null &&
      details.people >= people &&
      details.rods >= rods &&
      (type === null || type.pegIds === null || type.pegIds.includes(id)),
  );
  const far = ({ walkingOrder }: Peg): number => Math.abs(walkingOrder - (had?.walkingOrder ?? 0));
  return fit.sort((a, b) => far(a) - far(b) || a.walkingOrder - b.walkingOrder);
}

type Looked = { pegs: readonly Peg[]; days: readonly Interval[]; turnaround: number };

/** For each day the ids of the pegs nobody has then, in the order given. */
async function freeOn(tx: EntityManager, { pegs, days, turnaround }: Looked): Promise<string[][]> {
  const rows: { day: number; pegId: string }[] = await tx.query(
    `SELECT (d.place - 1)::int AS day, p.id AS "pegId"
       FROM unnest($1::timestamptz[], $2::timestamptz[]) WITH ORDINALITY AS d ("from", until, place)
      CROSS JOIN unnest($3::uuid[]) WITH ORDINALITY AS p (id, near)
      WHERE NOT EXISTS (SELECT 1 FROM peg_time t WHERE t.peg_id = p.id
              AND t.during && tstzrange(d."from", d.until + make_interval(mins => $4), '[)'))
      ORDER BY d.place, p.near`,
    [days.map(({ from }) => from), days.map(({ until }) => until), pegs.map(({ id }) => id), turnaround],
  );
  return days.map((_, index) => rows.flatMap(({ day, pegId }) => (day === index ? [pegId] : [])));
}

/** Pegs for a booking on one day: those it had where they are free, else the nearest. Null where there are not enough. */
export async function pegsOn(
  tx: EntityManager,
  seeking: Seeking,
  hours: Interval,
): Promise<(string | null)[] | null> {
  const pegs = await pegsFor(tx, seeking);
  const [free = []] = await freeOn(tx, { pegs, days: [hours], turnaround: turnaroundOf(seeking) });
  const left = new Set(free);
  const chosen: (string | null)[] = [];
  for (const { pegId } of seeking.was) {
    if (pegId === null) {
      chosen.push(null);
      continue;
    }
    const next = left.has(pegId) ? pegId : [...left][0];
    if (next === undefined) return null;
    left.delete(next);
    chosen.push(next);
  }
  return chosen;
}

export type OtherTicket = { row: TicketType; grossPence: number };

/**
 * The kind of ticket a booking becomes on another lake: its own where it is sold there, else one of a day for the same
 * people, the dearest that costs no more than was paid. Null where the lake has none.
 */
export async function ticketOnLake(
  tx: EntityManager,
  { type, lake, was }: Pick<Seeking, 'type' | 'was'> & { lake: Lake },
  at: { ticketTypeId: string | null; paidPence: number; day: string },
): Promise<OtherTicket | null> {
  const rows = await tx.findBy(TicketType, { fisheryId: lake.fisheryId, withdrawnAt: IsNull() });
  const sold = rows.filter(({ details }) => details.lakeIds.includes(lake.id));
  const same = sold.find(({ id }) => id === at.ticketTypeId);
  const ofDay = sold.filter(
    ({ details }) =>
      (details.duration.kind === 'fixed_hours' || details.duration.kind === 'dawn_dusk') &&
      details.audience === (type?.audience ?? 'public'),
  );
  const priced = (same ? [same] : ofDay).flatMap((row): OtherTicket[] => {
    const gross = sumFor(row.details, was, at.day);
    return gross === null ? [] : [{ row, grossPence: gross }];
  });
  const dearestFirst = priced.sort((a, b) => b.grossPence - a.grossPence);
  return dearestFirst.find(({ grossPence }) => grossPence <= at.paidPence) ?? dearestFirst.at(-1) ?? null;
}

function sumFor(type: TicketTypeDetails, was: readonly HitPeg[], day: string): number | null {
  let sum = 0;
  for (const { rods, people } of was) {
    const lines = priceLines(type, {
      day,
      start: null,
      rods: Math.max(1, rods),
      people: Math.max(1, people),
    });
    if ('refused' in lines) return null;
    sum += grossOf(lines);
  }
  return sum;
}

/** The numbers of pegs, in the order asked for. */
export async function pegNumbers(tx: EntityManager, ids: readonly (string | null)[]): Promise<string[]> {
  const known = ids.flatMap((id) => (id === null ? [] : [id]));
  const rows = await tx.findBy(Peg, { id: In(known) });
  return known.flatMap((id) => rows.find((row) => row.id === id)?.number ?? []);
}

/** A booking's details on its new pegs and day. */
export const detailsMoved = (
  details: BookingDetails,
  to: { day: string; start: string | null; pegIds: readonly (string | null)[]; type: TicketType | null },
): BookingDetails => ({
  ...details,
  day: to.day,
  start: to.start,
  ...(to.type
    ? { ticketName: to.type.details.name, turnaroundMinutes: to.type.details.turnaroundMinutes }
    : {}),
  tickets: details.tickets.map((ticket, index) => ({
    ...ticket,
    pegId: to.pegIds[index] ?? ticket.pegId,
    ticketTypeId: to.type?.id ?? ticket.ticketTypeId,
  })),
});
