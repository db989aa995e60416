import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { outlineFromRings } from '../geometry/outline';
import { fromPlane, toPlane, type LonLat } from '../geometry/plane';
import { distanceBetweenM, type Point } from '../geometry/point';
import {
  NEW_WALK,
  sigmaOfRadiusM,
  walkReport,
  withFix,
  withPause,
  type Fix,
  type ShoreWalk,
} from './shore-walk';
import { walkedRing, WALK_TOLERANCE_M } from './walked-ring';

const START: LonLat = [-1.1417, 52.3661];

const fixAt = (point: Point, atS: number, accuracyM = 4): Fix => {
  const [lon, lat] = fromPlane(START, point);
  return { lon, lat, accuracyM, atMs: 1_700_000_000_000 + atS * 1000 };
};
const along = (points: readonly Point[], accuracyM = 4): Fix[] =>
  points.map((point, i) => fixAt(point, i, accuracyM));
const walked = (fixes: readonly Fix[], from: ShoreWalk = NEW_WALK) => fixes.reduce(withFix, from);
const east = (count: number, stepM = 1.2, fromM = 0): Point[] =>
  Array.from({ length: count }, (_, i) => ({ xM: fromM + i * stepM, yM: 0 }));

/** A pond walked round once at 1.2 m a second, metres. */
const round = (radiusM: number, turns = 1): Point[] => {
  const steps = Math.ceil((2 * Math.PI * radiusM * turns) / 1.2);
  return Array.from({ length: steps }, (_, i) => {
    const turn = (i * 1.2) / radiusM;
    return { xM: radiusM * Math.cos(turn), yM: radiusM * Math.sin(turn) };
  });
};

describe('a walk', () => {
  test('is as long as the way that was walked', () => {
    const { walkedM, gaps, fixes } = walkReport(walked(along(east(101))));
    expect(walkedM).toBeGreaterThan(117);
    expect(walkedM).toBeLessThan(121);
    expect(gaps.count).toBe(0);
    expect(fixes).toBe(101);
  });

  test('takes the mean of the fixes where one stands, without calling it surer', () => {
    const still = [0.5, -0.5, 0.5, -0.5, 0.4, -0.4].map((xM, i) => fixAt({ xM, yM: 0 }, i, 6));
    const { stations } = walked(still);
    expect(stations).toHaveLength(1);
    const at = toPlane(START, [stations[0]?.lon ?? 0, stations[0]?.lat ?? 0]);
    expect(Math.abs(at.xM)).toBeLessThan(0.1);
    expect(stations[0]?.radiusM).toBeCloseTo(6, 6);
    expect(stations[0]?.fixes).toBe(6);
  });

  test('leaves out what is poorer than fifteen metres, and counts it', () => {
    const walk = walked([
      fixAt({ xM: 0, yM: 0 }, 0, 15),
      fixAt({ xM: 5, yM: 0 }, 4, 15.1),
      fixAt({ xM: 6, yM: 0 }, 5, 60),
    ]);
    expect(walk.left).toEqual({ poor: 2, jumped: 0, unreadable: 0 });
    expect(walk.stations).toHaveLength(1);
  });

  test('leaves out what is no position at all', () => {
    const bad = [
      { lon: Number.NaN, lat: 52, accuracyM: 4, atMs: 0 },
      { lon: 1, lat: 95, accuracyM: 4, atMs: 0 },
      { lon: 1, lat: 52, accuracyM: 0, atMs: 0 },
      { lon: 1, lat: 52, accuracyM: 4, atMs: Infinity },
    ];
    expect(walked(bad)).toEqual({ ...NEW_WALK, left: { poor: 0, jumped: 0, unreadable: 4 } });
  });

  test('leaves out a jump there and back', () => {
    const fixes = along(east(20));
    fixes.splice(10, 0, fixAt({ xM: 12, yM: 90 }, 9.5));
    const walk = walked(fixes);
    expect(walk.left.jumped).toBe(1);
    expect(walkReport(walk).walkedM).toBeLessThan(25);
  });

  test('believes a jump that lasts, as a stretch nobody walked', () => {
    const walk = walked([
      ...along(east(10)),
      ...along(east(30, 1.2, 200)).map((fix) => ({ ...fix, atMs: fix.atMs + 10_000 })),
    ]);
    const { gaps, walkedM } = walkReport(walk);
    expect(gaps.count).toBe(1);
    expect(gaps.lengthM).toBeGreaterThan(180);
    expect(walkedM).toBeLessThan(50);
  });

  test('tells a silence as a gap when one has moved meanwhile, and not when one stood', () => {
    const before = along(east(10));
    const moved = walked([...before, fixAt({ xM: 45, yM: 0 }, 60)]);
    expect(walkReport(moved).gaps).toMatchObject({ count: 1 });
    const stood = walked([...before, fixAt({ xM: 11, yM: 0 }, 60)]);
    expect(walkReport(stood).gaps).toEqual({ count: 0, lengthM: 0 });
  });

  test('tells a pause as a gap when it goes on elsewhere, and not when it goes on here', () => {
    const before = withPause(walked(along(east(10))));
    expect(walkReport(walked([fixAt({ xM: 30, yM: 0 }, 14)], before)).gaps.count).toBe(1);
    const same = walked([fixAt({ xM: 11.5, yM: 0 }, 14)], before);
    expect(walkReport(same).gaps.count).toBe(0);
    expect(same.paused).toBe(false);
  });

  test.each([
    ['is years out', -700_000_000],
    ['is set back on the way', -3600],
    ['is set forward on the way', 3600],
  ])('stays whole when the phone’s clock %s', (_, byS) => {
    const fixes = along(east(60)).map((fix, i) => (i < 30 ? fix : { ...fix, atMs: fix.atMs + byS * 1000 }));
    const walk = walked(fixes);
    expect(walk.left).toEqual(NEW_WALK.left);
    expect(walkReport(walk).gaps.count).toBe(0);
    expect(walkReport(walk).walkedM).toBeGreaterThan(65);
  });

  test('counts every fix once, kept, left out or doubted, whatever comes', () => {
    const anyFix = fc.record({
      lon: fc.double({ min: -1.15, max: -1.13, noNaN: true }),
      lat: fc.double({ min: 52.36, max: 52.37, noNaN: true }),
      accuracyM: fc.double({ min: 0.5, max: 40, noNaN: true }),
      atMs: fc.integer({ min: 0, max: 4_000_000 }),
    });
    fc.assert(
      fc.property(fc.array(anyFix, { maxLength: 60 }), (fixes) => {
        const walk = walked(fixes);
        const { poor, jumped, unreadable } = walk.left;
        // A believed jump spends the two fixes that first told of it.
        const spent = 2 * walk.stations.filter(({ afterGap }) => afterGap).length;
        const counted = walkReport(walk).fixes + poor + jumped + unreadable + walk.doubted.length;
        expect(counted).toBeLessThanOrEqual(fixes.length);
        expect(counted + spent).toBeGreaterThanOrEqual(fixes.length);
      }),
    );
  });
});

test('a radius that holds 19 of 20 is 2.4477 σ', () => {
  // Rayleigh distribution: P(r ≤ R) = 1 − exp(−R²/2σ²) = 0.95.
  expect(1 - Math.exp(-(2 ** 2) / (2 * sigmaOfRadiusM(2) ** 2))).toBeCloseTo(0.95, 12);
});

describe('a ring made of a walk', () => {
  const areaOf = (ring: { places: [number, number][] } | null): number => {
    const places = ring?.places ?? [];
    const [first] = places;
    const read = outlineFromRings([first ? [...places, first] : []]);
    expect(read.findings.filter(({ kind }) => kind === 'refused')).toEqual([]);
    return read.areaM2 ?? Number.NaN;
  };

  test('has the area of the pond walked round, within the tolerance along its shore', () => {
    const radiusM = 60;
    const ring = walkedRing(walked(along(round(radiusM), 3)));
    const exactM2 = Math.PI * radiusM ** 2;
    // Thinning moves the line by up to its tolerance, averaging shifts corners by less than a step.
    const slackM2 = 2 * Math.PI * radiusM * WALK_TOLERANCE_M;
    expect(Math.abs(areaOf(ring) - exactM2)).toBeLessThan(slackM2);
    expect(ring?.places.length).toBeLessThan(60);
    expect(ring?.loops).toBe(0);
  });

  test('leaves off what was walked twice past the start', () => {
    const ring = walkedRing(walked(along(round(60, 1.06), 3)));
    expect(ring?.overlapM).toBeGreaterThan(10);
    expect(ring?.closingM).toBeLessThan(5);
    expect(Math.abs(areaOf(ring) - Math.PI * 3600)).toBeLessThan(380);
  });

  test('tells how far apart its ends are', () => {
    const ring = walkedRing(walked(along(round(60, 0.9), 3)));
    expect(ring?.closingM).toBeGreaterThan(30);
  });

  test('cuts small loops off, so that it doesn’t cross itself', () => {
    const path = round(60);
    const at = path[80] ?? { xM: 0, yM: 0 };
    const loop = [
      { xM: at.xM + 4, yM: at.yM - 1 },
      { xM: at.xM + 4, yM: at.yM - 5 },
      { xM: at.xM - 2, yM: at.yM - 5 },
      { xM: at.xM - 3, yM: at.yM + 1 },
    ];
    path.splice(81, 0, ...loop);
    const ring = walkedRing(walked(path.map((point, i) => fixAt(point, i * 2, 3))));
    expect(ring?.loops).toBeGreaterThan(0);
    expect(areaOf(ring)).toBeGreaterThan(0);
  });

  test('is sound also when the walk ends on the very place where it began', () => {
    const path = Array.from({ length: 29 }, (_, i) => {
      const turn = (2 * Math.PI * i) / 28;
      return { xM: 32 * Math.cos(turn), yM: 32 * Math.sin(turn) };
    });
    const ring = walkedRing(walked(path.map((point, i) => fixAt(point, i * 2, 5))));
    expect(Math.abs(areaOf(ring) - Math.PI * 32 ** 2)).toBeLessThan(2 * Math.PI * 32);
  });

  test('is sound for walks with a phone’s wandering that end anywhere about their start', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 420, maxLength: 420 }),
        fc.double({ min: 0.97, max: 1.05, noNaN: true }),
        (chances, turns) => {
          // An error that hangs together from second to second, about 1.5 m large, as a phone's does.
          let [offX, offY] = [0, 0];
          const path = round(45, turns).map(({ xM, yM }, i) => {
            offX = 0.95 * offX + 0.5 * (chances[(2 * i) % 420] ?? 0);
            offY = 0.95 * offY + 0.5 * (chances[(2 * i + 1) % 420] ?? 0);
            return { xM: xM + offX, yM: yM + offY };
          });
          const ring = walkedRing(walked(along(path, 4)));
          expect(Math.abs(areaOf(ring) - Math.PI * 45 ** 2)).toBeLessThan(0.12 * Math.PI * 45 ** 2);
        },
      ),
      { numRuns: 60 },
    );
  });

  test('is none while there are fewer than three places', () => {
    expect(walkedRing(NEW_WALK)).toBeNull();
    expect(walkedRing(walked(along(east(3, 3))))).toBeNull();
  });

  test('lies within the tolerance and a standing step of every place walked', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 25, max: 120 }),
        fc.double({ min: 0, max: 6.28, noNaN: true }),
        (radiusM, phase) => {
          const path = round(radiusM).map(({ xM, yM }) => {
            const wobble = 1 + 0.15 * Math.sin(3 * Math.atan2(yM, xM) + phase);
            return { xM: xM * wobble, yM: yM * wobble };
          });
          const walk = walked(along(path, 3));
          const ring = walkedRing(walk);
          const points = (ring?.places ?? []).map((place) => toPlane(START, place));
          for (const point of points)
            expect(Math.min(...path.map((each) => distanceBetweenM(each, point)))).toBeLessThan(
              WALK_TOLERANCE_M + 1.2,
            );
        },
      ),
      { numRuns: 25 },
    );
  });
});
