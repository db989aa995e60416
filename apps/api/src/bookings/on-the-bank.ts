import { mayBeNoShow } from '@mereward/shared/bookings/hold';
import { READING_WORDS } from '@mereward/shared/rules/reading';
import { Problem } from '@mereward/shared/problems/problem';
import type { Interval } from '@mereward/shared/time/interval';
import type { Ctx } from '../ctx';
import { readingsOf } from '../rules/readings';
import { allow, lockBooking, type Reached } from './access';
import { occasionOf } from './occasion';
import { freePegs } from './peg-calendar';
import { placePegs } from './place-pegs';
import { noStep, step, tell, type Stay } from './stay';
import { termsOf } from './terms';

const onTheBank = ({ standing }: Reached): void =>
  allow(standing.holder || standing.checks, 'its holder and the bailiffs');

/** Somebody else's ticket: nobody judges their own. */
const overOthers = ({ standing }: Reached): void =>
  allow(standing.checks && !standing.holder, 'a bailiff or the office, and not on one’s own ticket');

/** Refuses a deed outside the hours of the ticket. */
export function refuseOutside({ from, until }: Interval, now: Date): void {
  if (now < from)
    throw new Problem('conflict', 'This ticket has not begun', { detail: 'Come back when its hours begin.' });
  if (now >= until) throw new Problem('conflict', 'This ticket is over', { detail: 'Nothing was changed.' });
}

/** They are there. Whoever was taken for a no-show gets the peg back if nobody else has it. */
export async function checkIn(ctx: Ctx, bookingId: string): Promise<void> {
  const reached = await lockBooking(ctx, bookingId);
  onTheBank(reached);
  const { stay } = reached;
  if (stay.status === 'checked_in') return;
  if (stay.status !== 'confirmed' && stay.status !== 'no_show') throw noStep(stay.status);
  refuseOutside(stay, ctx.now);
  await refuseUnread(ctx, bookingId);
  if (stay.status === 'no_show') await takeBack(ctx, stay);
  const by = reached.standing.holder ? 'holder' : 'staff';
  await step(ctx, stay, { to: 'checked_in', kind: 'checked-in', told: { by } });
}

async function refuseUnread({ tx }: Ctx, bookingId: string): Promise<void> {
  const reading = (await readingsOf(tx, [bookingId])).get(bookingId);
  if (!reading?.needed || reading.blocks === 'nothing') return;
  throw new Problem('conflict', READING_WORDS[reading.blocks], {
    detail:
      'Read the rules on the ticket, or let a bailiff read them aloud and write that down; then check in.',
  });
}

/** A no-show's pegs, where they were let go of and nobody has taken them since. */
async function takeBack(ctx: Ctx, stay: Stay): Promise<void> {
  const rows: unknown[] = await ctx.tx.query('SELECT 1 FROM peg_time WHERE booking_id = $1', [stay.id]);
  if (rows.length > 0 || stay.details.tickets.length === 0 || stay.lakeId === null) return;
  const { details, lakeId, until } = stay;
  const wanted = { lakeId, day: details.day, start: details.start, tickets: details.tickets };
  const occasion = await occasionOf(ctx, wanted, { sold: true });
  const hours = { from: ctx.now, until };
  await placePegs(ctx, { ...occasion, hours, bookingId: stay.id, state: 'taken' });
}

/** Nobody has come by some hours after the start. The peg stays theirs until it is let go of. */
export async function markNoShow(ctx: Ctx, bookingId: string): Promise<void> {
  const reached = await lockBooking(ctx, bookingId);
  overOthers(reached);
  const { stay } = reached;
  if (stay.status === 'no_show') return;
  if (stay.status !== 'confirmed') throw noStep(stay.status);
  refuseOutside(stay, ctx.now);
  const { noShowHours } = await termsOf(ctx.tx, stay.fisheryId);
  if (!mayBeNoShow(stay.from, ctx.now, noShowHours))
    throw new Problem('conflict', 'It is too early to say that nobody came', {
      detail: `A ticket is a no-show ${noShowHours === 1 ? 'an hour' : `${noShowHours} hours`} after its start.`,
    });
  await step(ctx, stay, { to: 'no_show', kind: 'no-show' });
}

/** Lets the peg of a no-show to others. */
export async function letPegGo(ctx: Ctx, bookingId: string): Promise<void> {
  const reached = await lockBooking(ctx, bookingId);
  overOthers(reached);
  const { stay } = reached;
  if (stay.status !== 'no_show') throw noStep(stay.status);
  const rows: unknown[] = await ctx.tx.query('SELECT 1 FROM peg_time WHERE booking_id = $1', [bookingId]);
  if (rows.length === 0) return;
  await freePegs(ctx.tx, bookingId);
  await tell(ctx, bookingId, { kind: 'peg-let-go' });
}

/** They have packed up: the peg is free once it has been kept for its turnaround. */
export async function finishEarly(ctx: Ctx, bookingId: string): Promise<void> {
  const { tx, now } = ctx;
  const reached = await lockBooking(ctx, bookingId);
  onTheBank(reached);
  const { stay } = reached;
  if (stay.status === 'completed') return;
  if (stay.status !== 'confirmed' && stay.status !== 'checked_in') throw noStep(stay.status);
  refuseOutside(stay, now);
  if (now.getTime() === stay.from.getTime())
    throw new Problem('conflict', 'This ticket begins just now', { detail: 'Cancel it instead.' });
  const told = { wasUntil: stay.until.toISOString() };
  await step(ctx, stay, { to: 'completed', kind: 'finished', change: { until: now }, told });
  await tx.query('DELETE FROM peg_time WHERE booking_id = $1 AND lower(during) >= $2', [bookingId, now]);
  await tx.query(
    `UPDATE peg_time SET during = tstzrange(lower(during), least(upper(during), $2::timestamptz + turnaround), '[)')
      WHERE booking_id = $1`,
    [bookingId, now],
  );
}
