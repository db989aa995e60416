import { describe, expect, test } from 'vitest';
import { chartChecks } from './chart-checks';
import type { CheckInput } from './chart-checks';

const square = [
  { xM: 0, yM: 0 },
  { xM: 100, yM: 0 },
  { xM: 100, yM: 100 },
  { xM: 0, yM: 100 },
];
const good: CheckInput = {
  outline: { shore: square, islands: [] },
  casts: [
    { id: 'a', label: 'cast 1', xM: 20, yM: 20, depthM: 1 },
    { id: 'b', label: 'cast 2', xM: 21, yM: 20, depthM: 2 },
    { id: 'c', label: 'cast 3', xM: 60, yM: 20, depthM: null },
  ],
  visits: [
    {
      id: 'v',
      label: 'April visit',
      gaugeStartM: 0.62,
      gaugeEndM: 0.67,
      stickCheckedOn: '2026-04-03',
      visitedOn: '2027-04-03',
    },
  ],
  pegs: [{ id: 'p', label: 'peg 7', arcShare: 0.6, repeatsShare: 0.1 }],
};

const check = (input: Partial<CheckInput>, key: string) =>
  chartChecks({ ...good, ...input }).find((c) => c.key === key)!;

describe('checks before publishing', () => {
  test('a survey on every limit passes all of them', () => {
    expect(chartChecks(good).map((c) => [c.key, c.state, c.blocks])).toEqual([
      ['casts_on_water', 'passed', false],
      ['neighbours_agree', 'passed', false],
      ['depths_in_order', 'passed', false],
      ['levels_read', 'passed', false],
      ['level_steady', 'passed', false],
      ['sticks_taped', 'passed', false],
      ['arcs_covered', 'passed', false],
      ['casts_repeated', 'passed', false],
    ]);
  });

  test('a cast six metres outside the outline blocks and is told by how far', () => {
    const outside = { id: 'far', label: 'cast 9', xM: 106, yM: 50, depthM: 1 };
    const found = check({ casts: [...good.casts, outside] }, 'casts_on_water');
    expect(found).toMatchObject({ state: 'failed', blocks: true, ids: ['far'] });
    expect(found.words).toContain('cast 9 lies 6.0 m outside');
  });

  test('a cast on an island blocks', () => {
    const island = [
      { xM: 50, yM: 50 },
      { xM: 50, yM: 60 },
      { xM: 60, yM: 60 },
      { xM: 60, yM: 50 },
    ];
    const outline = { shore: square, islands: [island] };
    const casts = [{ id: 'dry', label: 'cast 4', xM: 55, yM: 55, depthM: 1 }];
    expect(check({ outline, casts }, 'casts_on_water')).toMatchObject({ blocks: true, ids: ['dry'] });
  });

  test('neighbours that differ by more than a metre warn and are both named', () => {
    const casts = [good.casts[0]!, { id: 'd', label: 'cast 5', xM: 20, yM: 21.9, depthM: 2.01 }];
    const found = check({ casts }, 'neighbours_agree');
    expect(found).toMatchObject({ state: 'warning', blocks: false, ids: ['a', 'd'] });
    expect(found.words).toContain('cast 1 and cast 5 by 1.0 m');
  });

  test('a visit without its end reading blocks', () => {
    const visits = [{ ...good.visits[0]!, gaugeEndM: null }];
    const found = check({ visits }, 'levels_read');
    expect(found).toMatchObject({ state: 'failed', blocks: true, ids: ['v'] });
    expect(found.words).toContain('April visit has no reading at its end');
  });

  test('a level that moved six centimetres warns', () => {
    const visits = [{ ...good.visits[0]!, gaugeEndM: 0.56 }];
    expect(check({ visits }, 'level_steady')).toMatchObject({ state: 'warning', blocks: false, ids: ['v'] });
    expect(check({ visits }, 'level_steady').words).toContain('down 0.06 m');
  });

  test.each([null, '2026-04-02'])('sticks last taped %s block a visit of 3 April 2027', (stickCheckedOn) => {
    const visits = [{ ...good.visits[0]!, stickCheckedOn }];
    expect(check({ visits }, 'sticks_taped')).toMatchObject({ state: 'failed', blocks: true, ids: ['v'] });
  });

  test('a thin arc and too few repeats warn', () => {
    const pegs = [{ id: 'p', label: 'peg 7', arcShare: 0.59, repeatsShare: 0.09 }];
    expect(check({ pegs }, 'arcs_covered').words).toContain('peg 7 59 %');
    expect(check({ pegs }, 'casts_repeated')).toMatchObject({ state: 'warning', ids: ['p'] });
  });

  test('of many findings three are named and all their ids given', () => {
    const casts = Array.from({ length: 5 }, (_, i) => {
      return { id: `o${i}`, label: `cast ${i}`, xM: 110 + i, yM: 50, depthM: 1 };
    });
    const found = check({ casts }, 'casts_on_water');
    expect(found.ids).toHaveLength(5);
    expect(found.words).toContain('cast 4 lies 14.0 m outside');
    expect(found.words).toContain('and 2 more');
  });
});
