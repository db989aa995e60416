import { bookingsCsv, type BookingRow } from '@mereward/shared/bookings/bookings-csv';
import { currencyOf } from '../payments/currency';
import { MONEY_READERS } from '../payments/policy';
import { spanOf } from '../payments/takings-of';
import type { Ctx } from '../ctx';
import { allowOnly } from '../http/deny';

const ROWS = `
  SELECT b.id, b.code, coalesce(l.name, '') AS lake,
         (SELECT string_agg(p.number, ' ' ORDER BY p.walking_order)
            FROM peg_time t JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = b.id) AS peg,
         b.details->>'ticketName' AS type, lower(b.during) AS "from", upper(b.during) AS until, b.rods, b.people,
         b.status AS state, b.gross_pence AS "grossPence", b.currency, b.source,
         coalesce((SELECT sum((line->>'vatPence')::int) FROM jsonb_array_elements(b.details->'lines') line), 0)::int AS "vatPence",
         (SELECT y.method FROM payment y WHERE y.booking_id = b.id AND y.status = 'captured'
           ORDER BY y.taken_at LIMIT 1) AS method,
         (SELECT string_agg(r.year || '-' || lpad(r.number::text, 6, '0'), ' ' ORDER BY r.year, r.number)
            FROM receipt r WHERE r.booking_id = b.id AND r.kind = 'receipt') AS "receiptNumber",
         coalesce((SELECT sum(f.amount_pence) FROM refund f WHERE f.booking_id = b.id AND f.status = 'done'), 0)::int AS "refundedPence"
    FROM booking b LEFT JOIN lake l ON l.id = b.lake_id
   WHERE b.fishery_id = $1 AND lower(b.during) >= $2 AND lower(b.during) < $3
   ORDER BY lower(b.during), b.id`;

/** Bookings that begin on some days, for a spreadsheet: no names and no addresses. */
export async function bookingsFile(
  { tx, actor }: Ctx,
  fisheryId: string,
  asked: { from: string; until: string },
): Promise<string> {
  allowOnly(actor, { fisheryId, what: 'fishery' }, MONEY_READERS);
  const { from, until } = await spanOf(tx, fisheryId, asked);
  const rows: (Omit<BookingRow, 'currency'> & { currency: string })[] = await tx.query(ROWS, [
    fisheryId,
    from,
    until,
  ]);
  return bookingsCsv(rows.map((row) => ({ ...row, currency: currencyOf(row.currency) })));
}
