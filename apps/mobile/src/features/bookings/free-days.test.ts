import type { BoardPeg, BoardView } from '@mereward/shared/bookings/availability-contract';
import { expect, test } from 'vitest';
import { freeOnDay } from './free-days';

const span = (
  from: string,
  until: string | null,
  state: 'held' | 'taken' | 'blocked' | 'closed' = 'taken',
) => ({
  from,
  until,
  fishingUntil: until,
  state,
  words: '',
  closureId: null,
  blockId: null,
  booking: null,
});

const peg = (pegId: string, more: Partial<BoardPeg> = {}): BoardPeg => ({
  pegId,
  number: pegId,
  name: '',
  shut: null,
  shared: false,
  spans: [],
  ...more,
});

const board = (pegs: BoardPeg[]): BoardView => ({
  lakeId: 'lake',
  lakeName: 'Far Ostle',
  fisheryId: 'fishery',
  zone: 'Europe/London',
  from: '2027-07-16T23:00:00.000Z',
  until: '2027-07-30T23:00:00.000Z',
  pegs,
  choosing: [],
  may: { seeWho: false, block: false, book: false },
});

const wish = {
  kind: {
    duration: { kind: 'fixed_hours', starts: '07:00', ends: '19:00' },
    pegIds: null,
    turnaroundMinutes: 60,
  },
  day: '2027-07-17',
  start: null,
  position: [-1, 51],
} as const;

test('a peg counts as free unless something lies over its hours or the hour after', () => {
  const before = peg('a', { spans: [span('2027-07-16T06:00:00.000Z', '2027-07-17T06:00:00.000Z')] }); // ends at 07:00
  const into = peg('b', { spans: [span('2027-07-16T06:00:00.000Z', '2027-07-17T06:00:01.000Z')] });
  const turnaround = peg('c', { spans: [span('2027-07-17T18:30:00.000Z', '2027-07-18T06:00:00.000Z')] }); // 19:30
  const later = peg('d', { spans: [span('2027-07-17T19:00:00.000Z', '2027-07-18T06:00:00.000Z')] }); // 20:00
  expect(freeOnDay([board([before, into, turnaround, later])], wish)).toBe(2);
});

test('a closure until lifted, a shut peg and one the ticket is not for are not free', () => {
  const closed = peg('a', { spans: [span('2027-07-01T00:00:00.000Z', null, 'closed')] });
  const shut = peg('b', { shut: 'Under an overhead line' });
  expect(
    freeOnDay([board([closed, shut, peg('c'), peg('d')])], {
      ...wish,
      kind: { ...wish.kind, pegIds: ['d'] },
    }),
  ).toBe(1);
});

test('a peg strangers share stays free while places are taken, and not while it is closed', () => {
  const over = (state: 'taken' | 'closed') =>
    peg(state, {
      shared: true,
      spans: [span('2027-07-17T06:00:00.000Z', '2027-07-17T18:00:00.000Z', state)],
    });
  expect(freeOnDay([board([over('taken'), over('closed')])], wish)).toBe(1);
});

test('where the hours leave a start open that is not chosen there is no number', () => {
  const duration = {
    kind: 'elapsed',
    hours: 24,
    startsFrom: '07:00',
    startsUntil: '19:00',
    startStepMinutes: 60,
    clockChange: 'elapsed_hours',
  } as const;
  expect(freeOnDay([board([peg('a')])], { ...wish, kind: { ...wish.kind, duration } })).toBeNull();
  expect(freeOnDay([], wish)).toBeNull();
});
