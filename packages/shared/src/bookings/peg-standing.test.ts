import { expect, test } from 'vitest';
import type { Room } from './peg-room';
import { pegStanding, placesLeft, type PegSpan, type PegWish } from './peg-standing';

const at = (hour: number): Date => new Date(Date.UTC(2027, 6, 17, hour));
const span = (more: Partial<PegSpan> = {}): PegSpan => ({
  from: at(7),
  until: at(20),
  fishingUntil: at(19),
  state: 'taken',
  people: 1,
  rods: 2,
  words: '',
  ...more,
});
const wish = (from: number, until: number, more: Partial<PegWish> = {}): PegWish => ({
  hours: { from: at(from), until: at(until) },
  kept: { from: at(from), until: at(until + 1) },
  people: 1,
  rods: 2,
  ...more,
});
const whole: Room = { people: 2, rods: 4, exclusive: true };
const shared: Room = { people: 3, rods: 6, exclusive: false };

test('a peg let whole is taken from the start of its ticket to the end of its turnaround', () => {
  expect(pegStanding(whole, [span()], wish(19, 22)).state).toBe('taken');
  expect(pegStanding(whole, [span()], wish(20, 22)).state).toBe('free');
  expect(pegStanding(whole, [span()], wish(3, 6)).state).toBe('free');
  expect(pegStanding(whole, [span()], wish(3, 7)).state).toBe('taken'); // its own turnaround would run into it
});

test('a closure outweighs a block, and that a booking', () => {
  const closed = span({ state: 'closed', words: 'Algae' });
  const blocked = span({ state: 'blocked' });
  expect(pegStanding(whole, [span(), blocked, closed], wish(8, 9))).toEqual({
    state: 'closed',
    whyNot: 'Algae',
  });
  expect(pegStanding(whole, [span(), blocked], wish(8, 9)).state).toBe('blocked');
});

test('a peg that only a hold keeps is told as held', () => {
  expect(pegStanding(whole, [span({ state: 'held' })], wish(8, 9)).state).toBe('held');
  expect(pegStanding(whole, [span({ state: 'held' }), span()], wish(8, 9)).state).toBe('taken');
});

test('a peg let place by place is free while it has room for people and rods', () => {
  expect(pegStanding(shared, [span(), span()], wish(8, 9)).state).toBe('free');
  expect(pegStanding(shared, [span(), span(), span({ rods: 1 })], wish(8, 9)).state).toBe('taken');
  expect(pegStanding(shared, [span(), span()], wish(8, 9, { rods: 3 })).state).toBe('taken');
  expect(pegStanding(shared, [span(), span(), span({ state: 'held' })], wish(8, 9)).state).toBe('held');
  expect(pegStanding(shared, [span({ state: 'blocked', people: 0 })], wish(8, 9)).state).toBe('blocked');
});

test('those who follow one another on a shared peg are not counted together', () => {
  const spans = [span({ until: at(12), fishingUntil: at(12), people: 3 }), span({ from: at(12), people: 2 })];
  expect(placesLeft(shared, spans, wish(12, 19))).toBe(1);
  expect(placesLeft(shared, spans, wish(10, 19))).toBe(0);
  expect(placesLeft(shared, [], wish(10, 19))).toBe(3);
});
