import { Lake } from '@mereward/db/entities/lakes/lake';
import type { BookingState } from '@mereward/shared/bookings/booking-state';
import type { BookingDetails } from '@mereward/shared/bookings/contract';
import { affects, type Closure, type ClosureBite } from '@mereward/shared/closures/closure-effect';
import type { ClosureScope } from '@mereward/shared/closures/contract';
import { In, type EntityManager } from 'typeorm';
import { rangeOf } from '../closures/closure-times';
import { notFound } from '../http/deny';

/** A booking in the way of a closure, with what the closure does to it. Pence of what was taken and not given back. */
export type Hit = {
  id: string;
  status: BookingState;
  holder: string;
  email: string | null;
  code: string;
  lakeId: string;
  lakeName: string;
  ticketTypeId: string | null;
  from: Date;
  until: Date;
  details: BookingDetails;
  pegs: HitPeg[];
  season: boolean;
  paidPence: number;
  currency: string;
  bite: Exclude<ClosureBite, 'none'>;
};

/** A peg of a booking as the calendar had it, to give it back should the closure be lifted. */
export type HitPeg = {
  pegId: string | null;
  number: string | null;
  people: number;
  rods: number;
  turnaroundMinutes: number;
};

/** The lakes and pegs a closure lies over; those of another fishery aren't there. */
export async function groundOf(
  tx: EntityManager,
  fisheryId: string,
  scope: ClosureScope,
): Promise<{ lakeIds: string[]; pegIds: string[] }> {
  const lakeIds = await lakesOf(tx, fisheryId, scope);
  const rows: { id: string }[] = await tx.query(
    `SELECT id FROM peg WHERE lake_id = ANY ($1) AND ($2::uuid[] IS NULL OR id = ANY ($2)) ORDER BY id`,
    [lakeIds, scope.kind === 'pegs' ? scope.pegIds : null],
  );
  return { lakeIds, pegIds: rows.map(({ id }) => id) };
}

async function lakesOf(tx: EntityManager, fisheryId: string, scope: ClosureScope): Promise<string[]> {
  if (scope.kind === 'pegs') {
    const rows: { lakeId: string; fisheryId: string; pegs: number }[] = await tx.query(
      `SELECT l.id AS "lakeId", l.fishery_id AS "fisheryId", count(*)::int AS pegs
         FROM peg p JOIN lake l ON l.id = p.lake_id WHERE p.id = ANY ($1) GROUP BY l.id ORDER BY l.id`,
      [scope.pegIds],
    );
    const found = rows.reduce((sum, { pegs }) => sum + pegs, 0);
    if (found !== new Set(scope.pegIds).size || rows.some((row) => row.fisheryId !== fisheryId))
      throw notFound('peg');
    return rows.map(({ lakeId }) => lakeId);
  }
  const named = scope.kind === 'fishery' ? null : scope.lakeIds;
  const lakes = await tx.find(Lake, {
    where: { fisheryId, ...(named === null ? {} : { id: In(named) }) },
    order: { id: 'ASC' },
  });
  if (named !== null && lakes.length !== new Set(named).size) throw notFound('lake');
  return lakes.map(({ id }) => id);
}

// The pegs are looked up of rows already locked, so that a booking moved meanwhile is seen where it went.
const LOCK = `
  SELECT b.id FROM booking b
   WHERE b.fishery_id = $1 AND b.during && $2::tstzrange
     AND b.status IN ('hold', 'pending_payment', 'confirmed', 'checked_in') ORDER BY b.id FOR NO KEY UPDATE`;

const HITS = `
  SELECT b.id, b.status, b.holder_name AS holder, coalesce(a.email, b.holder_email) AS email, b.code,
         b.lake_id AS "lakeId", coalesce(l.name, '') AS "lakeName", b.ticket_type_id AS "ticketTypeId",
         lower(b.during) AS "from", upper(b.during) AS until, b.details, b.currency,
         coalesce(k.details->'duration'->>'kind' = 'season', false) AS season,
         (SELECT coalesce(jsonb_agg(jsonb_build_object('pegId', t.peg_id, 'number', p.number, 'people', t.people,
            'rods', t.rods, 'turnaroundMinutes', extract(epoch FROM t.turnaround)::int / 60) ORDER BY t.peg_id), '[]')
            FROM peg_time t LEFT JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = b.id) AS pegs,
         (SELECT coalesce(sum(amount_pence), 0)::int FROM payment WHERE booking_id = b.id AND status = 'captured')
         - (SELECT coalesce(sum(amount_pence), 0)::int FROM refund
             WHERE booking_id = b.id AND status IN ('queued', 'done', 'failed')) AS "paidPence"
    FROM booking b
    LEFT JOIN account a ON a.id = b.account_id
    LEFT JOIN lake l ON l.id = b.lake_id
    LEFT JOIN ticket_type k ON k.id = b.ticket_type_id
   WHERE b.fishery_id = $1 AND b.during && $2::tstzrange
     AND b.status IN ('hold', 'pending_payment', 'confirmed', 'checked_in')
   ORDER BY lower(b.during), b.id`;

type Row = Omit<Hit, 'bite' | 'lakeId'> & { lakeId: string | null };
type Over = { fisheryId: string; closure: Closure; lakeIds: readonly string[]; zone: string };

/** Every booking in the way of a closure. `lock` holds their rows still until the deed is done. */
export async function hitsOf(
  tx: EntityManager,
  { fisheryId, closure, lakeIds, zone }: Over,
  lock: boolean,
): Promise<Hit[]> {
  const range = rangeOf(closure.from, closure.until);
  if (lock) await tx.query(LOCK, [fisheryId, range]);
  const rows: Row[] = await tx.query(HITS, [fisheryId, range]);
  return rows.flatMap((row): Hit[] => {
    const lakeId = row.lakeId ?? lakeIds[0]; // good on every lake: on a closed one too
    if (lakeId === undefined) return [];
    const { from, until, season } = row;
    const spots = row.pegs.length > 0 ? row.pegs : [{ pegId: null }];
    const bites = spots.map(({ pegId }) => affects(closure, { lakeId, pegId, from, until, season }, zone));
    const bite = GRAVEST.find((each) => bites.includes(each));
    return bite === undefined ? [] : [{ ...row, lakeId, bite }];
  });
}

const GRAVEST = ['refund', 'choose', 'keep_out', 'warn', 'tell'] as const;
