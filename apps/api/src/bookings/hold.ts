import { Account } from '@mereward/db/entities/accounts/account';
import type { BookedTicket, BookingDetails, HoldPegs } from '@mereward/shared/bookings/contract';
import { holdFrom } from '@mereward/shared/bookings/hold';
import type { LettingTerms } from '@mereward/shared/bookings/letting-terms';
import { grossOf } from '@mereward/shared/tickets/ticket-price';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { mustRepeat } from '../repeat';
import { refuseUnlet } from './let-faults';
import { expireLater, letGoOfExpired } from './let-go';
import { occasionOf, type Occasion } from './occasion';
import { placePegs } from './place-pegs';
import { refuseFaulty, sellFaults } from './sell-faults';
import { tell, type Stay } from './stay';
import { termsOf } from './terms';

/** Takes the pegs for some minutes, all of them or none. The same id and content again is done already. */
export async function holdPegs(ctx: Ctx, input: HoldPegs): Promise<void> {
  const { tx, actor, now } = ctx;
  const accountId = accountOf(actor);
  if (await isRepeat(tx, { ...input, accountId })) return;
  const account = await tx.findOneByOrFail(Account, { id: accountId });
  const occasion = await occasionOf(ctx, input);
  await refuseUnlet(ctx, { ...occasion, pegs: occasion.tickets.map(({ peg }) => peg) });
  const said = NOTHING_SAID;
  const buyer = { accountId, name: account.name, bookingId: input.id, said };
  refuseFaulty(await sellFaults(ctx, occasion, { buyer, leniency: 'asked_later' }));
  const terms = await termsOf(tx, occasion.fisheryId);
  const { until } = holdFrom(now, terms.holdMinutes);
  await letGoOfExpired(ctx, occasion.lake.id);
  const booking: NewBooking = {
    id: input.id,
    accountId,
    holderName: account.name,
    holderEmail: account.email,
    status: 'hold',
    holdUntil: until,
    source: 'web',
    details: detailsOf(occasion, { terms, said }),
  };
  if (!(await insertBooking(ctx, occasion, booking))) {
    if (await isRepeat(tx, { ...input, accountId })) return;
    throw new Problem('conflict', 'The ticket could not be numbered', { detail: 'Send it once more.' });
  }
  await place(ctx, occasion, { bookingId: input.id, state: 'held' });
  await tell(ctx, input.id, { kind: 'held', until: until.toISOString() });
  await expireLater(ctx, input.id, until);
}

export type Said = Pick<BookingDetails, 'guardian' | 'vehicle' | 'emergencyContact' | 'licence' | 'note'>;
export const NOTHING_SAID: Said = {
  guardian: null,
  vehicle: '',
  emergencyContact: '',
  licence: null,
  note: '',
};

/** What travels with the booking: what was chosen, its price and the way of cancelling as they stand now. */
export function detailsOf(
  occasion: Occasion,
  { terms, said }: { terms: LettingTerms; said: Said },
): BookingDetails {
  const names = [...new Set(occasion.tickets.map(({ type }) => type.details.name))];
  return {
    ticketName: names.join(', '),
    day: occasion.day,
    start: occasion.start,
    tickets: occasion.tickets.map(({ ticket }) => ticket),
    lines: occasion.lines,
    turnaroundMinutes: occasion.turnaroundMinutes,
    cancellation: terms.cancellation,
    ...said,
  };
}

export type NewBooking = Pick<
  Stay,
  'id' | 'accountId' | 'holderName' | 'holderEmail' | 'status' | 'holdUntil' | 'source' | 'details'
>;

/** Inserts the booking without its pegs, unless its id is there; answers whether it did. */
export async function insertBooking(
  { tx, actor, now }: Ctx,
  at: Occasion,
  booking: NewBooking,
): Promise<boolean> {
  const count = (of: (ticket: BookedTicket) => number): number =>
    at.tickets.reduce((sum, { ticket }) => sum + of(ticket), 0);
  const rows: unknown[] = await tx.query(
    `INSERT INTO booking (id, fishery_id, lake_id, ticket_type_id, account_id, holder_name, holder_email, during, status,
                          people, rods, gross_pence, currency, hold_until, source, details, written_by, written_at)
     VALUES ($1, $2, $3, $4, $5, $6, $7, tstzrange($8, $9, '[)'), $10, $11, $12, $13, $14, $15, $16, $17, $18, $19)
     ON CONFLICT DO NOTHING RETURNING id`,
    [
      booking.id,
      at.fisheryId,
      at.lake.id,
      at.tickets[0]?.type.id ?? null,
      booking.accountId,
      booking.holderName,
      booking.holderEmail,
      at.hours.from,
      at.hours.until,
      booking.status,
      count(({ people }) => people),
      count(({ rods }) => rods),
      grossOf(at.lines),
      at.currency,
      booking.holdUntil,
      booking.source,
      booking.details,
      accountOf(actor),
      now,
    ],
  );
  return rows.length === 1;
}

/** Its pegs into the calendar; a season ticket takes none. */
export async function place(
  ctx: Ctx,
  occasion: Occasion,
  { bookingId, state }: { bookingId: string; state: 'held' | 'taken' },
): Promise<void> {
  if (!occasion.season) await placePegs(ctx, { ...occasion, bookingId, state });
}

type Sent = HoldPegs & { accountId: string };

/** What was sent to hold; names and births may have been filled in since. */
export const heldContent = ({
  lakeId,
  day,
  start,
  tickets,
}: Pick<Sent, 'lakeId' | 'day' | 'start' | 'tickets'>) => ({
  lakeId,
  day,
  start,
  tickets: tickets.map(({ ticketTypeId, pegId, rods, people, kind }) => ({
    ticketTypeId,
    pegId,
    rods,
    people,
    kind,
  })),
});

async function isRepeat(tx: EntityManager, sent: Sent): Promise<boolean> {
  const rows: { by: string; lakeId: string; details: BookingDetails }[] = await tx.query(
    'SELECT written_by AS by, lake_id AS "lakeId", details FROM booking WHERE id = $1',
    [sent.id],
  );
  const [found] = rows;
  if (!found) return false;
  const { by, lakeId, details } = found;
  mustRepeat(
    { by: sent.accountId, content: heldContent(sent) },
    { by, content: heldContent({ ...details, lakeId }) },
  );
  return true;
}
