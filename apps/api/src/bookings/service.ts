import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import type { Booking } from '@mereward/db/entities/bookings/booking';
import { USUAL_CANCELLATION } from '@mereward/shared/bookings/cancellation';
import type { BookingDetails, WriteTicket } from '@mereward/shared/bookings/contract';
import { toldLine } from '@mereward/shared/lakes/lake-places';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg, originOfLake } from '../lakes/found';
import { mustRepeat } from '../repeat';
import { takePegs } from './peg-calendar';
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
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const details = lodgeDetails(civilDay(times.from, zone));
  if (!(await insertTicket(tx, { ...written, holder, lake, details }, now)) && (await isRepeat(tx, written)))
    return;
  const taken = await takePegs(tx, {
    bookingId: input.id,
    lakeId: lake.id,
    ...times,
    turnaroundMinutes: 0,
    state: 'taken',
    pegs: [{ pegId, people: 1, rods: 1 }],
  });
  if (taken.length > 0)
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
  const drawn = { places: at.lake.details.places, origin: originOfLake(at.lake) };
  const under = whyNotLet({ overheadLine: toldLine(details, drawn) });
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

/** What a ticket written at the lodge tells of itself: no type, no price. `day` is its first at the fishery. */
export const lodgeDetails = (day: string): BookingDetails => ({
  ticketName: 'Ticket from the lodge',
  day,
  start: null,
  tickets: [],
  lines: [],
  turnaroundMinutes: 0,
  cancellation: USUAL_CANCELLATION,
  guardian: null,
  vehicle: '',
  emergencyContact: '',
  licence: null,
  note: '',
});

type Ticket = Written & { holder: Account; lake: Lake; details: BookingDetails };

/** Inserts unless the same id is there. */
async function insertTicket(tx: EntityManager, ticket: Ticket, now: Date): Promise<boolean> {
  const rows: unknown[] = await tx.query(
    `INSERT INTO booking (id, fishery_id, lake_id, account_id, holder_name, holder_email, during, status, people, rods,
                          gross_pence, currency, source, details, written_by, written_at)
     VALUES ($1, $2, $3, $4, $5, $6, tstzrange($7, $8, '[)'), 'confirmed', 1, 1, 0, 'GBP', 'office', $9, $10, $11)
     ON CONFLICT DO NOTHING RETURNING id`,
    [
      ticket.id,
      ticket.lake.fisheryId,
      ticket.lake.id,
      ticket.accountId,
      ticket.holder.name,
      ticket.holder.email,
      ticket.from,
      ticket.until,
      ticket.details,
      ticket.writtenBy,
      now,
    ],
  );
  return rows.length === 1;
}

async function isRepeat(tx: EntityManager, written: Written): Promise<boolean> {
  const rows: (Written & { status: Booking['status'] })[] = await tx.query(
    `SELECT b.status, b.id, t.peg_id AS "pegId", b.account_id AS "accountId", lower(b.during) AS "from",
            upper(b.during) AS until, b.written_by AS "writtenBy"
       FROM booking b LEFT JOIN peg_time t ON t.booking_id = b.id WHERE b.id = $1`,
    [written.id],
  );
  const [found] = rows;
  if (!found) return false;
  const { status, ...kept } = found;
  if (kept.writtenBy === written.writtenBy && status !== 'confirmed')
    throw new Problem('conflict', 'This ticket was cancelled', {
      detail: 'Write a new one if it is wanted.',
    });
  if (kept.pegId !== written.pegId) throw notFound('ticket');
  mustRepeat({ by: written.writtenBy, content: written }, { by: kept.writtenBy, content: kept });
  return true;
}
