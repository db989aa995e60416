import { expect, test } from 'vitest';
import { isQuiet, quietEnd, sendingTime } from './quiet-hours';
import { instantOf } from './zoned';

const zone = 'Europe/London';
const at = (civil: string): Date => instantOf(civil, zone).at;

test('letters wait from ten at night to seven by the lake’s clock, danger goes at once', () => {
  expect([isQuiet(at('2027-07-17T21:59'), zone), isQuiet(at('2027-07-17T22:00'), zone)]).toEqual([
    false,
    true,
  ]);
  expect([isQuiet(at('2027-07-17T06:59'), zone), isQuiet(at('2027-07-17T07:00'), zone)]).toEqual([
    true,
    false,
  ]);
  expect(sendingTime(at('2027-07-17T23:10'), zone)).toEqual(at('2027-07-18T07:00'));
  expect(sendingTime(at('2027-07-18T02:10'), zone)).toEqual(at('2027-07-18T07:00'));
  expect(sendingTime(at('2027-07-18T02:10'), zone, true)).toEqual(at('2027-07-18T02:10'));
  expect(sendingTime(at('2027-07-18T12:00'), zone)).toEqual(at('2027-07-18T12:00'));
});

test('the night the clock goes forward ends at seven all the same', () => {
  expect(quietEnd(at('2027-03-27T22:00'), zone)).toEqual(new Date('2027-03-28T06:00:00Z'));
});
