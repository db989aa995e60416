import { LedgerDeed } from '@mereward/db/entities/payments/ledger-deed';
import { postingsFor, type MoneyDeed } from '@mereward/shared/payments/ledger';
import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import type { SaleLine } from '@mereward/shared/payments/line-parts';
import { randomUUID } from 'node:crypto';
import { accountOrNull, type Ctx } from '../ctx';
import { insertOnce } from '../repeat';

/** What money is about: what takings are grouped by stands on each posting. */
export type About = {
  fisheryId: string;
  bookingId: string;
  lakeId: string | null;
  ticketTypeId: string | null;
  currency: string;
};

type Entry = {
  kind: MoneyDeed['kind'];
  about: string; // with the kind it happens once
  of: About;
  paymentId: string | null;
  refundId?: string | null;
};

type Part = { deed: MoneyDeed; tags: Record<string, string> };

/** Writes a deed and its postings; the same deed told again writes nothing, and the answer says so. */
export async function writeDeed(ctx: Ctx, entry: Entry, parts: readonly Part[]): Promise<boolean> {
  const { tx, actor, now } = ctx;
  const { kind, about, of, paymentId, refundId = null } = entry;
  const id = randomUUID();
  const fresh = await insertOnce(tx, LedgerDeed, {
    id,
    fisheryId: of.fisheryId,
    kind,
    about,
    paymentId,
    refundId,
    bookingId: of.bookingId,
    at: now,
    madeBy: accountOrNull(actor),
  });
  if (!fresh) return false;
  const postings = parts.flatMap(({ deed, tags }) => postingsFor(deed).map((each) => ({ ...each, tags })));
  if (postings.length > 0)
    await tx.query(
      `INSERT INTO ledger_posting (deed_id, account, amount_pence, currency, tags)
       SELECT $1, p.account, p.amount, $2, p.tags
         FROM unnest($3::text[], $4::bigint[], $5::jsonb[]) AS p (account, amount, tags)`,
      [
        id,
        of.currency,
        postings.map(({ account }) => account),
        postings.map(({ amountPence }) => amountPence),
        postings.map(({ tags }) => JSON.stringify(tags)),
      ],
    );
  return true;
}

/** A sale or a refund parted by rates of VAT, each with its own tags. */
export function partsByRate(
  kind: 'sale' | 'refund',
  { method, lines, of }: { method: PaymentMethod; lines: readonly SaleLine[]; of: About },
): Part[] {
  const rates = [...new Set(lines.map(({ rateBp }) => rateBp))];
  return rates.map((rateBp) => ({
    deed: { kind, method, lines: lines.filter((line) => line.rateBp === rateBp) },
    tags: {
      lakeId: of.lakeId ?? '',
      ticketTypeId: of.ticketTypeId ?? '',
      method,
      rateBp: String(rateBp),
    },
  }));
}
