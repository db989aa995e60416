import type { TicketPrice } from '@mereward/shared/tickets/contract';
import { expect, test } from 'vitest';
import { hoursOfKind, priceWords } from './ticket-type-words';

const price = (fromDay: string, pricePence: number): TicketPrice => ({
  fromDay,
  pricePence,
  extraRodPence: 0,
  extraPersonPence: 0,
  vatCode: 'standard',
  vatRateBp: 2000,
});

test('hours are said as an angler would read them', () => {
  expect(hoursOfKind({ kind: 'night', starts: '19:00', ends: '07:00' })).toBe('19:00 to 07:00');
  expect(hoursOfKind({ kind: 'dawn_dusk', beforeSunriseMinutes: 60, afterSunsetMinutes: 0 })).toBe(
    '60 min before sunrise to sunset',
  );
  expect(hoursOfKind({ kind: 'season', firstDay: '2027-04-01', lastDay: '2028-03-31' })).toBe(
    '1 April 2027 to 31 March 2028',
  );
});

test('today’s price is said with the change to come, and no price is said to be none', () => {
  const kind = { currency: 'GBP' as const, prices: [price('2027-04-01', 3000), price('2026-01-01', 2800)] };
  expect(priceWords(kind, '2027-01-04')).toBe('£28.00, £30.00 from 2027-04-01');
  expect(priceWords(kind, '2027-04-01')).toBe('£30.00');
  expect(priceWords(kind, '2025-12-31')).toBe('no price yet, £28.00 from 2026-01-01');
});
