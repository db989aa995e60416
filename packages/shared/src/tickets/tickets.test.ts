import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { sumPence } from '../money/money';
import { elapsedHours, type Interval } from '../time/interval';
import { addDays, civilTime, instantOf } from '../time/zoned';
import { Duration, TicketType, type TicketChoice } from './contract';
import { nightsIn, nightsInARow } from './nights';
import { allowedStarts, ticketInterval, type TicketHours } from './ticket-interval';
import { grossOf, priceLines, priceOn, ticketForetold } from './ticket-price';
import { TICKET_TEMPLATES } from './ticket-templates';
import { whyNotSell, type Angler, type Asked } from './why-not-sell';

const zone = 'Europe/London';
const place = { position: [-1.5, 52.6], zone } as const;
const lakeIds = ['0f1c2b62-7d4e-4a0b-9a38-0c2f5b7f6a01'];
const kind = (template: keyof typeof TICKET_TEMPLATES, more: Partial<TicketType> = {}): TicketType =>
  TicketType.parse({ ...TICKET_TEMPLATES[template], lakeIds, ...more });
const choose = (day: string, more: Partial<TicketChoice> = {}): TicketChoice => ({
  day,
  start: null,
  rods: 2,
  people: 1,
  ...more,
});
const hoursOf = (duration: Duration, day: string, start: string | null = null): TicketHours => {
  const hours = ticketInterval(duration, { day, start }, place);
  if ('refused' in hours) throw new Error(hours.refused);
  return hours;
};
const at = (civil: string): Date => instantOf(civil, zone).at;
const stay = (from: string, until: string): Interval => ({ from: at(from), until: at(until) });

describe('the hours of a ticket', () => {
  const day24 = {
    kind: 'elapsed',
    hours: 24,
    startsFrom: '08:00',
    startsUntil: '12:00',
    startStepMinutes: 60,
    clockChange: 'same_clock_time',
  } as const;

  test('twenty-four hours from noon end at noon, and over a clock change say so', () => {
    expect(hoursOf(day24, '2027-07-17', '12:00').words).toBe(
      'Sat 17 July 2027, 12:00 to Sun 18 July 2027, 12:00',
    );
    const spring = hoursOf(day24, '2027-03-27', '12:00');
    expect(elapsedHours(spring)).toBe(23);
    expect(spring.words).toBe(
      'Sat 27 March 2027, 12:00 to Sun 28 March 2027, 12:00. The clock goes forward in between: this is 23 hours, ending when the clock shows the time agreed.',
    );
    const full = Duration.parse({ ...day24, clockChange: 'elapsed_hours' });
    const autumn = hoursOf(full, '2027-10-30', '12:00');
    expect(civilTime(autumn.until, zone)).toBe('2027-10-31T11:00:00');
    expect(autumn.words).toContain('The clock goes back in between: this is 24 hours, counted in full');
  });

  test('a start is one of those allowed', () => {
    expect(allowedStarts(day24)).toEqual(['08:00', '09:00', '10:00', '11:00', '12:00']);
    expect(ticketInterval(day24, { day: '2027-07-17', start: '12:30' }, place)).toEqual({
      refused: 'This ticket can’t start at 12:30. It starts from 08:00 to 12:00, every hour.',
    });
    expect(ticketInterval(day24, { day: '2027-07-17', start: null }, place)).toEqual({
      refused: 'Choose when to start.',
    });
  });

  test('a start that the clock leaves out is refused', () => {
    const early = Duration.parse({ ...day24, startsFrom: '01:00', startsUntil: '02:00' });
    expect(ticketInterval(early, { day: '2027-03-28', start: '01:00' }, place)).toEqual({
      refused: 'The clock leaves 01:00 out on Sun 28 March 2027. Choose another start.',
    });
  });

  test('a night ends the next morning, and one in October is an hour longer', () => {
    const night = TICKET_TEMPLATES.night.duration;
    expect(hoursOf(night, '2027-07-17').words).toBe('Sat 17 July 2027, 19:00 to Sun 18 July 2027, 07:00');
    expect(elapsedHours(hoursOf(night, '2027-10-30'))).toBe(13);
  });

  test('dawn to dusk follows the sun, and refuses a day without one', () => {
    const dawn = TICKET_TEMPLATES.day.duration;
    const { from, until } = hoursOf(dawn, '2027-04-03');
    expect(Math.abs(from.getTime() - at('2027-04-03T05:36').getTime())).toBeLessThanOrEqual(120_000);
    expect(Math.abs(until.getTime() - at('2027-04-03T20:42').getTime())).toBeLessThanOrEqual(120_000);
    const north = { position: [18.8, 70], zone: 'Europe/Oslo' } as const;
    expect(ticketInterval(dawn, { day: '2027-12-21', start: null }, north)).toHaveProperty('refused');
    const light = ticketInterval(dawn, { day: '2027-06-21', start: null }, north);
    expect('refused' in light ? 0 : elapsedHours(light)).toBe(24);
  });

  test('where the sun sets after midnight dusk is still that evening’s', () => {
    const north = { position: [-18.1, 65.68], zone: 'Atlantic/Reykjavik' } as const;
    const hours = ticketInterval(TICKET_TEMPLATES.day.duration, { day: '2027-06-15', start: null }, north);
    expect('refused' in hours ? 0 : elapsedHours(hours)).toBeGreaterThan(20);
  });

  test('a season runs from the day it is bought for to the end of its last', () => {
    const season = { kind: 'season', firstDay: '2027-04-01', lastDay: '2028-03-31' } as const;
    expect(hoursOf(season, '2027-03-01').words).toBe('Thu 1 April 2027 to Fri 31 March 2028, both included');
    expect(hoursOf(season, '2027-06-16').from).toEqual(at('2027-06-16T00:00'));
    expect(ticketInterval(season, { day: '2028-04-01', start: null }, place)).toHaveProperty('refused');
  });

  test('hours never end before they start and differ from their length by a moved clock alone', () => {
    const elapsed = fc.record({
      kind: fc.constant('elapsed' as const),
      hours: fc.constantFrom(12, 24, 48, 72),
      startsFrom: fc.constant('00:00'),
      startsUntil: fc.constant('23:00'),
      startStepMinutes: fc.constant(60),
      clockChange: fc.constantFrom('same_clock_time' as const, 'elapsed_hours' as const),
    });
    const days = fc.oneof(
      fc.integer({ min: -4, max: 4 }).map((days) => addDays('2027-03-28', days)),
      fc.integer({ min: -4, max: 4 }).map((days) => addDays('2027-10-31', days)),
    );
    fc.assert(
      fc.property(elapsed, days, fc.integer({ min: 0, max: 23 }), (shape, day, hour) => {
        const duration = Duration.parse(shape);
        const start = `${String(hour).padStart(2, '0')}:00`;
        const hours = ticketInterval(duration, { day, start }, place);
        if ('refused' in hours) {
          expect([day, start]).toEqual(['2027-03-28', '01:00']);
          return;
        }
        const count = elapsedHours(hours);
        if (shape.clockChange === 'elapsed_hours') expect(count).toBe(shape.hours);
        else expect(Math.abs(count - shape.hours)).toBeLessThanOrEqual(1);
        expect(hours.until.getTime()).toBeGreaterThan(hours.from.getTime());
      }),
    );
  });
});

describe('the price of a ticket', () => {
  test('is that in force on the day fished', () => {
    const now = {
      fromDay: '2026-01-01',
      pricePence: 1200,
      extraRodPence: 400,
      extraPersonPence: 0,
      vatCode: 'standard',
      vatRateBp: 2000,
    } as const;
    const dearer = { ...now, fromDay: '2027-04-01', pricePence: 1400 };
    expect(priceOn([dearer, now], '2027-03-31')?.pricePence).toBe(1200);
    expect(priceOn([dearer, now], '2027-04-01')?.pricePence).toBe(1400);
    expect(priceOn([dearer], '2027-03-31')).toBeNull();
    expect(priceLines({ ...kind('day'), prices: [dearer] }, choose('2027-03-31'))).toHaveProperty('refused');
  });

  test('has a line for further rods, each with its own VAT', () => {
    const lines = priceLines(kind('day'), choose('2027-07-17', { rods: 3 }));
    expect(lines).toEqual([
      {
        words: 'Day',
        count: 1,
        grossPence: 1200,
        netPence: 1000,
        vatPence: 200,
        vatCode: 'standard',
        vatRateBp: 2000,
      },
      {
        words: 'Extra rod',
        count: 1,
        grossPence: 400,
        netPence: 333,
        vatPence: 67,
        vatCode: 'standard',
        vatRateBp: 2000,
      },
    ]);
    if ('refused' in lines) throw new Error(lines.refused);
    expect(grossOf(lines)).toBe(1600);
    expect(sumPence(lines.map((line) => line.netPence + line.vatPence))).toBe(1600);
  });

  test('is foretold with the end of the ticket', () => {
    expect(ticketForetold(kind('stay24'), choose('2027-07-17', { start: '12:00' }), place)).toBe(
      '24 hours from Sat 17 July 2027, 12:00 would cost £28.00 and end Sun 18 July 2027, 12:00.',
    );
  });
});

test('nights are the midnights gone over, joined by stays without a rest between', () => {
  expect(nightsIn(stay('2027-07-17T12:00', '2027-07-18T12:00'), zone)).toBe(1);
  expect(nightsIn(stay('2027-07-17T12:00', '2027-07-18T00:00'), zone)).toBe(0);
  const wanted = stay('2027-07-18T12:00', '2027-07-19T12:00');
  const before = stay('2027-07-16T12:00', '2027-07-17T12:00');
  const rest = (restHours: number) => ({ restHours, zone });
  expect(nightsInARow(wanted, [before], rest(24))).toBe(1); // a whole day off
  expect(nightsInARow(wanted, [before], rest(25))).toBe(2);
  expect(nightsInARow(wanted, [stay('2027-07-17T12:00', '2027-07-18T12:00')], rest(0))).toBe(2);
  expect(nightsInARow(wanted, [wanted], rest(24))).toBe(1);
});

describe('why a ticket is not sold', () => {
  const angler: Angler = {
    member: false,
    staff: false,
    inMatch: false,
    bornOn: '1980-05-05',
    stays: [],
    bookingsToCome: 0,
    hostStays: null,
    concessionSeen: false,
    guardian: 'none',
    vehicle: true,
    emergencyContact: true,
  };
  const ask = (type: TicketType, choice: TicketChoice, more: Partial<Asked> = {}): Asked => ({
    choice,
    hours: hoursOf(type.duration, choice.day, choice.start),
    lakeNights: true,
    zone,
    now: at('2027-07-01T12:00'),
    ...more,
  });
  const codes = (
    type: TicketType,
    who: Partial<Angler>,
    choice: TicketChoice,
    more: Partial<Asked> = {},
  ): string[] => whyNotSell(type, { ...angler, ...who }, ask(type, choice, more)).map(({ code }) => code);

  test('nothing stands against a grown-up’s day ticket', () => {
    expect(codes(kind('day'), {}, choose('2027-07-17'))).toEqual([]);
  });

  test('every reason is told at once', () => {
    const type = kind('stay24', { audience: 'member', leastNoticeHours: 24 });
    const who = { bornOn: '2013-01-01', vehicle: false, emergencyContact: false };
    const choice = choose('2027-07-01', { start: '12:00', rods: 4, people: 2 });
    expect(codes(type, who, choice, { lakeNights: false })).toEqual([
      'too-late',
      'members-only',
      'too-young',
      'no-nights',
      'too-many-rods',
      'too-many-people',
      'no-vehicle',
      'no-emergency-contact',
    ]);
  });

  test('a ticket is sold so many days before, until it ends, inside its own dates', () => {
    expect(codes(kind('day'), {}, choose('2027-09-30'))).toEqual(['too-early']);
    expect(codes(kind('day'), {}, choose('2027-09-29'))).toEqual([]);
    expect(codes(kind('day'), {}, choose('2027-07-01'))).toEqual([]);
    expect(codes(kind('day'), {}, choose('2027-06-30'))).toEqual(['over']);
    const dated = kind('day', { firstDay: '2027-07-10', lastDay: '2027-07-20' });
    expect(codes(dated, {}, choose('2027-07-09'))).toEqual(['not-yet-sold']);
    expect(codes(dated, {}, choose('2027-07-21'))).toEqual(['no-longer-sold']);
  });

  test('a junior’s age is that on the day fished, and a guardian must be near', () => {
    const kit = { bornOn: '2014-09-20', guardian: 'near' } as const;
    const eldest = kind('junior', { ages: { leastAge: null, mostAge: 12, guardianBelowAge: 16 } });
    const early = { now: at('2027-07-01T12:00') };
    expect(codes(eldest, kit, choose('2027-07-18'), early)).toEqual([]);
    expect(codes(eldest, kit, choose('2027-09-25'), early)).toEqual(['too-old']);
    expect(codes(kind('junior'), { ...kit, guardian: 'none' }, choose('2027-07-18'))).toEqual([
      'no-guardian',
    ]);
    expect(codes(kind('junior'), { ...kit, guardian: 'named' }, choose('2027-07-18'))).toEqual([
      'guardian-not-near',
    ]);
    expect(codes(kind('junior'), { bornOn: null }, choose('2027-07-18'))).toEqual(['age-unknown']);
    expect(codes(kind('night'), { bornOn: '2012-11-02' }, choose('2027-07-18'))).toEqual(['too-young']);
  });

  test('two nights are followed by a day off the water', () => {
    const fished = { stays: [stay('2027-07-15T12:00', '2027-07-17T12:00')] };
    expect(codes(kind('stay24'), fished, choose('2027-07-17', { start: '12:00' }))).toEqual([
      'too-many-nights',
    ]);
    expect(codes(kind('stay24'), fished, choose('2027-07-18', { start: '12:00' }))).toEqual([]);
  });

  test('a guest comes while the host is there, a concession is shown once', () => {
    const host = [stay('2027-07-17T12:00', '2027-07-18T12:00')];
    expect(codes(kind('guest'), {}, choose('2027-07-17'))).toEqual(['no-host']);
    expect(codes(kind('guest'), { hostStays: [] }, choose('2027-07-17'))).toEqual(['host-not-there']);
    expect(codes(kind('guest'), { hostStays: host }, choose('2027-07-17'))).toEqual([]);
    expect(codes(kind('concession'), {}, choose('2027-07-17'))).toEqual(['no-proof']);
    expect(codes(kind('concession'), { concessionSeen: true }, choose('2027-07-17'))).toEqual([]);
    expect(codes(kind('match'), {}, choose('2027-07-17'))).toEqual(['match-only']);
    expect(codes(kind('day', { mostBookings: 2 }), { bookingsToCome: 2 }, choose('2027-07-17'))).toEqual([
      'too-many-bookings',
    ]);
  });
});

test('a kind of ticket that contradicts itself is refused with every fault', () => {
  const wrong = TicketType.safeParse({
    ...TICKET_TEMPLATES.concession,
    lakeIds,
    rodsMost: 1,
    concessionProof: '',
    firstDay: '2027-02-01',
    lastDay: '2027-01-01',
    prices: [TICKET_TEMPLATES.day.prices[0], TICKET_TEMPLATES.day.prices[0]],
  });
  expect(wrong.error?.issues.map(({ path }) => path.join('.'))).toEqual([
    'rodsMost',
    'lastDay',
    'prices',
    'concessionProof',
  ]);
  const rate = { ...TICKET_TEMPLATES.day.prices[0], vatCode: 'exempt' };
  expect(TicketType.safeParse({ ...TICKET_TEMPLATES.day, lakeIds, prices: [rate] }).success).toBe(false);
});
