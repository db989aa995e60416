import { Account } from '@mereward/db/entities/accounts/account';
import type { WaitingWish } from '@mereward/shared/bookings/contract';
import { claimWindow } from '@mereward/shared/bookings/waiting-list';
import { Problem } from '@mereward/shared/problems/problem';
import { overlaps, type Interval } from '@mereward/shared/time/interval';
import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Actor, Ctx } from '../ctx';
import { detailsOf, insertBooking, NOTHING_SAID, place } from './hold';
import { refuseUnlet } from './let-faults';
import { expireLater, letGoOfExpired } from './let-go';
import { occasionOf } from './occasion';
import { refuseFaulty, sellFaults } from './sell-faults';
import { tell } from './stay';
import { termsOf } from './terms';
import { postOffer } from './waiting-letters';

/** A peg (none: a place on the lake) that came free for a while. */
export type Freed = Interval & { id: string; lakeId: string; pegId: string | null; bookingId: string | null };

type Entry = { id: string; accountId: string; fisheryId: string; day: string; wish: WaitingWish };

/** Far more than ever wait for one lake; those behind are asked when the next place comes free. */
const MOST_ASKED = 500;

/**
 * Offers what came free to the first in line who can take it: the peg is held for them until their time to claim it
 * is over, and then comes free again for the next. Nobody is asked twice for the same place.
 */
export async function offerFreed(ctx: Ctx, freed: Freed): Promise<void> {
  const { tx } = ctx;
  await tx.query(`SELECT pg_advisory_xact_lock(hashtext('waiting'), hashtext($1))`, [freed.lakeId]);
  const offerOf = (await backInLine(tx, freed.bookingId)) ?? freed.id;
  for (const entry of await lineFor(tx, freed, offerOf))
    if (await offerTo(ctx, { entry, freed, offerOf })) return;
}

/** Whoever let an offer go by waits on where they were; answers the freed place it was about. */
async function backInLine(tx: EntityManager, bookingId: string | null): Promise<string | null> {
  if (bookingId === null) return null;
  const [rows]: [{ offerOf: string }[], number] = await tx.query(
    `UPDATE waiting_entry SET status = 'waiting', claim_until = NULL, booking_id = NULL,
            passed_over = array_append(passed_over, offer_of)
      WHERE booking_id = $1 AND status = 'offered' RETURNING offer_of AS "offerOf"`,
    [bookingId],
  );
  if (rows[0]) return rows[0].offerOf;
  const left: { offerOf: string | null }[] = await tx.query(
    `SELECT offer_of AS "offerOf" FROM waiting_entry WHERE booking_id = $1 AND status = 'left'`,
    [bookingId],
  );
  return left[0]?.offerOf ?? null;
}

/** Who waits for something that this place could be, in the order they came. */
async function lineFor(tx: EntityManager, freed: Freed, offerOf: string): Promise<Entry[]> {
  return tx.query(
    `SELECT id, account_id AS "accountId", fishery_id AS "fisheryId", day::text AS day, wish FROM waiting_entry
      WHERE lake_id = $1 AND status = 'waiting' AND NOT $2 = ANY (passed_over)
        AND day BETWEEN $3::timestamptz::date - 4 AND coalesce($4::timestamptz, 'infinity')::date + 1
        AND ($5::text IS NULL OR jsonb_array_length(wish->'pegIds') = 0 OR wish->'pegIds' ? $5)
      ORDER BY place LIMIT ${MOST_ASKED}`,
    [
      freed.lakeId,
      offerOf,
      freed.from,
      Number.isFinite(freed.until.getTime()) ? freed.until : null,
      freed.pegId,
    ],
  );
}

type Offer = { entry: Entry; freed: Freed; offerOf: string };

/** Holds the place for one of them, or leaves everything as it was when they can’t take it. */
async function offerTo(ctx: Ctx, offer: Offer): Promise<boolean> {
  const actor: Actor = { kind: 'account', id: offer.entry.accountId, roles: new Map() };
  try {
    return await ctx.tx.transaction((tx) => holdFor({ ...ctx, tx, actor }, offer));
  } catch (error) {
    if (error instanceof Problem) return false; // taken meanwhile, or not to be sold to them
    throw error;
  }
}

async function holdFor(ctx: Ctx, { entry, freed, offerOf }: Offer): Promise<boolean> {
  const { tx, now } = ctx;
  const { wish, day, accountId } = entry;
  const account = await tx.findOneByOrFail(Account, { id: accountId });
  const choosesPeg = await takesPeg(tx, wish);
  if (choosesPeg && freed.pegId === null) return false;
  const occasion = await occasionOf(ctx, {
    lakeId: freed.lakeId,
    day,
    start: wish.start,
    tickets: [
      {
        ...{
          ticketTypeId: wish.ticketTypeId,
          pegId: choosesPeg ? freed.pegId : null,
          rods: Math.max(1, wish.rods),
        },
        ...{ people: 1, kind: 'holder' as const, name: account.name, bornOn: null },
      },
    ],
  });
  if (!overlaps(occasion.hours, freed)) return false;
  const terms = await termsOf(tx, occasion.fisheryId);
  const { claimMinutes } = terms;
  const window = claimWindow(now, { start: occasion.hours.from, zone: occasion.zone, claimMinutes });
  if (!window) return false;
  await refuseUnlet(ctx, { ...occasion, pegs: occasion.tickets.map(({ peg }) => peg) });
  const id = randomUUID();
  const said = NOTHING_SAID;
  const buyer = { accountId, name: account.name, bookingId: id, said };
  refuseFaulty(await sellFaults(ctx, occasion, { buyer, leniency: 'asked_later' }));
  await letGoOfExpired(ctx, freed.lakeId);
  await insertBooking(ctx, occasion, {
    ...{ id, accountId, holderName: account.name, holderEmail: account.email },
    ...{ status: 'hold' as const, holdUntil: window.until, source: 'web' as const },
    details: detailsOf(occasion, { terms, said }),
  });
  await place(ctx, occasion, { bookingId: id, state: 'held' });
  await tx.query(
    `UPDATE waiting_entry SET status = 'offered', booking_id = $2, claim_until = $3, offer_of = $4 WHERE id = $1`,
    [entry.id, id, window.until, offerOf],
  );
  await tell(ctx, id, {
    kind: 'offered',
    from: window.from.toISOString(),
    until: window.until.toISOString(),
  });
  await expireLater(ctx, id, window.until);
  await postOffer(ctx, { occasion, account, bookingId: id, window });
  return true;
}

async function takesPeg(tx: EntityManager, { ticketTypeId }: WaitingWish): Promise<boolean> {
  const rows: { choosesPeg: boolean }[] = await tx.query(
    `SELECT details->>'pegChoice' = 'book_a_peg' AS "choosesPeg" FROM ticket_type WHERE id = $1`,
    [ticketTypeId],
  );
  return rows[0]?.choosesPeg === true;
}
