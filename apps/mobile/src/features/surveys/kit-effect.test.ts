import type { CastView, Grade } from '@mereward/shared/surveys/contract';
import { NOTHING_FELT } from '@mereward/shared/surveys/nothing-felt';
import { expect, test } from 'vitest';
import { kitEffect } from './kit-effect';

type Place = { xM: number; yM: number; depthM: number | null; grade?: Grade };

const observation: CastView['observation'] = {
  aim: { by: 'compass', bearingDeg: 10, method: 'estimated' },
  sidestepM: 0,
  wrapsWhole: 10,
  remainderM: 0,
  remainderStated: true,
  lineText: '10 + 0 ft',
  rodElevationDeg: 0,
  ...NOTHING_FELT,
  flags: [],
};

function aCast(seq: number, place: Place | null): CastView {
  const kept = { id: `cast ${seq}`, visitId: 'v', pegId: 'p', seq, lineId: 'l', observedAt: '', observation };
  if (place === null) return { ...kept, reduced: { ok: false, reason: 'On land', remedy: '', steps: [] } };
  return {
    ...kept,
    reduced: {
      ok: true,
      steps: [],
      sounding: {
        position: [0, 0],
        rangeM: 30,
        lineOutM: 36,
        bearingDeg: 10,
        covariance: { xx: 1, xy: 0, yy: 1 },
        ellipse: { semiMajorM: 2, semiMinorM: 2, bearingDeg: 0 },
        depthAsReadM: place.depthM,
        depthSigmaM: 0.1,
        gradeReasons: [],
        substrate: null,
        cover: null,
        bottom: 'gravel',
        bottomWords: 'Gravel',
        askAgain: false,
        warnings: [],
        grade: 'A',
        ...place,
      },
    },
  };
}

test('a longer stick moves casts and leaves depths: only what changed is listed', () => {
  const before = [aCast(1, { xM: 0, yM: 30, depthM: 2 }), aCast(2, { xM: 0, yM: 40, depthM: 2.5 })];
  const after = [aCast(1, { xM: 3, yM: 34, depthM: 2 }), aCast(2, { xM: 0, yM: 40.001, depthM: 2.5 })];
  const effect = kitEffect(before, after);
  expect(effect.moved).toEqual({ count: 1, meanM: 5, mostM: 5 });
  expect(effect.depths.count).toBe(0);
  expect(effect.changed.map(({ seq }) => seq)).toEqual([1]);
});

test('the mean change of depth keeps its sign, and a depth that was not read does not count', () => {
  const before = [
    aCast(1, { xM: 0, yM: 0, depthM: 2 }),
    aCast(2, { xM: 0, yM: 0, depthM: 3 }),
    aCast(3, { xM: 0, yM: 0, depthM: null }),
  ];
  const after = [
    aCast(1, { xM: 0, yM: 0, depthM: 1.9 }),
    aCast(2, { xM: 0, yM: 0, depthM: 2.7 }),
    aCast(3, { xM: 0, yM: 0, depthM: null }),
  ];
  const { depths } = kitEffect(before, after);
  expect(depths.count).toBe(2);
  expect(depths.meanM).toBeCloseTo(-0.2, 12);
  expect(depths.mostM).toBeCloseTo(0.3, 12);
});

test('a cast that can no longer be reduced is told as such', () => {
  const [change] = kitEffect([aCast(1, { xM: 0, yM: 0, depthM: 2 })], [aCast(1, null)]).changed;
  expect(change).toMatchObject({ movedM: null, grade: { before: 'A', after: 'not reduced' } });
});

test('a change of grade counts even where nothing moved', () => {
  const effect = kitEffect(
    [aCast(1, { xM: 0, yM: 0, depthM: 2 })],
    [aCast(1, { xM: 0, yM: 0, depthM: 2, grade: 'B' })],
  );
  expect(effect).toMatchObject({ grades: 1, bottoms: 0, casts: 1 });
});
