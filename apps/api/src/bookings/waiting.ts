import { WaitingEntry } from '@mereward/db/entities/bookings/waiting-entry';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import { FreeAsked, type FreePegs } from '@mereward/shared/bookings/availability-contract';
import type { WaitingWish } from '@mereward/shared/bookings/contract';
import type { JoinWaiting, WaitingList, WaitingView } from '@mereward/shared/bookings/waiting-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { findLake } from '../lakes/found';
import { mustRepeat } from '../repeat';
import { availability } from './availability';
import { letGoOfHold } from './let-go';
import { lockStay } from './stay';

/** Joins the line for a lake’s day, at its end. Nobody waits for what they could have at once. */
export async function joinWaiting(ctx: Ctx, lakeId: string, input: JoinWaiting): Promise<void> {
  const { tx, now, actor } = ctx;
  const accountId = accountOf(actor);
  const lake = await findLake(tx, lakeId);
  const content = { lakeId, day: input.day, wish: input.wish };
  if (await isRepeat(tx, { id: input.id, accountId, content })) return;
  refuseNeedless(await freeFor(ctx, { fisheryId: lake.fisheryId, lakeId, ...input }), input.wish);
  const rows: unknown[] = await tx.query(
    `INSERT INTO waiting_entry (id, fishery_id, lake_id, account_id, day, wish, joined_at, status)
     VALUES ($1, $2, $3, $4, $5, $6, $7, 'waiting') ON CONFLICT DO NOTHING RETURNING id`,
    [input.id, lake.fisheryId, lakeId, accountId, input.day, input.wish, now],
  );
  if (rows.length === 1 || (await isRepeat(tx, { id: input.id, accountId, content }))) return;
  throw new Problem('conflict', 'You are waiting for that day already', {
    detail: 'Your place is kept. Leave that line first if you wish for something else.',
  });
}

type Asked = { fisheryId: string; lakeId: string; day: string; wish: WaitingWish };

async function freeFor(ctx: Ctx, { fisheryId, lakeId, day, wish }: Asked): Promise<FreePegs> {
  const type = await ctx.tx.findOneBy(TicketType, { id: wish.ticketTypeId, fisheryId });
  if (!type || type.withdrawnAt !== null)
    throw unfit('/wish/ticketTypeId', 'This kind of ticket is not sold here');
  if (!type.details.lakeIds.includes(lakeId))
    throw unfit('/wish/ticketTypeId', 'This kind of ticket is not sold for that lake');
  const { start } = wish;
  const asked = FreeAsked.parse({
    ...{ day, lakeId, ticketTypeId: wish.ticketTypeId, rods: Math.max(1, wish.rods) },
    ...(start === null ? {} : { start }),
  });
  const free = await availability(ctx, fisheryId, asked);
  if (free.whyNot !== null) throw unfit('/day', free.whyNot);
  const unknown = wish.pegIds.findIndex((id) => !free.pegs.some(({ pegId }) => pegId === id));
  if (unknown >= 0)
    throw unfit(`/wish/pegIds/${unknown}`, 'This ticket does not reach that peg, or it has too little room');
  return free;
}

const unfit = (pointer: string, title: string): Problem =>
  new Problem('invalid', title, {
    detail: 'You were not put in a line. Choose something else.',
    errors: [{ pointer, detail: title }],
  });

function refuseNeedless({ pegs }: FreePegs, { pegIds }: WaitingWish): void {
  const free = pegs.filter(
    ({ pegId, state }) => state === 'free' && (pegIds.length === 0 || pegIds.includes(pegId)),
  );
  if (free.length === 0) return;
  const numbers = free.slice(0, 5).map(({ number }) => number);
  throw new Problem('conflict', `Free just now: ${numbers.join(', ')}`, {
    detail: 'Nobody needs to wait for these. Book one.',
  });
}

type Sent = { id: string; accountId: string; content: object };

async function isRepeat(tx: EntityManager, { id, accountId, content }: Sent): Promise<boolean> {
  const kept = await tx.findOneBy(WaitingEntry, { id });
  if (!kept) return false;
  const { lakeId, day, wish } = kept;
  mustRepeat({ by: accountId, content }, { by: kept.accountId, content: { lakeId, day, wish } });
  return true;
}

const MINE = `
  SELECT w.id, w.fishery_id AS "fisheryId", f.name AS "fisheryName", w.lake_id AS "lakeId", l.name AS "lakeName", f.zone,
         w.day::text AS day, w.wish, coalesce(t.details->>'name', '') AS "ticketName", w.status, w.joined_at AS "joinedAt",
         CASE WHEN w.status IN ('offered', 'claimed') THEN w.booking_id END AS "bookingId", w.claim_until AS "claimUntil",
         ARRAY (SELECT p.number FROM peg p WHERE w.wish->'pegIds' ? p.id::text AND p.lake_id = w.lake_id
                 ORDER BY p.walking_order) AS pegs,
         CASE WHEN w.status IN ('waiting', 'offered') THEN (
           SELECT count(*)::int FROM waiting_entry o WHERE o.lake_id = w.lake_id AND o.day = w.day
              AND o.status IN ('waiting', 'offered') AND o.place <= w.place) END AS place
    FROM waiting_entry w JOIN lake l ON l.id = w.lake_id JOIN fishery f ON f.id = w.fishery_id
    LEFT JOIN ticket_type t ON t.id = (w.wish->>'ticketTypeId')::uuid
   WHERE w.account_id = $1`;

type Row = Omit<WaitingView, 'joinedAt' | 'claimUntil'> & { joinedAt: Date; claimUntil: Date | null };

const view = (row: Row, now: Date): WaitingView => {
  const over = row.status === 'waiting' && row.day < civilDay(now, row.zone);
  return {
    ...row,
    ...(over ? { status: 'passed' as const, place: null } : {}),
    joinedAt: row.joinedAt.toISOString(),
    claimUntil: row.claimUntil?.toISOString() ?? null,
  };
};

/** The lines the reader stands in, for days to come and the last few. Nobody sees another’s place. */
export async function myWaiting({ tx, actor, now }: Ctx): Promise<WaitingList> {
  const rows: Row[] = await tx.query(
    `${MINE} AND w.day >= ($2::timestamptz - interval '3 days')::date AND w.status <> 'left' ORDER BY w.day, w.place`,
    [accountOf(actor), now],
  );
  return { waiting: rows.map((row) => view(row, now)) };
}

/** One place of the reader’s own. */
export async function waitingView({ tx, actor, now }: Ctx, waitingId: string): Promise<WaitingView> {
  const rows: Row[] = await tx.query(`${MINE} AND w.id = $2`, [accountOf(actor), waitingId]);
  const [row] = rows;
  if (!row) throw notFound('place in a line');
  return view(row, now);
}

async function ownEntry({ tx, actor }: Ctx, id: string): Promise<WaitingEntry> {
  const entry = await tx.findOneBy(WaitingEntry, { id, accountId: accountOf(actor) });
  if (!entry) throw notFound('place in a line');
  return entry;
}

/** Leaves the line, and lets go of what is offered; a second time changes nothing. */
export async function leaveWaiting(ctx: Ctx, waitingId: string): Promise<void> {
  const entry = await ownEntry(ctx, waitingId);
  if (entry.bookingId !== null && entry.status === 'offered')
    await letGoOfHold(ctx, await lockStay(ctx.tx, entry.bookingId));
  await ctx.tx.query(
    `UPDATE waiting_entry SET status = 'left', claim_until = NULL
      WHERE id = $1 AND status IN ('waiting', 'offered')`,
    [waitingId],
  );
}

/** Lets an offer go by: the peg goes to the next in line, the place in it is kept. A second time changes nothing. */
export async function passOffer(ctx: Ctx, waitingId: string): Promise<void> {
  const entry = await ownEntry(ctx, waitingId);
  if (entry.status === 'waiting') return;
  if (entry.status !== 'offered' || entry.bookingId === null)
    throw new Problem('conflict', 'There is no offer to let go by', {
      detail: 'Reload to see how it stands.',
    });
  await letGoOfHold(ctx, await lockStay(ctx.tx, entry.bookingId));
}
