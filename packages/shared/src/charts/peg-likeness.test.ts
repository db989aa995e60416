import fc from 'fast-check';
import { expect, test } from 'vitest';
import { pegLikeness, type PegProfile } from './peg-likeness';

const details: PegProfile['details'] = {
  access: { fromParkingM: 120, surface: '', steepest: '', steps: 0, gates: '', barrow: 'yes', winter: '' },
  stepFree: { kind: 'measured_suitable', facts: '' },
  platform: { kind: 'timber', widthM: 2, lengthM: 2, heightM: 0.3, inspectedOn: null, state: '' },
  people: 1,
};
const profile = (wishes: Partial<PegProfile> = {}): PegProfile => ({
  depthsM: [1, 2, 2.5, null],
  bottoms: { gravel: 0.6, silt: 0.4 },
  covers: { clear: 1 },
  details,
  ...wishes,
});

test('a peg is wholly like itself', () => {
  const { likeness, alike, differs } = pegLikeness(profile(), profile());
  expect(likeness).toBeCloseTo(1, 12);
  expect(differs).toEqual([]);
  expect(alike).toContain('Mostly gravel too (60 %, here 60 %).');
});

test('a silted, shallower peg up three steps is told apart in words', () => {
  const other = profile({
    depthsM: [0.4, 0.8, 1, null],
    bottoms: { silt: 0.9, clay: 0.1 },
    details: {
      ...details,
      access: { ...details.access, steps: 3 },
      stepFree: { kind: 'not_suitable', facts: '' },
    },
  });
  const { likeness, differs } = pegLikeness(profile(), other);
  expect(likeness).toBeLessThan(0.6);
  expect(differs).toEqual([
    'Mostly silt (90 %); here mostly gravel.',
    '1.1 m shallower on average.',
    'Not step-free; this peg is step-free, measured.',
    '3 steps; this peg has no steps.',
  ]);
});

test('what is not known of both is not held against either', () => {
  const blind = profile({ depthsM: null, bottoms: null, covers: null });
  expect(pegLikeness(blind, profile()).likeness).toBeCloseTo(1, 12);
  const nothing: PegProfile = {
    ...blind,
    details: {
      ...details,
      access: { ...details.access, fromParkingM: null, steps: null, barrow: 'unknown' },
      stepFree: { kind: 'unknown', facts: '' },
    },
  };
  expect(pegLikeness(nothing, nothing)).toEqual({ likeness: 0, alike: [], differs: [] });
});

test('likeness is between nought and one, and the same both ways', () => {
  const share = fc.double({ min: 0, max: 1, noNaN: true });
  const some = fc.record({
    gravel: share,
    depth: fc.double({ min: 0, max: 6, noNaN: true }),
    steps: fc.nat(20),
  });
  const made = ({ gravel, depth, steps }: { gravel: number; depth: number; steps: number }) =>
    profile({
      bottoms: { gravel, silt: 1 - gravel },
      depthsM: [depth / 2, depth],
      details: { ...details, access: { ...details.access, steps } },
    });
  fc.assert(
    fc.property(some, some, (a, b) => {
      const there = pegLikeness(made(a), made(b)).likeness;
      expect(there).toBeGreaterThanOrEqual(0);
      expect(there).toBeLessThanOrEqual(1 + 1e-12);
      expect(pegLikeness(made(b), made(a)).likeness).toBeCloseTo(there, 12);
    }),
  );
});
