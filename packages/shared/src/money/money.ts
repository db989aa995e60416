import { z } from 'zod';

/** Currencies this program counts in: ISO 4217 codes with two decimal places, so that pence are hundredths in each. */
export const Currency = z.enum(['GBP', 'EUR', 'CHF', 'CZK', 'DKK', 'NOK', 'PLN', 'SEK', 'USD']);
export type Currency = z.infer<typeof Currency>;

/** The largest amount in one place, hundredths: ten million pounds. Sums of millions of them stay exact. */
export const MOST_PENCE = 1_000_000_000;

/** A price: whole hundredths of the currency, nought or more. */
export const PricePence = z.int().min(0).max(MOST_PENCE);
/** An amount that may also be owed back: whole hundredths of the currency. */
export const AmountPence = z.int().min(-MOST_PENCE).max(MOST_PENCE);

export type Money = { pence: number; currency: Currency };

/** Throws RangeError for what is no whole number of pence: money is never rounded outside this room. */
export function wholePence(pence: number): number {
  if (!Number.isSafeInteger(pence)) throw new RangeError('Money is counted in whole pence.');
  return pence === 0 ? 0 : pence; // no minus nought
}

/** Sum of amounts in pence; nought for none. Throws RangeError unless all are whole. */
export const sumPence = (amounts: readonly number[]): number =>
  wholePence(amounts.reduce((sum, each) => sum + wholePence(each), 0));

/** Sum of amounts of one currency. Throws RangeError when two currencies meet: nothing here knows a rate. */
export function sumMoney(amounts: readonly Money[], currency: Currency): Money {
  if (amounts.some((each) => each.currency !== currency))
    throw new RangeError(`Amounts in another currency can’t be added to ${currency}.`);
  return { pence: sumPence(amounts.map(({ pence }) => pence)), currency };
}

const SIGNS: Partial<Record<Currency, string>> = { GBP: '£', EUR: '€' };

/** An amount as a plain number with two decimals, for a file: 28.00, -4.67. */
export function decimalAmount(pence: number): string {
  const whole = Math.abs(wholePence(pence));
  return `${pence < 0 ? '-' : ''}${Math.floor(whole / 100)}.${String(whole % 100).padStart(2, '0')}`;
}

/** An amount in words: £28.00, −£4.67, CHF 12.00. */
export function moneyWords(pence: number, currency: Currency = 'GBP'): string {
  const whole = Math.abs(wholePence(pence));
  const pounds = String(Math.floor(whole / 100)).replace(/\B(?=(\d{3})+$)/g, ',');
  const figures = `${pounds}.${String(whole % 100).padStart(2, '0')}`;
  return `${pence < 0 ? '−' : ''}${SIGNS[currency] ?? `${currency} `}${figures}`;
}
