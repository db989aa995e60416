import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import { ACCOUNT_WORDS, LedgerAccount } from '@mereward/shared/payments/ledger';
import { sumPence } from '@mereward/shared/money/money';
import { takingsBy, takingsSum, type Taking, type TakingsSum } from '@mereward/shared/payments/takings';
import type {
  LedgerView,
  TakingsAsked,
  TakingsKey,
  TakingsSumView,
  TakingsView,
} from '@mereward/shared/payments/takings-contract';
import { dayName } from '@mereward/shared/time/day-names';
import { addDays, startOfDay } from '@mereward/shared/time/zoned';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly } from '../http/deny';
import { currencyOf } from './currency';
import { MONEY_READERS } from './policy';

/** The span of civil days at a fishery as instants, half-open. */
export async function spanOf(
  tx: EntityManager,
  fisheryId: string,
  { from, until }: { from: string; until: string },
): Promise<{ from: Date; until: Date; zone: string }> {
  const { zone } = await fisheryFound(tx, fisheryId);
  return { from: startOfDay(from, zone), until: startOfDay(addDays(until, 1), zone), zone };
}

/** Sales and refunds out of the ledger, one for each deed and rate of VAT, or for each deed. */
async function takingsIn(
  tx: EntityManager,
  fisheryId: string,
  asked: { from: string; until: string; byRate: boolean },
): Promise<(Taking & { currency: string })[]> {
  const { from, until, zone } = await spanOf(tx, fisheryId, asked);
  const rate = asked.byRate ? `p.tags->>'rateBp'` : `'0'`;
  return tx.query(
    `SELECT to_char(d.at AT TIME ZONE $4, 'YYYY-MM-DD') AS day, p.tags->>'lakeId' AS "lakeId",
            p.tags->>'ticketTypeId' AS "ticketTypeId", p.tags->>'method' AS method, (${rate})::int AS "rateBp",
            -sum(p.amount_pence)::int AS "grossPence", p.currency,
            -coalesce(sum(p.amount_pence) FILTER (WHERE p.account = 'vat_owed'), 0)::int AS "vatPence"
       FROM ledger_deed d JOIN ledger_posting p ON p.deed_id = d.id
      WHERE d.fishery_id = $1 AND d.at >= $2 AND d.at < $3 AND d.kind IN ('sale', 'refund')
        AND p.account IN ('ticket_sales', 'vat_owed')
      GROUP BY d.id, 1, 2, 3, 4, 5, p.currency`,
    [fisheryId, from, until, zone],
  );
}

export async function takings(ctx: Ctx, fisheryId: string, asked: TakingsAsked): Promise<TakingsView> {
  const { tx, actor } = ctx;
  allowOnly(actor, { fisheryId, what: 'fishery' }, MONEY_READERS);
  const { by } = asked;
  const rows = await takingsIn(tx, fisheryId, { ...asked, byRate: by === 'vatRate' });
  const names = await namesOf(tx, fisheryId);
  const view = (sum: TakingsSum, words: string): TakingsSumView => ({ ...sum, words });
  return {
    currency: currencyOf(rows[0]?.currency),
    sums: takingsBy(rows, by).map((sum) => view(sum, keyWords(by, sum.key, names))),
    total: view(takingsSum(rows), 'All'),
  };
}

async function namesOf(tx: EntityManager, fisheryId: string): Promise<Map<string, string>> {
  const rows: { id: string; name: string }[] = await tx.query(
    `SELECT id, name FROM lake WHERE fishery_id = $1
     UNION ALL SELECT id, details->>'name' FROM ticket_type WHERE fishery_id = $1`,
    [fisheryId],
  );
  return new Map(rows.map(({ id, name }) => [id, name]));
}

const METHOD_WORDS: Readonly<Record<PaymentMethod, string>> = {
  card_online: 'Card on the web',
  card_reader: 'Card at the lodge',
  cash: 'Cash',
  bank_transfer: 'Bank transfer',
  credit_note: 'Credit note',
  complimentary: 'Complimentary',
};

function keyWords(by: TakingsKey, key: string, names: ReadonlyMap<string, string>): string {
  switch (by) {
    case 'day':
      return dayName(key);
    case 'month':
      return dayName(`${key}-01`).split(' ').slice(2).join(' ');
    case 'lake':
      return names.get(key) ?? 'All lakes';
    case 'ticketType':
      return names.get(key) ?? 'Written at the lodge';
    case 'method':
      return isMethod(key) ? METHOD_WORDS[key] : key;
    case 'vatRate':
      return Number(key) === 0 ? 'No VAT' : `VAT at ${Number(key) / 100} %`;
  }
}

const isMethod = (key: string): key is PaymentMethod => key in METHOD_WORDS;

/** What stands on each account now; all of it comes to nought. */
export async function ledgerOf({ tx, actor }: Ctx, fisheryId: string): Promise<LedgerView> {
  allowOnly(actor, { fisheryId, what: 'fishery' }, MONEY_READERS);
  const rows: { account: string; pence: string; currency: string }[] = await tx.query(
    `SELECT p.account, sum(p.amount_pence) AS pence, p.currency
       FROM ledger_deed d JOIN ledger_posting p ON p.deed_id = d.id
      WHERE d.fishery_id = $1 GROUP BY p.account, p.currency`,
    [fisheryId],
  );
  const accounts = LedgerAccount.options.map((account) => ({
    account,
    words: ACCOUNT_WORDS[account],
    amountPence: Number(rows.find((row) => row.account === account)?.pence ?? 0),
  }));
  return {
    currency: currencyOf(rows[0]?.currency),
    accounts,
    sumPence: sumPence(accounts.map(({ amountPence }) => amountPence)),
  };
}
