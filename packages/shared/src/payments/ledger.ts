import { z } from 'zod';
import { sumPence, wholePence } from '../money/money';
import type { PaymentMethod } from './payment-state';

/** The accounts money is in or owed on, in plain words. */
export const LedgerAccount = z.enum([
  'card_money_coming', // taken by the card provider, not yet paid out
  'bank',
  'cash_tin',
  'disputes_open', // withheld by the provider
  'vat_owed',
  'credit_owed', // credit notes anglers may spend
  'ticket_sales', // net of VAT
  'card_fees',
  'disputes_lost',
  'cash_differences',
]);
export type LedgerAccount = z.infer<typeof LedgerAccount>;

export const ACCOUNT_WORDS: Readonly<Record<LedgerAccount, string>> = {
  card_money_coming: 'Card money on its way',
  bank: 'Bank',
  cash_tin: 'Cash in the tin',
  disputes_open: 'Withheld in disputes',
  vat_owed: 'VAT owed',
  credit_owed: 'Credit owed to anglers',
  ticket_sales: 'Ticket sales',
  card_fees: 'Card fees',
  disputes_lost: 'Lost in disputes',
  cash_differences: 'Cash over or short',
};

/** One side of an entry, pence: above nought is a debit, below it a credit. An entry’s postings add up to nought. */
export type Posting = { account: LedgerAccount; amountPence: number };

type Line = { grossPence: number; vatPence: number };

/** What happened with money. Amounts above nought; lines as they stand on the receipt or the credit note. */
export type MoneyDeed =
  | { kind: 'sale' | 'refund'; method: PaymentMethod; lines: readonly Line[] }
  | { kind: 'credit_note'; lines: readonly Line[] } // a sale undone against credit to spend later
  | { kind: 'card_fee' | 'payout' | 'cash_banked'; amountPence: number }
  | { kind: 'refund_returned'; amountPence: number } // told as made, came back later: owed again
  | { kind: 'refund_again'; method: PaymentMethod; amountPence: number } // what was owed so is given after all
  | { kind: 'dispute_opened' | 'dispute_won' | 'dispute_lost'; amountPence: number }
  | { kind: 'cash_counted'; expectedPence: number; countedPence: number };

const PAID_INTO: Readonly<Record<Exclude<PaymentMethod, 'complimentary'>, LedgerAccount>> = {
  card_online: 'card_money_coming',
  card_reader: 'card_money_coming',
  cash: 'cash_tin',
  bank_transfer: 'bank',
  credit_note: 'credit_owed',
};

/**
 * The postings of a deed, balanced, none of them nought. A lost dispute is a loss in full: whether its VAT can be had
 * back is for the accountant. Throws RangeError for amounts below nought, VAT above its gross, or a complimentary
 * ticket that costs something.
 */
export function postingsFor(deed: MoneyDeed): Posting[] {
  return sides(deed).filter(({ amountPence }) => amountPence !== 0);
}

function sides(deed: MoneyDeed): Posting[] {
  switch (deed.kind) {
    case 'sale':
      return sold(deed.lines, paidInto(deed.method, deed.lines), 1);
    case 'refund':
      return sold(deed.lines, paidInto(deed.method, deed.lines), -1);
    case 'credit_note':
      return sold(deed.lines, 'credit_owed', -1);
    case 'card_fee':
      return moved(deed.amountPence, 'card_money_coming', 'card_fees');
    case 'payout':
      return moved(deed.amountPence, 'card_money_coming', 'bank');
    case 'refund_returned':
      return moved(deed.amountPence, 'credit_owed', 'card_money_coming');
    case 'refund_again':
      return moved(deed.amountPence, paidInto(deed.method, []), 'credit_owed');
    case 'cash_banked':
      return moved(deed.amountPence, 'cash_tin', 'bank');
    case 'dispute_opened':
      return moved(deed.amountPence, 'card_money_coming', 'disputes_open');
    case 'dispute_won':
      return moved(deed.amountPence, 'disputes_open', 'card_money_coming');
    case 'dispute_lost':
      return moved(deed.amountPence, 'disputes_open', 'disputes_lost');
    case 'cash_counted': {
      const over = wholePence(deed.countedPence) - wholePence(deed.expectedPence);
      return over < 0
        ? moved(-over, 'cash_tin', 'cash_differences')
        : moved(over, 'cash_differences', 'cash_tin');
    }
  }
}

function paidInto(method: PaymentMethod, lines: readonly Line[]): LedgerAccount {
  if (method !== 'complimentary') return PAID_INTO[method];
  if (lines.some(({ grossPence }) => grossPence !== 0))
    throw new RangeError('A complimentary ticket costs nothing.');
  return 'cash_tin'; // nothing is posted to it
}

function sold(lines: readonly Line[], into: LedgerAccount, sign: 1 | -1): Posting[] {
  if (lines.some(({ grossPence, vatPence }) => grossPence < 0 || vatPence < 0 || vatPence > grossPence))
    throw new RangeError('A line’s VAT lies between nought and its gross.');
  const gross = sumPence(lines.map(({ grossPence }) => grossPence));
  const vat = sumPence(lines.map(({ vatPence }) => vatPence));
  return [
    { account: into, amountPence: wholePence(sign * gross) },
    { account: 'ticket_sales', amountPence: wholePence(-sign * (gross - vat)) },
    { account: 'vat_owed', amountPence: wholePence(-sign * vat) },
  ];
}

function moved(amountPence: number, from: LedgerAccount, to: LedgerAccount): Posting[] {
  if (wholePence(amountPence) < 0) throw new RangeError('An amount of money moved is not below nought.');
  return [
    { account: to, amountPence },
    { account: from, amountPence: wholePence(-amountPence) },
  ];
}

/** What stands on each account after postings, pence, debit above nought. All together they are nought. */
export function balances(postings: readonly Posting[]): Record<LedgerAccount, number> {
  const of = (account: LedgerAccount): number =>
    sumPence(postings.filter((each) => each.account === account).map(({ amountPence }) => amountPence));
  return {
    card_money_coming: of('card_money_coming'),
    bank: of('bank'),
    cash_tin: of('cash_tin'),
    disputes_open: of('disputes_open'),
    vat_owed: of('vat_owed'),
    credit_owed: of('credit_owed'),
    ticket_sales: of('ticket_sales'),
    card_fees: of('card_fees'),
    disputes_lost: of('disputes_lost'),
    cash_differences: of('cash_differences'),
  };
}
