import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import { Booking } from '@mereward/db/entities/bookings/booking';
import type { WriteTicket } from '@mereward/shared/bookings/contract';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg } from '../lakes/found';
import { mustRepeat } from '../repeat';
import { TICKET_WRITERS } from './policy';

const LONGEST_MS = 31 * 86_400_000;
/** Farther ahead it is a slip in the year: nobody lets a peg years before its prices and rules are known. */
const AHEAD_MS = 2 * 366 * 86_400_000;

/** Writes a ticket at the lodge. The database keeps a peg from being let twice; the later of two is told so. */
export async function writeTicket(ctx: Ctx, pegId: string, input: WriteTicket): Promise<void> {
  const { tx, actor, now } = ctx;
  const { peg, lake } = await findPeg(tx, pegId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'peg' }, TICKET_WRITERS);
  const times = { from: new Date(input.from), until: new Date(input.until) };
  refuseTimes(times, now);
  const holder = await tx.findOneBy(Account, { email: input.email });
  if (!holder)
    throw new Problem('invalid', 'Nobody has signed up with this e-mail address', {
      detail: 'Look at the spelling, or ask the visitor to sign up first. Nothing was written.',
      errors: [{ pointer: '/email', detail: 'No account has this address.' }],
    });
  const written = { id: input.id, pegId, accountId: holder.id, ...times, writtenBy: accountOf(actor) };
  if (await isRepeat(tx, written)) return;
  await refuseUnlet(ctx, { peg, lake }, times);
  if (await insertTicket(tx, written, now)) return;
  if (await isRepeat(tx, written)) return;
  throw new Problem('conflict', `Peg ${peg.number} is let already for part of that time`, {
    detail: 'Nothing was written. Choose another time or another peg.',
  });
}

type Times = { from: Date; until: Date };
type Written = Times & { id: string; pegId: string; accountId: string; writtenBy: string };

function refuseTimes({ from, until }: Times, now: Date): void {
  const refuse = (pointer: string, title: string) => {
    throw new Problem('invalid', title, {
      detail: 'Nothing was written. Put the time right and write it again.',
      errors: [{ pointer, detail: title }],
    });
  };
  if (until <= from) refuse('/until', 'A ticket must end after it starts');
  if (until.getTime() - from.getTime() > LONGEST_MS) refuse('/until', 'A ticket may run for at most 31 days');
  if (until <= now) refuse('/until', 'That time is over already');
  if (from.getTime() - now.getTime() > AHEAD_MS) refuse('/from', 'A ticket starts at most two years ahead');
}

/** Reasons of the peg and the lake against letting it then. */
async function refuseUnlet({ tx }: Ctx, at: { peg: Peg; lake: Lake }, { from, until }: Times): Promise<void> {
  const { details, number } = at.peg;
  const refuse = (title: string) => {
    throw new Problem('conflict', title, {
      detail: 'Nothing was written. Choose another peg or another time.',
    });
  };
  const under = whyNotLet(details);
  if (under) refuse(under);
  const { zone } = await tx.findOneByOrFail(Fishery, { id: at.lake.fisheryId });
  const lastDay = civilDay(new Date(until.getTime() - 1), zone);
  const firstDay = civilDay(from, zone);
  const shut =
    details.status === 'closed' && (details.statusUntil === null || firstDay <= details.statusUntil);
  if (shut) refuse(`Peg ${number} is closed: ${details.statusReason}`);
  if (!at.lake.details.nights && firstDay !== lastDay)
    refuse(`There is no night fishing on ${at.lake.name}: a ticket ends on the day it starts`);
}

/** Inserts unless an overlapping ticket or the same id is there: a plain insert against an exclusion can deadlock. */
async function insertTicket(tx: EntityManager, written: Written, now: Date): Promise<boolean> {
  const rows: unknown[] = await tx.query(
    `INSERT INTO booking (id, peg_id, account_id, during, status, written_by, written_at)
     VALUES ($1, $2, $3, tstzrange($4, $5, '[)'), 'confirmed', $6, $7)
     ON CONFLICT DO NOTHING RETURNING id`,
    [written.id, written.pegId, written.accountId, written.from, written.until, written.writtenBy, now],
  );
  return rows.length === 1;
}

async function isRepeat(tx: EntityManager, written: Written): Promise<boolean> {
  const rows: (Written & { status: Booking['status'] })[] = await tx.query(
    `SELECT status, id, peg_id AS "pegId", account_id AS "accountId", lower(during) AS "from", upper(during) AS until,
            written_by AS "writtenBy"
       FROM booking WHERE id = $1`,
    [written.id],
  );
  const [found] = rows;
  if (!found) return false;
  const { status, ...kept } = found;
  if (kept.pegId !== written.pegId) throw notFound('ticket');
  mustRepeat({ by: written.writtenBy, content: written }, { by: kept.writtenBy, content: kept });
  if (status === 'cancelled')
    throw new Problem('conflict', 'This ticket was cancelled', {
      detail: 'Write a new one if it is wanted.',
    });
  return true;
}

/** Cancels a ticket: those who write them at any time, its holder until it starts. */
export async function cancelTicket({ tx, actor, now }: Ctx, bookingId: string): Promise<void> {
  const accountId = accountOf(actor);
  const booking = await tx.findOneBy(Booking, { id: bookingId });
  if (!booking || booking.status === 'cancelled') throw notFound('ticket');
  const { lake } = await findPeg(tx, booking.pegId);
  if (!holdsAny(actor, lake.fisheryId, TICKET_WRITERS)) {
    if (booking.accountId !== accountId) throw notFound('ticket');
    if (!(await isAhead(tx, bookingId, now)))
      throw new Problem('forbidden', 'This ticket has started', { detail: 'Ask the fishery’s office.' });
  }
  await tx.update(Booking, { id: bookingId, status: 'confirmed' }, { status: 'cancelled' });
}

async function isAhead(tx: EntityManager, bookingId: string, now: Date): Promise<boolean> {
  const rows: { ahead: boolean }[] = await tx.query(
    `SELECT lower(during) > $2 AS ahead FROM booking WHERE id = $1`,
    [bookingId, now],
  );
  return rows[0]?.ahead === true;
}
