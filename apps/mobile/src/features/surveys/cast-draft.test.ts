import { expect, test } from 'vitest';
import {
  CastDraft,
  closerIn,
  EMPTY_CAST,
  incomplete,
  isBegun,
  nextThrow,
  observationOf,
  typedAgain,
} from './cast-draft';

const MARK = '7d9f3c52-0a57-4b0e-9a43-6f2c4f2f7a10';
const typed = {
  ...EMPTY_CAST,
  pegId: 'peg',
  aim: MARK,
  wrapsWhole: 14,
  remainder: '3',
  drop: 'sharp_crack' as const,
  pulls: '8',
};

test('what is typed becomes the observation, feet turned into metres and the text kept', () => {
  const observation = observationOf(CastDraft.parse(typed));
  expect(observation).toMatchObject({
    aim: { by: 'mark', markId: MARK, offsetDeg: 0 },
    wrapsWhole: 14,
    remainderStated: true,
    lineText: '14 + 3 ft',
    pulls: 8,
    cameBack: null,
  });
  expect(observation?.remainderM).toBeCloseTo(0.9144, 12);
});

test('nothing typed beside the wraps is a remainder nobody stated', () => {
  const observation = observationOf(CastDraft.parse({ ...typed, remainder: '' }));
  expect(observation).toMatchObject({ remainderM: 0, remainderStated: false, lineText: '14' });
});

test('a decimal comma is read as a decimal point', () => {
  const read = CastDraft.parse({ ...typed, remainder: '6,5', remainderUnit: 'in' });
  expect(observationOf(read)?.remainderM).toBeCloseTo(0.1651, 12);
});

test('the next throw keeps where one stands and aims, and forgets what was felt', () => {
  const next = nextThrow({ ...typed, lineId: 'line' });
  expect(next).toMatchObject({ pegId: 'peg', aim: MARK, wrapsWhole: 14, drop: null, pulls: '', lineId: '' });
});

test('a reading closer in stays on its throw, two wraps less and never below one', () => {
  expect(closerIn(typed, 'line')).toMatchObject({
    wrapsWhole: 12,
    lineId: 'line',
    drop: null,
    remainder: '',
  });
  expect(closerIn({ ...typed, wrapsWhole: 2 }, 'line').wrapsWhole).toBe(1);
});

test('missing wraps and a missing compass bearing are said, and nothing is guessed', () => {
  const read = CastDraft.parse({ ...typed, aim: 'compass', wrapsWhole: null });
  expect(incomplete(read).map(({ field }) => field)).toEqual(['wrapsWhole', 'compassDeg']);
  expect(observationOf(read)).toBeNull();
});

test('a kept cast comes back into the form as it was typed', () => {
  const observation = observationOf(CastDraft.parse(typed));
  if (!observation) throw new Error('The cast is whole');
  expect(typedAgain({ pegId: 'peg', observation })).toMatchObject({
    aim: MARK,
    wrapsWhole: 14,
    remainder: '3',
  });
});

test('more left over than any sticks stand apart is refused: the unit is wrong', () => {
  expect(CastDraft.safeParse({ ...typed, remainder: '300', remainderUnit: 'mm' }).success).toBe(true);
  expect(CastDraft.safeParse({ ...typed, remainder: '300', remainderUnit: 'ft' }).success).toBe(false);
});

test('a kept cast comes back in the unit it was typed in', () => {
  const observation = observationOf(CastDraft.parse({ ...typed, remainder: '900', remainderUnit: 'mm' }));
  expect(observation).not.toBeNull();
  if (observation)
    expect(typedAgain({ pegId: 'peg', observation })).toMatchObject({
      remainder: '900',
      remainderUnit: 'mm',
    });
});

test('a cast is begun by what is felt or counted, not by what was carried forward', () => {
  expect(isBegun(nextThrow({ ...typed, castId: 'kept', sentAt: 'then' }))).toBe(false);
  expect(isBegun({ ...nextThrow(typed), cameBack: ['sand'] })).toBe(true);
  expect(isBegun({ ...nextThrow(typed), pulls: '8' })).toBe(true);
});

test('the next throw is another cast: it goes under an id of its own', () => {
  expect(nextThrow({ ...typed, castId: 'kept', sentAt: 'then' })).toMatchObject({ castId: '', sentAt: '' });
});
