import { expect, test } from 'vitest';
import { passes, pegsOf } from './office-booking-words';

const booking = { status: 'confirmed' as const, grossPence: 2800, paidPence: 0, notYet: [] };

test('what is to be paid is no longer so once it is paid or cancelled', () => {
  expect(passes(booking, 'to_pay')).toBe(true);
  expect(passes({ ...booking, paidPence: 2800 }, 'to_pay')).toBe(false);
  expect(passes({ ...booking, status: 'cancelled_by_angler' }, 'to_pay')).toBe(false);
});

test('a ticket that does not count yet is found while it may still be used', () => {
  const unread = { ...booking, notYet: ['The rules are to be read.'] };
  expect(passes(unread, 'not_good')).toBe(true);
  expect(passes({ ...unread, status: 'expired' }, 'not_good')).toBe(false);
});

test('pegs are listed by number, and a ticket without one says when it is chosen', () => {
  const peg = (number: string) => ({ pegId: number, number, name: '' });
  expect(pegsOf({ pegs: [peg('FO7'), peg('FO8')] })).toBe('FO7, FO8');
  expect(pegsOf({ pegs: [] })).toBe('on arrival');
});
