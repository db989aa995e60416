import type { ClosureTally } from '@mereward/shared/closures/deeds-contract';
import type { EntityManager } from 'typeorm';

// Choices, payments and refunds are other words' rows: here they are only counted, for the staff's own list.
const TALLIES = `
  WITH hit AS (
    SELECT c.closure_id, c.choice, c.booking_id,
      (SELECT coalesce(sum(p.amount_pence), 0)::int FROM payment p
        WHERE p.booking_id = c.booking_id AND p.status = 'captured') AS taken,
      (SELECT coalesce(sum(r.amount_pence), 0)::int FROM refund r
        WHERE r.booking_id = c.booking_id AND r.cause = 'closure:' || c.closure_id AND r.status <> 'declined') AS back,
      (SELECT count(*)::int FROM refund r
        WHERE r.booking_id = c.booking_id AND r.cause = 'closure:' || c.closure_id AND r.status = 'failed') AS failed
      FROM closure_choice c WHERE c.closure_id = ANY ($1))
  SELECT k.id,
    (SELECT min(b.currency) FROM booking b JOIN hit h ON h.booking_id = b.id WHERE h.closure_id = k.id) AS currency,
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id) AS bookings,
    (SELECT coalesce(sum(taken), 0)::int FROM hit h WHERE h.closure_id = k.id) AS "valuePence",
    (SELECT count(DISTINCT e.booking_id)::int FROM booking_event e
      WHERE e.kind = 'told_of_closure' AND e.told->>'closureId' = k.id::text) AS told,
    (SELECT count(DISTINCT t.peg_id)::int FROM peg_time t WHERE t.closure_id = k.id) AS pegs,
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id AND choice IS NULL) AS waiting,
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id AND choice = 'move_date') AS "movedDate",
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id AND choice = 'move_lake') AS "movedLake",
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id AND choice = 'refund') AS refunded,
    (SELECT count(*)::int FROM hit h WHERE h.closure_id = k.id AND choice = 'cancel') AS cancelled,
    (SELECT coalesce(sum(back), 0)::int FROM hit h WHERE h.closure_id = k.id) AS "refundedPence",
    (SELECT coalesce(sum(taken - back), 0)::int FROM hit h WHERE h.closure_id = k.id) AS "keptPence",
    (SELECT coalesce(sum(failed), 0)::int FROM hit h WHERE h.closure_id = k.id) AS "refundFailed"
  FROM closure k WHERE k.id = ANY ($1)`;

type Row = Omit<ClosureTally, 'currency'> & { id: string; currency: string | null };

/** What became of the bookings of closures, by the closures' ids. */
export async function talliesOf(
  tx: EntityManager,
  closureIds: readonly string[],
): Promise<Map<string, ClosureTally>> {
  const rows: Row[] = await tx.query(TALLIES, [closureIds]);
  return new Map(rows.map(({ id, currency, ...tally }) => [id, { ...tally, currency: currency ?? 'GBP' }]));
}
