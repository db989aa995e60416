import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Disagree, type Found, type FoundAt } from './disagreement';
import {
  foundAtDatum,
  foundBottom,
  foundShares,
  gradeOfReport,
  reportEvidence,
  sigmasApart,
} from './reported-evidence';

const found = (wishes: Partial<Found> = {}): Found => ({
  depthM: 2.4,
  depthBy: 'float',
  bottom: null,
  snag: false,
  weed: null,
  note: '',
  ...wishes,
});
const id = '0b9c3f5e-54a4-4f3b-9c7f-2f8b8d6f1a10';
const counted: FoundAt = {
  by: 'count',
  markId: id,
  offsetDeg: 0,
  wrapsWhole: 14,
  remainderM: 0,
  stickSpacingM: 3.6576,
  wrapReference: 'lead_to_rod_tip',
};
const touched: FoundAt = { by: 'place', position: [0, 50] };
const place = { xM: 1, yM: 2, ellipse: { semiMajorM: 3, semiMinorM: 3, bearingDeg: 0 } };

describe('a report', () => {
  const asked = (wishes: Partial<Found>) =>
    Disagree.safeParse({ id, day: '2027-07-17', at: counted, found: found(wishes) });

  test('must say something that was found', () => {
    expect(asked({ depthM: null, depthBy: null }).success).toBe(false);
    expect(asked({ depthM: null, depthBy: null, note: 'nothing else' }).success).toBe(false);
    for (const said of [{ snag: true }, { weed: 'clear' as const }, { bottom: 'silt_deep' as const }])
      expect(asked({ depthM: null, depthBy: null, ...said }).success).toBe(true);
  });

  test('says how a depth was measured, and nothing of measuring without one', () => {
    expect(asked({}).success).toBe(true);
    expect(asked({ depthBy: null }).success).toBe(false);
    expect(asked({ depthM: null, depthBy: 'float', snag: true }).success).toBe(false);
  });
});

describe('the grade of an accepted report', () => {
  const grade = (at: FoundAt, wishes: Partial<Found> = {}) =>
    gradeOfReport({ at, found: found(wishes) }, true, false).grade;

  test('is C for a float at a marked place', () => {
    expect(grade(counted)).toBe('C');
    expect(grade({ by: 'spot', spotId: id })).toBe('C');
  });

  test('is D for a touched place, another way of measuring, no depth, or no level of that day', () => {
    expect(grade(touched)).toBe('D');
    expect(grade(counted, { depthBy: 'lead_count' })).toBe('D');
    expect(grade(counted, { depthBy: 'other' })).toBe('D');
    expect(grade(counted, { depthM: null, depthBy: null, snag: true })).toBe('D');
    expect(gradeOfReport({ at: counted, found: found() }, false, false).grade).toBe('D');
  });

  test('is B once staff measured again, and never A', () => {
    expect(gradeOfReport({ at: touched, found: found() }, true, true).grade).toBe('B');
  });
});

describe('a depth found', () => {
  test('comes to datum by the water of its day: half a metre of rise is half a metre off', () => {
    const at = foundAtDatum(found({ depthM: 2.9 }), { aboveDatumM: 0.5, sigmaM: 0.01 });
    expect(at?.depthM).toBeCloseTo(2.4, 12);
    expect(foundAtDatum(found(), null)).toBeNull();
  });

  test('lies as many σ from the chart as the two errors together say', () => {
    const apart = sigmasApart({ depthM: 2.8, sigmaM: 0.3 }, { depthM: 2.3, sigmaM: 0.4 });
    expect(apart).toBeCloseTo(1, 12);
  });
});

describe('evidence', () => {
  test('takes what staff measured again in place of what was reported', () => {
    const evidence = reportEvidence({
      at: touched,
      found: found({ depthM: 5, depthBy: 'other' }),
      day: '2027-07-17',
      place,
      level: { aboveDatumM: -0.2, sigmaM: 0.01 },
      remeasured: { day: '2027-07-20', depthM: 2.2 },
    });
    expect(evidence).toMatchObject({ grade: 'B', observedOn: '2027-07-20' });
    expect(evidence.depthM).toBeCloseTo(2.4, 12);
  });

  test('names a snag before weed, and weed before the bed beneath', () => {
    expect(foundBottom(found({ snag: true, weed: 'thick', bottom: 'clay' }))).toBe('snag');
    expect(foundBottom(found({ weed: 'low', bottom: 'clay' }))).toBe('weed_low');
    expect(foundBottom(found({ weed: 'clear', bottom: 'clay' }))).toBe('clay');
    expect(foundBottom(found())).toBe('unknown');
  });

  test('gives shares that sum to one, whatever was found', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('gravel', 'clay', 'sand', 'silt_firm', 'silt_deep', 'leaf', 'shell', null),
        fc.boolean(),
        fc.constantFrom('clear', 'low', 'thick', null),
        (bottom, snag, weed) => {
          const { substrate, cover } = foundShares(found({ bottom, snag, weed }));
          for (const shares of [substrate, cover])
            if (shares) expect(Object.values(shares).reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 12);
          expect(substrate === null).toBe(bottom === null || bottom === 'leaf');
          if (snag) expect(cover?.snag).toBeGreaterThan(0.5);
        },
      ),
    );
  });
});
