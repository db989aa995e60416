import { moneyWords, sumPence, type Currency } from '../money/money';
import { vatByRate, type VatLine } from '../money/vat';
import { dayName } from '../time/day-names';

/** A receipt’s number, counted without a gap in each fishery and year: 2027-000418. Throws RangeError outside 1–999,999. */
export function receiptNumber(year: number, count: number): string {
  if (
    !Number.isInteger(count) ||
    count < 1 ||
    count > 999_999 ||
    !Number.isInteger(year) ||
    year < 1000 ||
    year > 9999
  )
    throw new RangeError('Receipts are counted from 1 to 999,999 in a year.');
  return `${year}-${String(count).padStart(6, '0')}`;
}

/** A number from a block given out beforehand, for selling on the bank without a signal: B3-0007. Throws RangeError. */
export function bankReceiptNumber(block: number, count: number): string {
  if (!Number.isInteger(block) || block < 1 || !Number.isInteger(count) || count < 1 || count > 9999)
    throw new RangeError('Receipts of a block are counted from 1 to 9,999.');
  return `B${block}-${String(count).padStart(4, '0')}`;
}

/** A receipt’s number taken apart; null when it is none. */
export function readReceiptNumber(
  text: string,
): { year: number; count: number } | { block: number; count: number } | null {
  const office = /^(\d{4})-(\d{6})$/.exec(text.trim());
  if (office) return { year: Number(office[1]), count: Number(office[2]) };
  const bank = /^B([1-9]\d*)-(\d{4})$/i.exec(text.trim());
  return bank ? { block: Number(bank[1]), count: Number(bank[2]) } : null;
}

/**
 * Up to here, VAT included, a short VAT invoice will do (United Kingdom). Source: HM Revenue & Customs, VAT Notice 700,
 * section 16.6 (simplified invoices); the figure as the trade’s table of numbers has it.
 */
export const SHORT_INVOICE_PENCE = 25_000;

export type Seller = {
  legalName: string;
  address: string;
  vatStatus: 'registered' | 'not_registered' | 'exempt_body';
  vatNumber: string;
};

export type Receipt = {
  number: string;
  taxPoint: string; // civil day at the fishery
  currency: Currency;
  lines: readonly (VatLine & { words: string })[];
  buyer: { name: string; address: string } | null; // needed above the short invoice’s limit
};

export type ReceiptField = { term: string; fact: string };

const rateWords = (rateBp: number): string => `${rateBp / 100} %`;

/**
 * What stands on a receipt, in order. Registered sellers up to £250: a short VAT invoice (seller and VAT number, day of
 * supply, what, total with VAT, and for each rate the gross and the rate). Above it net and VAT for each rate and the
 * buyer as well. Others: no word of VAT, for they charge none.
 */
export function receiptFields(seller: Seller, receipt: Receipt): ReceiptField[] {
  const { currency, lines } = receipt;
  const total = sumPence(lines.map(({ grossPence }) => grossPence));
  const registered = seller.vatStatus === 'registered';
  const long = registered && Math.abs(total) > SHORT_INVOICE_PENCE;
  const field = (term: string, fact: string): ReceiptField[] => (fact === '' ? [] : [{ term, fact }]);
  return [
    ...field('Receipt', receipt.number),
    ...field('From', seller.legalName),
    ...field('Address', seller.address),
    ...(registered ? field('VAT number', seller.vatNumber) : []),
    ...(long ? field('To', [receipt.buyer?.name, receipt.buyer?.address].filter(Boolean).join(', ')) : []),
    ...field(registered ? 'Day of supply' : 'Day', dayName(receipt.taxPoint)),
    ...lines.flatMap(({ words, grossPence }) => field(words, moneyWords(grossPence, currency))),
    ...(registered ? vatByRate(lines).flatMap((sum) => rateFields(sum, currency, long)) : []),
    ...field(registered ? 'Total, VAT included' : 'Total', moneyWords(total, currency)),
  ];
}

function rateFields(
  { rateBp, grossPence, netPence, vatPence }: VatLine,
  currency: Currency,
  long: boolean,
): ReceiptField[] {
  const rate = rateWords(rateBp);
  const vat = `${moneyWords(vatPence, currency)} of ${moneyWords(grossPence, currency)}`;
  const fields = [{ term: `VAT at ${rate}`, fact: vat }];
  return long ? [{ term: `Net at ${rate}`, fact: moneyWords(netPence, currency) }, ...fields] : fields;
}

/** What is missing before a receipt can be given as a VAT invoice, in words; none when it can, or no VAT is charged. */
export function receiptFaults(seller: Seller, receipt: Receipt): string[] {
  if (seller.vatStatus !== 'registered') {
    return receipt.lines.some(({ vatPence }) => vatPence !== 0)
      ? ['Who is not registered for VAT can’t charge it. Set the tickets’ VAT code to outside the scope.']
      : [];
  }
  const total = sumPence(receipt.lines.map(({ grossPence }) => grossPence));
  const missing = (what: string, value: string | undefined): string[] =>
    value ? [] : [`${what} is missing.`];
  return [
    ...missing('The legal name of the fishery', seller.legalName),
    ...missing('The address of the fishery', seller.address),
    ...missing('The VAT number', seller.vatNumber),
    ...(Math.abs(total) > SHORT_INVOICE_PENCE
      ? missing('The buyer’s name and address', receipt.buyer?.address)
      : []),
  ];
}
