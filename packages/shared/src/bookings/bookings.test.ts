import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { instantOf } from '../time/zoned';
import {
  BOOKING_CODE_LETTERS,
  BOOKING_CODES,
  bookingCode,
  bookingCodeWords,
  readBookingCode,
  readTicketQr,
  ticketQr,
} from './booking-code';
import { BOOKING_STEPS, BookingState, isSettled, mayGo, takesPeg } from './booking-state';
import {
  CancellationCause,
  CancellationPolicy,
  policyWords,
  refundFor,
  USUAL_CANCELLATION,
} from './cancellation';
import { holdFrom, holdInChallenge, holdIsOver, mayBeNoShow } from './hold';
import { moveMoney, whyNotMove } from './moving';
import { keptInterval, mostAtOnce, whyNoRoom, type Taken } from './peg-room';
import { licenceNeeded, licenceWarning } from './rod-licence';
import { claimWindow, inOrder, nextInLine, placeInLine, type WaitingPlace } from './waiting-list';

const zone = 'Europe/London';
const at = (civil: string): Date => instantOf(civil, zone).at;

describe('the states of a booking', () => {
  const states = BookingState.options;

  test('a hold can become a finished stay, step by step', () => {
    const way: BookingState[] = ['hold', 'pending_payment', 'confirmed', 'checked_in', 'completed'];
    way.slice(1).forEach((to, index) => expect(mayGo(way[index] ?? 'hold', to)).toBe(true));
    expect(mayGo('hold', 'completed')).toBe(false);
    expect(mayGo('confirmed', 'hold')).toBe(false);
  });

  test('every state can be reached, none leads back to itself, and every walk comes to an end', () => {
    const reached = new Set<BookingState>(['hold']);
    for (const from of reached) for (const to of BOOKING_STEPS[from]) reached.add(to);
    expect([...reached].sort()).toEqual([...states].sort());
    fc.assert(
      fc.property(fc.array(fc.nat(20), { maxLength: 30 }), (turns) => {
        let state: BookingState = 'hold';
        let steps = 0;
        for (const turn of turns) {
          const next: BookingState | undefined =
            BOOKING_STEPS[state][turn % Math.max(1, BOOKING_STEPS[state].length)];
          if (!next) break;
          expect(next).not.toBe(state);
          state = next;
          steps += 1;
        }
        expect(steps).toBeLessThanOrEqual(5);
      }),
    );
  });

  test('a settled booking keeps no peg, and a no-show keeps it until it is let go', () => {
    for (const state of states) if (isSettled(state)) expect(takesPeg(state)).toBe(false);
    expect([takesPeg('no_show'), takesPeg('no_show', true)]).toEqual([true, false]);
    expect(states.filter((state) => takesPeg(state))).toHaveLength(5);
  });
});

test('a hold of ten minutes goes on to fifteen once a card is asked about, and a late question changes nothing', () => {
  const hold = holdFrom(at('2027-07-01T19:00'));
  expect(hold.until).toEqual(at('2027-07-01T19:10'));
  const longer = holdInChallenge(hold, at('2027-07-01T19:09:50'));
  expect(longer.until).toEqual(at('2027-07-01T19:15'));
  expect(holdInChallenge(longer, at('2027-07-01T19:14'))).toEqual(longer);
  expect(holdInChallenge(hold, at('2027-07-01T19:10'))).toEqual(hold);
  expect([holdIsOver(longer, at('2027-07-01T19:14:59')), holdIsOver(longer, at('2027-07-01T19:15'))]).toEqual(
    [false, true],
  );
  expect(mayBeNoShow(at('2027-07-17T12:00'), at('2027-07-17T14:00'))).toBe(true);
  expect(mayBeNoShow(at('2027-07-17T12:00'), at('2027-07-17T13:59'))).toBe(false);
});

describe('a booking’s code', () => {
  const drawn = fc.integer({ min: 0, max: BOOKING_CODES - 1 });

  test('is read back however it is typed', () => {
    fc.assert(
      fc.property(drawn, (number) => {
        const code = bookingCode(number);
        expect(code).toHaveLength(6);
        expect(readBookingCode(bookingCodeWords(code).toLowerCase())).toBe(code);
        expect(readTicketQr(ticketQr('https://mereward.example', code))).toBe(code);
        expect(readTicketQr(code.replaceAll('2', 'Z'))).toBe(code);
      }),
    );
    expect(readTicketQr('https://mereward.example/p/222222')).toBeNull();
    expect(() => bookingCode(BOOKING_CODES)).toThrow(RangeError);
  });

  test('one letter misread or two swapped give no code', () => {
    const places = fc.tuple(fc.nat(5), fc.nat(5));
    fc.assert(
      fc.property(drawn, places, fc.constantFrom(...BOOKING_CODE_LETTERS), (number, [one, other], letter) => {
        const code = bookingCode(number);
        const misread = code.slice(0, one) + letter + code.slice(one + 1);
        if (misread !== code) expect(readBookingCode(misread)).toBeNull();
        const letters = [...code];
        [letters[one], letters[other]] = [letters[other] ?? '', letters[one] ?? ''];
        if (letters.join('') !== code) expect(readBookingCode(letters.join(''))).toBeNull();
      }),
    );
  });

  test('has no look-alikes and no vowels', () => {
    expect(new Set(BOOKING_CODE_LETTERS).size).toBe(23);
    expect(BOOKING_CODE_LETTERS).not.toMatch(/[01OILAEU5S8BZ]/);
  });
});

describe('what a cancellation gives back', () => {
  const start = at('2027-07-17T12:00');
  const paid = (now: string, more: Partial<Parameters<typeof refundFor>[2]> = {}) => ({
    takenPence: 2801,
    refundedPence: 0,
    start,
    now: at(now),
    seasonBoughtAt: null,
    ...more,
  });
  const back = (now: string, more = {}, cause: CancellationCause = 'angler'): number =>
    refundFor(USUAL_CANCELLATION, cause, paid(now, more)).refundPence;

  test('goes by the notice given, to the minute', () => {
    expect(back('2027-07-10T12:00')).toBe(2801);
    expect(back('2027-07-10T12:01')).toBe(1401);
    expect(back('2027-07-15T12:00')).toBe(1401);
    expect(back('2027-07-15T12:01')).toBe(0);
    expect(back('2027-07-17T12:00')).toBe(0);
  });

  test('is all of it when the fishery closes or the payment came too late, and what is left of it', () => {
    expect(back('2027-07-17T18:00', {}, 'fishery')).toBe(2801);
    expect(back('2027-07-17T18:00', { refundedPence: 1600 }, 'fishery')).toBe(1201);
    expect(back('2027-07-17T18:00', {}, 'paid_too_late')).toBe(2801);
    expect(back('2027-07-16T18:00', {}, 'ban')).toBe(2801);
    expect(back('2027-07-17T18:00', {}, 'ban')).toBe(0);
    expect(back('2027-07-11T12:00', { refundedPence: 2000 })).toBe(0); // half is less than went back already
  });

  test('is all of a season ticket within its days, begun or not', () => {
    const seasonBoughtAt = at('2027-07-16T12:00');
    expect(back('2027-07-30T11:59', { seasonBoughtAt })).toBe(2801);
    expect(back('2027-07-30T12:00', { seasonBoughtAt })).toBe(0);
  });

  test('is never below nought nor more than is left, whatever the policy, and less notice never gives more', () => {
    const policies = fc
      .uniqueArray(fc.integer({ min: 0, max: 400 }), { maxLength: 5 })
      .chain((hours) =>
        fc.tuple(
          fc.constant(hours),
          fc.array(fc.integer({ min: 0, max: 10_000 }), { minLength: hours.length, maxLength: hours.length }),
        ),
      )
      .map(([hours, shares]) => ({
        ...USUAL_CANCELLATION,
        tiers: hours.map((leastNoticeHours, index) => ({
          leastNoticeHours,
          refundShareBp: shares[index] ?? 0,
          freeMove: 'no' as const,
        })),
      }));
    const money = fc.integer({ min: 0, max: 1_000_000 });
    fc.assert(
      fc.property(
        policies,
        fc.constantFrom(...CancellationCause.options),
        fc.record({ takenPence: money, refundedPence: money }),
        fc.integer({ min: -500, max: 500 }),
        (policy, cause, sums, hours) => {
          const now = new Date(start.getTime() - hours * 3_600_000);
          const { refundPence } = refundFor(CancellationPolicy.parse(policy), cause, {
            ...sums,
            start,
            now,
            seasonBoughtAt: null,
          });
          expect(refundPence).toBeGreaterThanOrEqual(0);
          expect(refundPence).toBeLessThanOrEqual(Math.max(0, sums.takenPence - sums.refundedPence));
          expect(Number.isInteger(refundPence)).toBe(true);
        },
      ),
    );
  });

  test('is told before anybody buys', () => {
    expect(policyWords(USUAL_CANCELLATION)).toEqual([
      '7 days or more before: all back or a move to another date.',
      '48 hours or more before: 50 % back or a move to another date.',
      'Later: nothing back, but a move if the peg is let again.',
      'If the fishery closes: all back or a move, as you choose.',
    ]);
  });
});

describe('moving a booking', () => {
  const confirmed = {
    state: 'confirmed' as const,
    start: at('2027-07-17T12:00'),
    until: at('2027-07-18T12:00'),
    movesMade: 0,
    relet: false,
    now: at('2027-07-12T12:00'),
  };
  const why = (
    more: Partial<typeof confirmed>,
    cause: 'angler' | 'closure' | 'staff' = 'angler',
  ): string | null => whyNotMove(USUAL_CANCELLATION, cause, { ...confirmed, ...more });

  test('an angler moves once in good time, later only when the peg is let again', () => {
    expect(why({})).toBeNull();
    expect(why({ movesMade: 1 })).toBe('A ticket can be moved once.');
    expect(why({ now: at('2027-07-16T12:00') })).toContain('once the peg is let again');
    expect(why({ now: at('2027-07-16T12:00'), relet: true })).toBeNull();
    expect(why({ now: at('2027-07-17T13:00') })).toContain('Ask the bailiff');
  });

  test('a closure moves anything that is not over', () => {
    expect(why({ movesMade: 3, now: at('2027-07-17T13:00') }, 'closure')).toBeNull();
    expect(why({ now: at('2027-07-18T12:00') }, 'staff')).toBe('This ticket is over.');
  });

  test('a day in place of 24 hours gives £16.00 back, and a closure never asks for more', () => {
    expect(moveMoney('closure', { paidPence: 2800, newPence: 1200, sameKind: false })).toEqual({
      refundPence: 1600,
      owedPence: 0,
    });
    expect(moveMoney('closure', { paidPence: 1200, newPence: 2800, sameKind: false })).toEqual({
      refundPence: 0,
      owedPence: 0,
    });
    expect(moveMoney('angler', { paidPence: 1200, newPence: 2800, sameKind: false })).toEqual({
      refundPence: 0,
      owedPence: 1600,
    });
    expect(moveMoney('angler', { paidPence: 1200, newPence: 1400, sameKind: true })).toEqual({
      refundPence: 0,
      owedPence: 0,
    });
  });
});

describe('room at a peg', () => {
  const taken = (from: string, until: string, people = 1, rods = 2): Taken => ({
    ...keptInterval({ from: at(from), until: at(until) }, 60),
    people,
    rods,
  });
  const single = { people: 1, rods: 3, exclusive: true };

  test('an hour of turnaround is part of the stay', () => {
    const there = [taken('2027-07-17T12:00', '2027-07-18T12:00')];
    expect(whyNoRoom(single, there, taken('2027-07-18T12:30', '2027-07-18T20:00'))).toBe(
      'It is taken for part of that time.',
    );
    expect(whyNoRoom(single, there, taken('2027-07-18T13:00', '2027-07-18T20:00'))).toBeNull();
    expect(whyNoRoom(single, [], taken('2027-07-18T13:00', '2027-07-18T20:00', 2))).toBe(
      'There is room for one person here.',
    );
    expect(whyNoRoom(single, [], taken('2027-07-18T13:00', '2027-07-18T20:00', 1, 4))).toBe(
      'There is room for 3 rods here.',
    );
  });

  test('people and rods are counted at one instant, not over the whole stretch', () => {
    const double = { people: 2, rods: 4, exclusive: false };
    const there = [
      taken('2027-07-17T06:00', '2027-07-17T10:00'),
      taken('2027-07-17T12:00', '2027-07-17T16:00'),
    ];
    const day = taken('2027-07-17T06:00', '2027-07-17T20:00');
    expect(mostAtOnce(there, day)).toEqual({ people: 1, rods: 2 });
    expect(whyNoRoom(double, there, day)).toBeNull();
    expect(whyNoRoom(double, [...there, taken('2027-07-17T09:00', '2027-07-17T10:00')], day)).toContain(
      'as many people',
    );
  });

  test('the most at once is what counting every minute finds', () => {
    const stays = fc.array(
      fc.record({
        start: fc.nat(50),
        length: fc.integer({ min: 1, max: 30 }),
        people: fc.integer({ min: 1, max: 3 }),
      }),
      { maxLength: 8 },
    );
    const minute = (count: number): Date => new Date(count * 60_000);
    fc.assert(
      fc.property(stays, fc.nat(50), fc.integer({ min: 1, max: 30 }), (list, start, length) => {
        const there = list.map((each) => ({
          from: minute(each.start),
          until: minute(each.start + each.length),
          people: each.people,
          rods: 0,
        }));
        const counts = Array.from({ length }, (_, index) =>
          there
            .filter(({ from, until }) => from <= minute(start + index) && minute(start + index) < until)
            .reduce((sum, { people }) => sum + people, 0),
        );
        const stretch = { from: minute(start), until: minute(start + length) };
        expect(mostAtOnce(there, stretch).people).toBe(Math.max(0, ...counts));
      }),
    );
  });
});

describe('the waiting list', () => {
  const start = at('2027-07-17T12:00');
  const window = (freed: string): string[] | null => {
    const found = claimWindow(at(freed), { start, zone });
    return found && [found.from, found.until].map((each) => each.toISOString());
  };

  test('a place is kept half an hour by day, and quiet hours don’t count', () => {
    expect(window('2027-07-10T14:00')).toEqual(['2027-07-10T13:00:00.000Z', '2027-07-10T13:30:00.000Z']);
    expect(window('2027-07-10T21:30')).toEqual(['2027-07-10T20:30:00.000Z', '2027-07-10T21:00:00.000Z']);
    expect(window('2027-07-10T21:45')).toEqual(['2027-07-10T20:45:00.000Z', '2027-07-11T06:15:00.000Z']);
    expect(window('2027-07-10T22:00')).toEqual(['2027-07-11T06:00:00.000Z', '2027-07-11T06:30:00.000Z']);
    expect(window('2027-07-11T06:59')).toEqual(['2027-07-11T06:00:00.000Z', '2027-07-11T06:30:00.000Z']);
    expect(window('2027-07-17T11:31')).toBeNull();
  });

  test('who joined first is offered first, and who let it go by is not asked twice', () => {
    const place = (id: string, joinedAt: string, more: Partial<WaitingPlace> = {}): WaitingPlace => ({
      id,
      joinedAt: at(joinedAt),
      state: 'waiting',
      passedOver: [],
      ...more,
    });
    const list = [
      place('c', '2027-07-02T12:00'),
      place('b', '2027-07-01T12:00'),
      place('a', '2027-07-01T12:00', { passedOver: ['freed'] }),
      place('d', '2027-06-01T12:00', { state: 'left' }),
    ];
    expect(inOrder(list).map(({ id }) => id)).toEqual(['d', 'a', 'b', 'c']);
    expect(nextInLine(list, 'freed')?.id).toBe('b');
    expect(nextInLine(list, 'another')?.id).toBe('a');
    expect(nextInLine([], 'freed')).toBeNull();
    expect([placeInLine(list, 'c'), placeInLine(list, 'd')]).toEqual([3, null]);
  });
});

test('a rod licence is asked for by the law of the place and the age on the day', () => {
  expect(licenceNeeded('ENG', 12, '2027-07-18').needed).toBe('no');
  expect(licenceNeeded('ENG', 13, '2027-09-25')).toMatchObject({ needed: 'yes', checkedOn: '2026-12-01' });
  expect(licenceNeeded('SCO', 40, '2027-09-25').needed).toBe('no');
  expect(licenceNeeded('IRL', 40, '2027-09-25').needed).toBe('no');
  expect([
    licenceNeeded('NIR', 40, '2027-09-25').needed,
    licenceNeeded('NIR', 15, '2027-09-25').needed,
  ]).toEqual(['yes', 'ask']);
  expect(licenceNeeded('FRA', 40, '2027-09-25').needed).toBe('ask');
  expect(licenceNeeded('ENG', null, '2027-09-25').needed).toBe('ask');
  expect(licenceNeeded('ENG', 40, '2010-09-25').needed).toBe('ask');
  const yes = licenceNeeded('ENG', 40, '2027-07-17');
  const hours = { until: at('2027-07-18T12:00'), zone };
  const shown = (expiresOn: string) => ({ declared: true, lastSix: '', expiresOn });
  expect(licenceWarning(yes, null, hours)).toContain('Have a rod licence');
  expect(licenceWarning(yes, shown('2027-07-17'), hours)).toContain('runs out before');
  expect(licenceWarning(yes, shown('2027-07-18'), hours)).toBeNull();
  expect(licenceWarning(licenceNeeded('SCO', 40, '2027-07-17'), null, hours)).toBeNull();
});
