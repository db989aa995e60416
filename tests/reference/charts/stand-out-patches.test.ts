import {
  bottomMap,
  classWeights,
  likeliestClasses,
  type BottomEvidence,
} from '@mereward/shared/charts/bottom-map';
import { standOutPatches } from '@mereward/shared/charts/stand-out-patches';
import { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { describe, expect, test } from 'vitest';

/**
 * An invented bed felt on an even net of casts: silt everywhere but for a disc of gravel. Sizes are known; the map blurs an
 * edge by its bandwidth, so a disc's area is right to a ring of one cast spacing (2 m). Common practice, no published source.
 */
const frame = { columns: 81, rows: 81, cellM: 1, originM: { xM: -40, yM: -40 } };
const nodes = { frame, nodes: Int32Array.from({ length: 81 * 81 }, (_, node) => node) };

function felt(kindAt: (x: number, y: number) => number, kinds: number): BottomEvidence[] {
  const casts: BottomEvidence[] = [];
  for (let x = -39; x <= 39; x += 2)
    for (let y = -39; y <= 39; y += 2) {
      const sure = kindAt(x, y);
      const shares = Array.from({ length: kinds }, (_, kind) => (kind === sure ? 0.9 : 0.1 / (kinds - 1)));
      casts.push({ xM: x, yM: y, shares });
    }
  return casts;
}

const silt = Substrate.options.indexOf('silt');
const gravel = Substrate.options.indexOf('gravel');
const weed = Cover.options.indexOf('low_weed');
const clear = Cover.options.indexOf('clear');

function patchesOf(layer: 'substrate' | 'cover', kindAt: (x: number, y: number) => number) {
  const evidence = felt(kindAt, 5);
  const weights = classWeights(evidence, frame, 2);
  return standOutPatches([{ layer, map: likeliestClasses(weights, nodes), weights }]);
}
const disc = (x: number, y: number, radiusM: number) => (px: number, py: number) =>
  Math.hypot(px - x, py - y) <= radiusM;

test('the map chosen from weights is the bottom map itself', () => {
  const evidence = felt((x) => (x < 0 ? silt : gravel), 5);
  expect(likeliestClasses(classWeights(evidence, frame, 2), nodes)).toEqual(bottomMap(evidence, nodes, 2));
});

describe('a gravel disc of 5 m radius in silt', () => {
  const patches = patchesOf('substrate', (x, y) => (disc(10, -8, 5)(x, y) ? gravel : silt));

  test('stands out alone, in its place and size', () => {
    expect(patches).toHaveLength(1);
    const [patch] = patches;
    expect(patch).toMatchObject({ rank: 1, bottom: 'gravel', around: 'silt' });
    expect(Math.hypot(patch!.xM - 10, patch!.yM + 8)).toBeLessThanOrEqual(1);
    expect(patch!.areaM2).toBeGreaterThan(Math.PI * 3 ** 2);
    expect(patch!.areaM2).toBeLessThan(Math.PI * 7 ** 2);
  });

  test('has a contrast no greater than its confidence', () => {
    const [patch] = patches;
    expect(patch!.contrast).toBeGreaterThan(0.4);
    expect(patch!.contrast).toBeLessThan(patch!.confidence);
    expect(patch!.words).toMatch(/^Gravel in silt, about \d+ m across; \d\d % sure of it$/);
  });
});

test('a clear hole in weed stands out', () => {
  const [patch] = patchesOf('cover', (x, y) => (disc(0, 0, 4)(x, y) ? clear : weed));
  expect(patch).toMatchObject({ bottom: 'clear', around: 'low_weed' });
});

test('half a lake of gravel is no patch, nor is an even bottom', () => {
  expect(patchesOf('substrate', (x) => (x < 0 ? silt : gravel))).toEqual([]);
  expect(patchesOf('substrate', () => silt)).toEqual([]);
});

test('the surer and sharper of two patches is ranked first', () => {
  const evidence = felt((x, y) => (disc(-20, 0, 5)(x, y) || disc(20, 0, 5)(x, y) ? gravel : silt), 5).map(
    (cast) =>
      cast.xM > 0 && cast.shares[gravel]! > 0.5 ? { ...cast, shares: [0.2, 0.05, 0.05, 0.65, 0.05] } : cast,
  );
  const weights = classWeights(evidence, frame, 2);
  const patches = standOutPatches([{ layer: 'substrate', map: likeliestClasses(weights, nodes), weights }]);
  expect(patches.map(({ xM }) => Math.sign(xM))).toEqual([-1, 1]);
});

test('a snag is never put forward', () => {
  const snag = Cover.options.indexOf('snag');
  expect(patchesOf('cover', (x, y) => (disc(0, 0, 4)(x, y) ? snag : clear))).toEqual([]);
});

test('a patch whose surroundings nobody felt does not stand out from them', () => {
  const evidence = felt((x, y) => (disc(0, 0, 5)(x, y) ? gravel : silt), 5).filter((cast) =>
    disc(0, 0, 5)(cast.xM, cast.yM),
  );
  const weights = classWeights(evidence, frame, 2);
  expect(standOutPatches([{ layer: 'substrate', map: likeliestClasses(weights, nodes), weights }])).toEqual(
    [],
  );
});
