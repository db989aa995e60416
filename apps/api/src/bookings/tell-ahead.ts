import { civilDay } from '@mereward/shared/time/civil-day';
import { addDays, instantOf } from '@mereward/shared/time/zoned';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Ctx } from '../ctx';
import { ctxOf } from '../http/ctx-of';
import type { Handler } from '../jobs/worker';
import { latestReading } from '../lakes/levels';
import { post } from '../mail/send';
import { rulesUrlOf } from './post-ticket';
import { lockStay, ranOut, tell } from './stay';
import { holdEndsLetter, tomorrowLetter, type Eve } from './ticket-letters';
import { ticketPaper } from './ticket-paper';
import { zonedWords } from './ticket-words';

const HoldEnding = z.strictObject({ bookingId: z.uuid(), until: z.iso.datetime() });
const Tomorrow = z.strictObject({ bookingId: z.uuid(), day: z.iso.date() });

/** So long before a hold runs out its holder is told. Common practice, no published source. */
const WARNING_MS = 3 * 60_000;
/** When the letter of the evening before leaves, by the fishery's clock: before the quiet hours, after work. */
const EVE_CLOCK = '18:00';

/** Looks at a hold again shortly before it runs out; one no longer than the warning has none. */
export async function warnLater(ctx: Ctx, bookingId: string, until: Date): Promise<void> {
  const afterSeconds = (until.getTime() - WARNING_MS - ctx.now.getTime()) / 1000 + 1;
  if (afterSeconds <= 1) return;
  const payload = { bookingId, until: until.toISOString() };
  await ctx.jobs.later(ctx.tx, { name: 'booking.warn', payload, afterSeconds });
}

/** Tells the holder of an unpaid hold that it runs out; one that was paid, let go of or made longer is left alone. */
export const warnHoldJob: Handler = async ({ payload }, server) => {
  const { bookingId, until } = HoldEnding.parse(payload);
  await server.source.transaction(async (tx) => {
    const ctx = ctxOf(server, tx);
    const stay = await lockStay(tx, bookingId);
    const open = stay.status === 'hold' || stay.status === 'pending_payment';
    if (!open || ranOut(stay, ctx.now) || stay.holdUntil?.toISOString() !== until) return;
    if (stay.holdUntil.getTime() - ctx.now.getTime() > WARNING_MS) return;
    if (await wasTold(tx, bookingId, { kind: 'told-hold-ends', until })) return;
    const paper = await ticketPaper(ctx, bookingId);
    const { email } = paper;
    if (!email || paper.grossPence <= paper.paidPence) return;
    await tell(ctx, bookingId, { kind: 'told-hold-ends', until });
    await post(ctx, holdEndsLetter({ ...paper, email }, stay.holdUntil));
  });
};

/** Sets the letter of the evening before; a ticket bought after that has had its letter already. */
export async function tellTomorrowLater(ctx: Ctx, bookingId: string): Promise<void> {
  const { from, zone } = await ticketPaper(ctx, bookingId);
  const day = civilDay(from, zone);
  const at = instantOf(`${addDays(day, -1)}T${EVE_CLOCK}`, zone).at;
  const afterSeconds = (at.getTime() - ctx.now.getTime()) / 1000;
  if (afterSeconds <= 0) return;
  await ctx.jobs.later(ctx.tx, { name: 'booking.eve', payload: { bookingId, day }, afterSeconds });
}

/** Writes on the eve of a ticket, once for each day it was moved to; nothing for one that is good no more. */
export const tellTomorrowJob: Handler = async ({ payload }, server) => {
  const { bookingId, day } = Tomorrow.parse(payload);
  await server.source.transaction(async (tx) => {
    const ctx = ctxOf(server, tx);
    const stay = await lockStay(tx, bookingId);
    const paper = await ticketPaper(ctx, bookingId);
    const { email, zone, lakeId, from } = paper;
    const eve = civilDay(ctx.now, zone) === addDays(day, -1);
    if (!email || stay.status !== 'confirmed' || civilDay(from, zone) !== day || !eve) return;
    if (await wasTold(tx, bookingId, { kind: 'told-eve', day })) return;
    await tell(ctx, bookingId, { kind: 'told-eve', day });
    const news = { level: await levelWords(tx, lakeId, zone), notices: await noticesFor(ctx, paper) };
    const to = { ...paper, email };
    await post(ctx, tomorrowLetter(to, news, rulesUrlOf(ctx, to)));
  });
};

async function wasTold(
  tx: EntityManager,
  bookingId: string,
  { kind, ...about }: { kind: string; [more: string]: string },
): Promise<boolean> {
  const rows: unknown[] = await tx.query(
    'SELECT 1 FROM booking_event WHERE booking_id = $1 AND kind = $2 AND told @> $3::jsonb LIMIT 1',
    [bookingId, kind, about],
  );
  return rows.length > 0;
}

async function levelWords(tx: EntityManager, lakeId: string | null, zone: string): Promise<string | null> {
  const latest = lakeId === null ? null : await latestReading(tx, lakeId);
  if (!latest) return null;
  const { boardCode, boardReadsM, at } = latest;
  return `Board ${boardCode} read ${boardReadsM.toFixed(2)} m on ${zonedWords(at, zone)}.`;
}

/** What the fishery tells ticket holders for the hours of this one, the gravest first. */
async function noticesFor({ tx }: Ctx, { fisheryId, lakeId, from, until }: Stretch): Promise<Eve['notices']> {
  const rows: { title: string; text: string }[] = await tx.query(
    `SELECT details->>'title' AS title, details->>'text' AS text FROM notice
      WHERE fishery_id = $1 AND taken_down_at IS NULL AND during && tstzrange($2, $3, '[)')
        AND (cardinality(lake_ids) = 0 OR $4::uuid IS NULL OR $4 = ANY (lake_ids))
        AND details->>'audience' IN ('public', 'ticket')
      ORDER BY array_position(ARRAY['danger', 'closed', 'caution', 'info'], severity), written_at DESC LIMIT 20`,
    [fisheryId, from, until, lakeId],
  );
  return rows.map(({ title, text }) => `${title}: ${text}`);
}

type Stretch = { fisheryId: string; lakeId: string | null; from: Date; until: Date };
