import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import type {
  DisputeView,
  OfficeQueue,
  OfficeQueueItem,
  OfficeQueueKind,
} from '@mereward/shared/payments/refund-contract';
import { holdsAny, type Actor, type Ctx } from '../ctx';
import { allowOnly } from '../http/deny';
import { currencyOf } from './currency';
import { mayDecide, MONEY_HANDLERS, MONEY_READERS, REFUND_PROPOSERS } from './policy';

type Row = {
  kind: OfficeQueueKind;
  id: string;
  bookingId: string;
  bookingCode: string;
  holder: string;
  amountPence: number;
  currency: string;
  method: PaymentMethod;
  reason: string;
  fault: string;
  askedById: string | null;
  askedBy: string | null;
  since: Date;
};

const QUEUE = `
  SELECT q.kind, q.id, b.id AS "bookingId", b.code AS "bookingCode", b.holder_name AS holder,
         q.amount_pence AS "amountPence", p.currency, p.method, q.reason, q.fault, q.asked_by AS "askedById",
         a.name AS "askedBy", q.since
    FROM (
      SELECT r.id::text AS id, r.payment_id, r.amount_pence, r.reason, r.fault, r.asked_by, r.asked_at AS since,
             CASE WHEN r.status = 'proposed' THEN 'refund_proposed' WHEN r.status = 'failed' THEN 'refund_failed'
                  WHEN x.method <> 'card_online' OR r.cause LIKE 'hand:%' THEN 'give_back_by_hand'
                  ELSE 'refund_slow' END AS kind
        FROM refund r JOIN payment x ON x.id = r.payment_id
       WHERE r.fishery_id = $1 AND (r.status IN ('proposed', 'failed')
          OR (r.status = 'queued' AND (x.method <> 'card_online' OR r.cause LIKE 'hand:%'
                                       OR r.asked_at < $2::timestamptz - interval '1 hour')))
      UNION ALL
      SELECT r.id::text, r.payment_id, r.amount_pence, r.reason, r.fault, r.asked_by, r.asked_at, 'paid_too_late'
        FROM refund r
       WHERE r.fishery_id = $1 AND r.cause = 'paid_too_late' AND r.seen_at IS NULL AND r.status <> 'failed'
      UNION ALL
      SELECT d.id, d.payment_id, d.amount_pence, d.reason, '', NULL, d.opened_at, 'dispute_open'
        FROM dispute d JOIN payment x ON x.id = d.payment_id
       WHERE x.fishery_id = $1 AND d.closed_at IS NULL
    ) q
    JOIN payment p ON p.id = q.payment_id
    JOIN booking b ON b.id = p.booking_id
    LEFT JOIN account a ON a.id = q.asked_by
   ORDER BY q.since, q.id
   LIMIT 500`;

type Asked = { fisheryId: string; limitPence: number };

/** What waits for somebody in the office, oldest first. The head bailiff sees what was proposed, and its end. */
export async function officeQueue(ctx: Ctx, { fisheryId, limitPence }: Asked): Promise<OfficeQueue> {
  const { tx, actor, now } = ctx;
  allowOnly(actor, { fisheryId, what: 'fishery' }, REFUND_PROPOSERS);
  const all = holdsAny(actor, fisheryId, MONEY_READERS);
  const rows: Row[] = await tx.query(QUEUE, [fisheryId, now]);
  return {
    items: rows
      .filter(({ kind }) => all || kind === 'refund_proposed')
      .map((row) => itemOf(row, actor, { fisheryId, limitPence })),
  };
}

function itemOf(row: Row, actor: Actor, { fisheryId, limitPence }: Asked): OfficeQueueItem {
  const { kind, askedById, fault, currency, since, ...rest } = row;
  const handles = holdsAny(actor, fisheryId, MONEY_HANDLERS);
  const asked = { fisheryId, amountPence: row.amountPence, askedBy: askedById };
  return {
    ...rest,
    kind,
    currency: currencyOf(currency),
    words: kind === 'refund_failed' ? fault : WORDS[kind],
    since: since.toISOString(),
    may: {
      decide: kind === 'refund_proposed' && mayDecide(actor, asked, limitPence),
      again: kind === 'refund_failed' && handles,
      given: kind === 'give_back_by_hand' && handles,
      seen: kind === 'paid_too_late' && handles,
    },
  };
}

const WORDS: Readonly<Record<OfficeQueueKind, string>> = {
  refund_proposed: 'Somebody else than who asked for it gives or declines it.',
  refund_failed: '',
  give_back_by_hand: 'Hand it over, by the way it was paid if you can, then say that it was given.',
  refund_slow:
    'Asked of the card provider over an hour ago, without an answer yet. It is asked again by itself.',
  paid_too_late:
    'Paid after the hold had run out; all of it goes back by itself. Note it, and write to the angler if you like.',
  dispute_open: 'Answer it on the card provider’s own pages before their deadline.',
};

/** Disputes of a fishery, the newest first. */
export async function disputesOf({ tx, actor }: Ctx, fisheryId: string): Promise<DisputeView[]> {
  allowOnly(actor, { fisheryId, what: 'fishery' }, MONEY_READERS);
  type Found = Omit<DisputeView, 'openedAt' | 'closedAt' | 'currency'> & {
    currency: string;
    openedAt: Date;
    closedAt: Date | null;
  };
  const rows: Found[] = await tx.query(
    `SELECT d.id, b.id AS "bookingId", b.code AS "bookingCode", b.holder_name AS holder,
            d.amount_pence AS "amountPence", p.currency, d.reason, d.status, d.opened_at AS "openedAt",
            d.closed_at AS "closedAt"
       FROM dispute d JOIN payment p ON p.id = d.payment_id JOIN booking b ON b.id = p.booking_id
      WHERE p.fishery_id = $1 ORDER BY d.opened_at DESC, d.id LIMIT 500`,
    [fisheryId],
  );
  return rows.map((row) => ({
    ...row,
    currency: currencyOf(row.currency),
    openedAt: row.openedAt.toISOString(),
    closedAt: row.closedAt?.toISOString() ?? null,
  }));
}
