import type { BoardSpan, BoardView } from '@mereward/shared/bookings/availability-contract';
import { expect, test } from 'vitest';
import { boardLines, spanName, spanTimes, spanWords } from './board-words';

const ZONE = 'Europe/London';
const taken: BoardSpan = {
  from: '2027-07-17T06:00:00Z',
  until: '2027-07-17T20:00:00Z',
  fishingUntil: '2027-07-17T19:00:00Z',
  state: 'taken',
  words: '',
  closureId: null,
  blockId: null,
  booking: {
    id: '6a1c1c0e-6f0f-4d0c-8a67-1f6c0b7e1a11',
    code: '7KDMXP',
    holder: 'Ada Reed',
    status: 'confirmed',
    people: 1,
    rods: 2,
  },
};
const closed: BoardSpan = {
  ...taken,
  state: 'closed',
  until: null,
  fishingUntil: null,
  words: 'Algae',
  booking: null,
};

test('staff read who has a peg, until when they fish and by which code', () => {
  expect(spanName(taken)).toBe('Ada Reed');
  expect(spanWords(taken, ZONE)).toMatch(/^taken, Ada Reed, 7KD MXP, Sat 17 July 2027, 07:00.* to 20:00/);
});

test('a stranger reads how it stands and no more', () => {
  expect(spanName({ ...taken, booking: null })).toBe('taken');
});

test('a closure without an end says so', () => {
  expect(spanTimes(closed, ZONE)).toMatch(/^from Sat 17 July 2027, 07:00.* until lifted$/);
  expect(spanName(closed)).toBe('Algae');
});

test('tickets that choose on arrival have a line of their own, when there are any', () => {
  const board = { pegs: [], choosing: [] as BoardSpan[] } as unknown as BoardView;
  expect(boardLines(board)).toEqual([]);
  expect(boardLines({ ...board, choosing: [taken] }).map(({ title }) => title)).toEqual(['On arrival']);
});
