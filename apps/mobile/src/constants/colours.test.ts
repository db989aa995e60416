import { describe, expect, test } from 'vitest';
import { colours, type Colours } from './colours';
import { contrast } from './contrast';

type Pair = readonly [fore: keyof Colours, ground: keyof Colours];

const grounds = ['paper', 'sheet'] as const;
const words = ['ink', 'inkSoft', 'water', 'float', 'reed', 'amber', 'brick'] as const;
const shapes = ['edge', 'water', 'float', 'reed', 'amber', 'brick', 'ink'] as const;

const text: Pair[] = [
  ...grounds.flatMap((ground) => words.filter((w) => w !== 'float').map((word): Pair => [word, ground])),
  ['onFloat', 'float'],
  ['onBrick', 'brick'],
  ['water', 'waterTint'],
  ['ink', 'waterTint'],
  ['ink', 'floatTint'],
  ['inkSoft', 'waterTint'],
  ['inkSoft', 'floatTint'],
  ['ink', 'reedTint'],
  ['reed', 'reedTint'],
  ['ink', 'amberTint'],
  ['amber', 'amberTint'],
  ['ink', 'brickTint'],
  ['brick', 'brickTint'],
  ['paper', 'ink'],
];

describe.each(['light', 'dusk'] as const)('in the %s theme', (name) => {
  const theme = colours[name];

  test.each(text)('%s on %s is readable as text (4.5:1)', (fore, ground) => {
    expect(contrast(theme[fore], theme[ground])).toBeGreaterThanOrEqual(4.5);
  });

  test.each(shapes.flatMap((shape) => grounds.map((ground): Pair => [shape, ground])))(
    '%s on %s can be told apart as a shape (3:1)',
    (fore, ground) => {
      expect(contrast(theme[fore], theme[ground])).toBeGreaterThanOrEqual(3);
    },
  );
});

test('contrast agrees with the published extremes and refuses what is not a colour', () => {
  expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 10);
  expect(contrast('#777777', '#FFFFFF')).toBeCloseTo(4.48, 2); // the well-known grey that just fails AA
  expect(contrast('#123456', '#123456')).toBe(1);
  expect(() => contrast('red', '#FFFFFF')).toThrow(RangeError);
});
