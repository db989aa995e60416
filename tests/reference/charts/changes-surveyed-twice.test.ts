// Invented beds in closed form, surveyed twice at different places with the errors of casts (0.1 m of depth, 0.4 m of place: a
// careful bank survey, common practice), charted whole and held against one another; seeds fixed. Two surveys of one bed
// tell a change once in twenty comparisons at most (CHANGE_LIMITS.byChance). A change known to lie in a box is told in
// its place; its edges are known no better than to half the 5.5 m between casts, so the area told lies between that of the box
// less and plus so much all round; its depth, the edge's slope with it, within 0.15 m.
import { chartChanges } from '@mereward/shared/charts/chart-changes';
import { gridAt } from '@mereward/shared/charts/chart-reading';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import { describe, expect, test } from 'vitest';
import { surveyed } from '../../support/surveyed-twice';

/** A shelf that drops 1.6 m over some two metres, along a wavy line, and level bottoms on both sides. */
const step = (x: number, y: number) => 2.4 + 0.8 * Math.tanh((x - 6 * Math.sin(y / 15)) / 1) + x / 200;
const box = (x: number, y: number) => Math.abs(x - 22) <= 9 && Math.abs(y + 5) <= 9;
const DEPTH = { depth: true, bottom: false };
const changesOf = (before: typeof step, after: typeof step, seed: number) => {
  const then = surveyed(before, seed);
  const now = surveyed(after, seed + 1);
  return { then, now, ...chartChanges(now, { ...then, shiftM: 0 }, DEPTH) };
};

test('a steep step sounded twice at other places is no change, though the two surfaces differ beside it', () => {
  let told = 0;
  let subtractedM2 = 0;
  for (let seed = 300; seed < 320; seed += 2) {
    const { now, then, areas } = changesOf(step, step, seed);
    if (areas.length > 0) told++;
    const { depth, sigma } = now.layers;
    depth.values.forEach((depthM, node) => {
      if (!isSurveyed(depthM)) return;
      const place = {
        xM: columnXM(depth, node % depth.columns),
        yM: rowYM(depth, Math.floor(node / depth.columns)),
      };
      const before = gridAt(then.layers.depth, place);
      const beforeSigmaM = gridAt(then.layers.sigma, place);
      if (before === null || beforeSigmaM === null) return;
      if (Math.abs(depthM - before) > 1.96 * Math.hypot(sigma.values[node]!, beforeSigmaM)) subtractedM2++;
    });
  }
  expect(subtractedM2).toBeGreaterThan(12); // what subtracting would tell
  expect(told).toBeLessThanOrEqual(1);
});

describe('half a metre of silt in a box of 18 × 18 m on one side of the step', () => {
  test.each([400, 410, 420, 430])('is told, in its place and size (seed %i)', (seed) => {
    const { areas } = changesOf(step, (x, y) => step(x, y) - (box(x, y) ? 0.5 : 0), seed);
    const [silting] = areas;
    expect(areas).toHaveLength(1);
    expect(silting!.kind).toBe('shallower');
    expect(Math.hypot(silting!.xM - 22, silting!.yM + 5)).toBeLessThan(0.8 * 5.5);
    expect(silting!.areaM2).toBeGreaterThan((18 - 5.5) ** 2);
    expect(silting!.areaM2).toBeLessThan((18 + 5.5) ** 2);
    expect(Math.abs(silting!.meanChangeM! + 0.5)).toBeLessThan(0.15);
  });
});
