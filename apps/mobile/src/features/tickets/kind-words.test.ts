import type { TicketType } from '@mereward/shared/tickets/contract';
import { expect, test } from 'vitest';
import { durationWords, kindLine, startsOf } from './kind-words';

const elapsed = {
  kind: 'elapsed',
  hours: 24,
  startsFrom: '07:00',
  startsUntil: '09:00',
  startStepMinutes: 60,
  clockChange: 'elapsed_hours',
} as const;

const kind = (name: string, duration: TicketType['duration']) =>
  ({
    name,
    duration,
    currency: 'GBP',
    prices: [
      {
        fromDay: '2027-01-01',
        pricePence: 2800,
        extraRodPence: 0,
        extraPersonPence: 0,
        vatCode: 'standard',
        vatRateBp: 2000,
      },
    ],
  }) as TicketType;

test('a kind says its hours and its price of the day', () => {
  expect(
    kindLine(kind('Day ticket', { kind: 'fixed_hours', starts: '07:00', ends: '19:00' }), '2027-07-17'),
  ).toBe('Day ticket, 07:00 to 19:00, £28.00');
});

test('hours that stand in the name are not said twice', () => {
  expect(kindLine(kind('24 hours', elapsed), '2027-07-17')).toBe('24 hours, £28.00');
});

test('a day before the first price has no price yet', () => {
  expect(kindLine(kind('24 hours', elapsed), '2026-12-31')).toBe('24 hours, no price yet');
});

test('only chosen hours leave a start to pick', () => {
  expect(startsOf({ duration: elapsed })).toEqual(['07:00', '08:00', '09:00']);
  expect(startsOf({ duration: { kind: 'night', starts: '19:00', ends: '07:00' } })).toEqual([]);
  expect(durationWords({ kind: 'night', starts: '19:00', ends: '07:00' })).toBe('19:00 to 07:00');
});
