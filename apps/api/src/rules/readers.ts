import type { ReadersView } from '@mereward/shared/rules/sheet-contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly } from '../http/deny';
import { STAFF } from '../lakes/policy';
import { readingsOf } from './readings';
import { sheetInForce } from './sheet-view';

export type ToCome = { bookingId: string; holder: string; email: string | null; code: string; from: Date };

/** Bookings not yet over that count, the earliest first. Bookings are another word's: here they are only read. */
export function bookingsToCome(tx: EntityManager, fisheryId: string, now: Date): Promise<ToCome[]> {
  return tx.query(
    `SELECT b.id AS "bookingId", b.holder_name AS holder, coalesce(a.email, b.holder_email) AS email, b.code,
            lower(b.during) AS "from"
       FROM booking b LEFT JOIN account a ON a.id = b.account_id
      WHERE b.fishery_id = $1 AND upper(b.during) > $2
        AND b.status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'choosing')
      ORDER BY lower(b.during), b.id LIMIT 2000`,
    [fisheryId, now],
  );
}

/** Who has read what, of everybody still to come. */
export async function readersView({ tx, actor, now }: Ctx, fisheryId: string): Promise<ReadersView> {
  const { zone } = await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, STAFF);
  const inForce = await sheetInForce(tx, fisheryId);
  const toCome = await bookingsToCome(tx, fisheryId, now);
  const read = await readingsOf(
    tx,
    toCome.map(({ bookingId }) => bookingId),
  );
  return {
    inForce: inForce && { major: inForce.major, minor: inForce.minor },
    readers: toCome.map(({ bookingId, holder, code, from }) => ({
      bookingId,
      holder,
      code,
      from: from.toISOString(),
      zone,
      needed: read.get(bookingId)?.needed ?? false,
      reading: read.get(bookingId)?.readings[0] ?? null,
    })),
  };
}
