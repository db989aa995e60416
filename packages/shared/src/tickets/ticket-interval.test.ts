import fc from 'fast-check';
import { expect, test } from 'vitest';
import { elapsedHours, overlaps } from '../time/interval';
import { addDays } from '../time/zoned';
import type { Duration } from './contract';
import { ticketInterval, type LakePlace, type TicketHours } from './ticket-interval';

const places: LakePlace[] = [
  { position: [-1.5, 52.6], zone: 'Europe/London' },
  { position: [-8.2, 53.4], zone: 'Europe/Dublin' },
  { position: [2.3, 47.1], zone: 'Europe/Paris' },
  { position: [18.8, 59.9], zone: 'Europe/Stockholm' },
];
const clock = fc.integer({ min: 0, max: 95 }).map((quarter) => {
  const minutes = quarter * 15;
  return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
});
/** Days round both moves of the clock in 2027, and any others. */
const days = fc.oneof(
  fc.integer({ min: -3, max: 3 }).map((count) => addDays('2027-03-28', count)),
  fc.integer({ min: -3, max: 3 }).map((count) => addDays('2027-10-31', count)),
  fc.integer({ min: 0, max: 364 }).map((count) => addDays('2027-01-01', count)),
);
const repeated: fc.Arbitrary<Duration> = fc.oneof(
  fc.record({
    kind: fc.constantFrom('fixed_hours' as const, 'night' as const, 'match' as const),
    starts: clock,
    ends: clock,
  }),
  fc.record({
    kind: fc.constant('dawn_dusk' as const),
    beforeSunriseMinutes: fc.integer({ min: 0, max: 120 }),
    afterSunsetMinutes: fc.integer({ min: 0, max: 120 }),
  }),
);

const hoursOf = (duration: Duration, day: string, place: LakePlace): TicketHours | null => {
  const hours = ticketInterval(duration, { day, start: null }, place);
  return 'refused' in hours ? null : hours;
};

test('a ticket lasts longer than nought and 25 hours at most, and that of the next day never overlaps it', () => {
  fc.assert(
    fc.property(repeated, days, fc.constantFrom(...places), (duration, day, place) => {
      const [today, tomorrow] = [hoursOf(duration, day, place), hoursOf(duration, addDays(day, 1), place)];
      if (today) {
        expect(elapsedHours(today)).toBeGreaterThan(0);
        expect(elapsedHours(today)).toBeLessThanOrEqual(25);
      }
      if (today && tomorrow && duration.kind !== 'dawn_dusk') expect(overlaps(today, tomorrow)).toBe(false);
    }),
    { numRuns: 150 },
  );
});

test('hours that the clock leaves out altogether are refused in words', () => {
  const lost = { kind: 'fixed_hours', starts: '01:00', ends: '02:00' } as const;
  const spring = ticketInterval(
    lost,
    { day: '2027-03-28', start: null },
    { position: [-1.5, 52.6], zone: 'Europe/London' },
  );
  expect(spring).toEqual({ refused: 'This ticket would end before it starts.' });
  const autumn = hoursOf(lost, '2027-10-31', { position: [-1.5, 52.6], zone: 'Europe/London' });
  expect(autumn && elapsedHours(autumn)).toBe(2);
});
