import { expect, test } from 'vitest';
import { guessMapping, repeatedHeadings } from './casts-mapping';

test('columns are recognised by their usual names, in any case and order', () => {
  expect(guessMapping(['Notes', 'Wraps', 'SWIM', 'Far-bank mark', 'Pulls', 'colour'])).toEqual({
    note: 0,
    wraps_whole: 1,
    peg: 2,
    mark: 3,
    depth_pulls: 4,
  });
});

test('a true bearing is never taken for the compass’s own', () => {
  expect(guessMapping(['bearing_deg_true'])).toEqual({});
  expect(guessMapping(['bearing_deg_true', 'bearing_deg_magnetic'])).toEqual({ bearing_deg_magnetic: 1 });
});

test('no column feeds two of ours', () => {
  const mapping = guessMapping(['peg', 'peg_no', 'wraps', 'whole_wraps']);
  expect(new Set(Object.values(mapping)).size).toBe(Object.values(mapping).length);
});

test('headings that stand twice are told, empty ones are not', () => {
  expect(repeatedHeadings(['peg', 'Depth m', '', 'depth_m', ''])).toEqual(['depth_m']);
});
