import type { FreeAsked } from '@mereward/shared/bookings/availability-contract';
import { whyNoRoom } from '@mereward/shared/bookings/peg-room';
import type { PegSpan, PegWish } from '@mereward/shared/bookings/peg-standing';
import type { Refusal, TicketHours } from '@mereward/shared/tickets/ticket-interval';
import { civilDay } from '@mereward/shared/time/civil-day';
import { addDays } from '@mereward/shared/time/zoned';
import type { LayerAudiences, LakeDetails } from '@mereward/shared/lakes/contract';
import type { EntityManager } from 'typeorm';
import { askedHours, wishFor } from './asked-hours';
import { closedWords, type ClosureFound } from './closures-over';
import type { SoldKind } from './sold-kinds';

/** A lake as far as letting its pegs looks at it: without its outline, which is long. */
export type LetLake = Pick<LakeDetails, 'nights' | 'maxPeople' | 'maxRods'> & {
  id: string;
  name: string;
  fisheryId: string;
  origin: [number, number]; // longitude, latitude
  audiences: LayerAudiences;
};

export async function lakesOf(tx: EntityManager, fisheryId: string): Promise<LetLake[]> {
  return tx.query(
    `SELECT l.id, l.name, l.fishery_id AS "fisheryId", json_build_array(l.origin_lon, l.origin_lat) AS origin, told.*
       FROM lake l
      CROSS JOIN LATERAL jsonb_to_record(l.details - 'outline')
        AS told (nights boolean, "maxPeople" int, "maxRods" int, audiences jsonb)
      WHERE l.fishery_id = $1 ORDER BY l.name, l.id`,
    [fisheryId],
  );
}

/** What is wanted at one lake: for the day asked, and for the days after it. */
export type LakeHours = { lake: LetLake; words: string; wishIn: (days: number) => PegWish | null };

type Asking = { asked: FreeAsked; kind: SoldKind | null; zone: string };

/** The hours asked for, at one lake: each has its own sunrise. Days further on are only worked out when looked at. */
export function lakeHours(lake: LetLake, { asked, kind, zone }: Asking): LakeHours | Refusal {
  const type = kind?.type ?? null;
  const at = { type, place: { position: lake.origin, zone } };
  const wish = (hours: TicketHours): PegWish => wishFor(hours, asked, type);
  const first = askedHours(asked.day, asked, at);
  if ('refused' in first) return first;
  const known = new Map<number, PegWish | null>([[0, wish(first)]]);
  return {
    lake,
    words: first.words,
    wishIn: (days) => {
      const found = known.get(days);
      if (found !== undefined) return found;
      const hours = askedHours(addDays(asked.day, days), asked, at);
      const made = 'refused' in hours ? null : wish(hours);
      known.set(days, made);
      return made;
    },
  };
}

type LakeTime = { closures: readonly ClosureFound[]; onLake: readonly PegSpan[]; zone: string };

/** What stands against anybody more at a lake for some hours: its rule on nights, a closure, or that it is full. */
export function whyNotLake(
  { name, id, nights, maxPeople, maxRods }: LetLake,
  { hours, people, rods }: PegWish,
  { closures, onLake, zone }: LakeTime,
): { state: 'closed' | 'taken'; whyNot: string } | null {
  const lastDay = civilDay(new Date(hours.until.getTime() - 1), zone);
  if (!nights && civilDay(hours.from, zone) !== lastDay)
    return { state: 'closed', whyNot: `There is no night fishing on ${name}.` };
  const closed = closedWords(closures, { lakeId: id, hours, zone });
  if (closed !== null) return { state: 'closed', whyNot: closed };
  const room = { people: maxPeople, rods: maxRods, exclusive: false };
  const there = onLake.map((span) => ({ ...span, until: span.fishingUntil }));
  const full = whyNoRoom(room, there, { ...hours, people, rods });
  return full === null ? null : { state: 'taken', whyNot: `${name} is full then. ${full}` };
}
