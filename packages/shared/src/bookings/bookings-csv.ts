import { decimalAmount, type Currency } from '../money/money';
import type { PaymentMethod } from '../payments/payment-state';
import { csvText } from '../writing/csv-cells';
import type { BookingState } from './booking-state';

/** A booking as it stands in a file for a spreadsheet: no names, no addresses. Money in pence. */
export type BookingRow = {
  id: string;
  code: string;
  lake: string;
  peg: string | null;
  type: string;
  from: Date;
  until: Date;
  rods: number;
  people: number;
  state: BookingState;
  grossPence: number;
  vatPence: number;
  currency: Currency;
  method: PaymentMethod | null;
  receiptNumber: string | null;
  refundedPence: number;
  source: 'web' | 'bailiff' | 'office' | 'match';
};

const HEADING = [
  'id',
  'code',
  'lake',
  'peg',
  'type',
  'start_utc',
  'end_utc',
  'rods',
  'people',
  'status',
  'gross',
  'vat',
  'net',
  'currency',
  'method',
  'receipt_no',
  'refunded',
  'source',
] as const;

const utc = (at: Date): string => at.toISOString().replace('.000Z', 'Z');

/** Bookings as RFC 4180 text with a heading; times in UTC, money with two decimals. No cell is taken for a formula. */
export const bookingsCsv = (rows: readonly BookingRow[]): string =>
  csvText([
    HEADING,
    ...rows.map((row) => [
      row.id,
      row.code,
      row.lake,
      row.peg,
      row.type,
      utc(row.from),
      utc(row.until),
      row.rods,
      row.people,
      row.state,
      decimalAmount(row.grossPence),
      decimalAmount(row.vatPence),
      decimalAmount(row.grossPence - row.vatPence),
      row.currency,
      row.method,
      row.receiptNumber,
      decimalAmount(row.refundedPence),
      row.source,
    ]),
  ]);
