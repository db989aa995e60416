/**
 * Observed → spot → observed and back must close within 1 mm and 0.001°, the figure the product promises; the inverse is
 * closed form, so what is left is floating point and one geodesic. Moving or turning the whole lake must move every
 * reduced spot with it, to the millimetre (the ellipsoid's own curvature over a few hundred metres is microns).
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  bearingDifferenceDeg,
  geodesicAlong,
  geodesicBetween,
  type LonLat,
} from '@mereward/shared/geometry/geodesic';
import { fromPlane, toPlane, type Point } from '@mereward/shared/geometry/plane';
import { aimedFrom } from '@mereward/shared/surveys/aim';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { Kit } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { marksBeside, sameSpot } from '@mereward/shared/surveys/same-spot';
import { wrapsToMetres } from '@mereward/shared/units/wraps';
import { aCastSite, aChimney, MARK_ID, roundWater, soundingOf, STANCE } from '../../support/cast-sites';
import { aKit, anObservation } from '../../support/kit';

const kits: fc.Arbitrary<Kit> = fc
  .record({
    stickSpacingM: fc.double({ min: 0.9, max: 4.5, noNaN: true }),
    stickMeasured: fc.constantFrom('along_line', 'centres'),
    stickDiameterM: fc.option(fc.double({ min: 0.005, max: 0.04, noNaN: true })),
    wrapReference: fc.constantFrom('lead_to_rod_tip', 'lead_to_clip'),
    lineAlongRodM: fc.double({ min: 0, max: 3.5, noNaN: true }),
    reelHeightM: fc.double({ min: 0, max: 3, noNaN: true }),
    rodElevationDeg: fc.double({ min: 0, max: 85, noNaN: true }),
    lineType: fc.constantFrom('braid', 'mono'),
    stretchShare: fc.double({ min: 0, max: 0.1, noNaN: true }),
  })
  .map((wishes) => aKit(wishes));

const pulls = fc.integer({ min: 1, max: 30 });
const lineM = fc.double({ min: 20, max: 100, noNaN: true });
const offset = fc.double({ min: -30, max: 30, noNaN: true });

describe('the same spot from here', () => {
  test('an observed cast turned to a spot and back gives the same count and bearing', () => {
    fc.assert(
      fc.property(kits, lineM, pulls, offset, (kit, woundM, counted, offsetDeg) => {
        const wrapsWhole = Math.floor(woundM / kit.stickSpacingM);
        const remainderM = woundM - wrapsWhole * kit.stickSpacingM;
        const cast = anObservation(MARK_ID, {
          aim: { by: 'mark', markId: MARK_ID, offsetDeg },
          wrapsWhole,
          remainderM,
          rodElevationDeg: kit.rodElevationDeg,
          pulls: counted,
        });
        const site = aCastSite({ outline: roundWater(400) });
        const reduced = reduceCast(cast, kit, site);
        fc.pre(reduced.ok);
        const sounding = soundingOf(reduced);
        const again = sameSpot([STANCE, sounding.position], kit, sounding.depthAsReadM ?? 0);
        expect(again.ok).toBe(true);
        if (!again.ok) return;
        const wrapM = lineAWrapM(kit);
        const firstM = wrapsToMetres({ whole: wrapsWhole, remainderM }, wrapM);
        const woundAgainM = wrapsToMetres(again.wraps, wrapM);
        expect(Math.abs(woundAgainM - firstM)).toBeLessThanOrEqual(0.001);
        expect(Math.abs(again.lineOutM - sounding.lineOutM)).toBeLessThanOrEqual(0.001);
        expect(Math.abs(bearingDifferenceDeg(again.bearingDeg, sounding.bearingDeg))).toBeLessThanOrEqual(
          0.001,
        );
        const [beside] = marksBeside(
          [aChimney()],
          { stance: STANCE, bearingDeg: again.bearingDeg },
          { widestDeg: 31 },
        );
        expect(Math.abs((beside?.offsetDeg ?? 99) - offsetDeg)).toBeLessThanOrEqual(0.001);
      }),
    );
  });

  test('a spot turned to a cast and thrown again lands within a millimetre', () => {
    const spots = fc.record({
      rangeM: fc.double({ min: 8, max: 140, noNaN: true }),
      bearingDeg: fc.double({ min: -25, max: 25, noNaN: true }),
    });
    fc.assert(
      fc.property(kits, spots, pulls, (kit, { rangeM, bearingDeg }, counted) => {
        const spot = geodesicAlong(STANCE, bearingDeg, rangeM);
        const depthM = (counted - 0.5) * kit.pullM + kit.floatOffsetM;
        const answer = sameSpot([STANCE, spot], kit, depthM);
        fc.pre(answer.ok);
        const [mark] = marksBeside([aChimney()], { stance: STANCE, bearingDeg: answer.bearingDeg });
        const cast = anObservation(MARK_ID, {
          aim: { by: 'mark', markId: MARK_ID, offsetDeg: mark?.offsetDeg ?? Number.NaN },
          wrapsWhole: answer.wraps.whole,
          remainderM: answer.wraps.remainderM,
          rodElevationDeg: kit.rodElevationDeg,
          pulls: counted,
        });
        const sounding = soundingOf(reduceCast(cast, kit, aCastSite({ outline: roundWater(400) })));
        expect(geodesicBetween(sounding.position, spot).distanceM).toBeLessThanOrEqual(0.001);
      }),
    );
  });

  test('a spot under the rod is refused in words', () => {
    const answer = sameSpot([STANCE, geodesicAlong(STANCE, 10, 2)], aKit(), 1);
    expect(answer).toMatchObject({ ok: false, reason: /under the rod/ });
  });

  test('marks are told nearest first, left and right', () => {
    const marks = [40, -4, 9].map((deg) => ({ place: geodesicAlong(STANCE, deg, 150), deg }));
    const beside = marksBeside(marks, { stance: STANCE, bearingDeg: 3 });
    expect(beside.map(({ mark }) => mark.deg)).toEqual([9, -4]);
    expect(beside.map(({ offsetDeg }) => offsetDeg.toFixed(6))).toEqual(['-6.000000', '7.000000']);
  });
});

describe('a moved or turned lake', () => {
  const turned = ({ xM, yM }: Point, deg: number): Point => {
    const cos = Math.cos((deg * Math.PI) / 180);
    const sin = Math.sin((deg * Math.PI) / 180);
    return { xM: xM * cos + yM * sin, yM: yM * cos - xM * sin };
  };

  test('turning it about its origin turns every spot with it', () => {
    const turns = fc.double({ min: 0, max: 360, noNaN: true });
    fc.assert(
      fc.property(
        turns,
        lineM,
        offset,
        fc.double({ min: -2, max: 2, noNaN: true }),
        (deg, woundM, offsetDeg, sidestepM) => {
          const site = aCastSite({ outline: roundWater(400) });
          const turnPlace = (place: LonLat) =>
            fromPlane(site.origin, turned(toPlane(site.origin, place), deg));
          const mark = aChimney();
          const turnedSite = aCastSite({
            outline: { shore: roundWater(400).shore.map((p) => turned(p, deg)), islands: [] },
            stance: { ...site.stance, place: turnPlace(site.stance.place) },
            mark: { ...mark, place: turnPlace(mark.place) },
          });
          const cast = anObservation(MARK_ID, {
            aim: { by: 'mark', markId: MARK_ID, offsetDeg },
            sidestepM,
            wrapsWhole: 0,
            remainderM: woundM,
          });
          const before = soundingOf(reduceCast(cast, aKit(), site));
          const after = soundingOf(reduceCast(cast, aKit(), turnedSite));
          const expected = turned({ xM: before.xM, yM: before.yM }, deg);
          expect(Math.hypot(after.xM - expected.xM, after.yM - expected.yM)).toBeLessThanOrEqual(0.001);
          expect(after.depthM).toBe(before.depthM);
          expect(after.grade).toBe(before.grade);
          expect(Math.abs(after.ellipse.semiMajorM - before.ellipse.semiMajorM)).toBeLessThan(1e-6);
        },
      ),
    );
  });

  test('moving it to another longitude moves every spot with it', () => {
    const cast = anObservation(MARK_ID);
    const home = soundingOf(reduceCast(cast, aKit(), aCastSite()));
    for (const lon of [-8, 0, 21.5, 179.9999]) {
      const place: LonLat = [lon, STANCE[1]];
      const site = aCastSite({
        origin: place,
        stance: { place, sigmaM: 0.3, originMarked: true },
        mark: aChimney(place),
      });
      const away = soundingOf(reduceCast(cast, aKit(), site));
      expect(Math.hypot(away.xM - home.xM, away.yM - home.yM)).toBeLessThanOrEqual(1e-6);
    }
  });
});

describe('standing beside the mark', () => {
  test('costs x·(1 − S/R) at the spot over a far-bank mark, and all of x by compass', () => {
    const rangeOf = (aim: 'mark' | 'compass', sidestepM: number) => {
      const cast = anObservation(MARK_ID, {
        sidestepM,
        ...(aim === 'compass'
          ? { aim: { by: 'compass', bearingDeg: 0, method: 'compass_sighting' } as const }
          : {}),
      });
      return soundingOf(reduceCast(cast, aKit(), aCastSite()));
    };
    const seen = rangeOf('mark', 1);
    expect(seen.xM).toBeCloseTo(1 - seen.rangeM / Math.hypot(148, 1), 4);
    expect(rangeOf('compass', 1).xM).toBeCloseTo(1, 4); // meridians close in by 10 µm over the cast
    const aimed = aimedFrom(anObservation(MARK_ID, { sidestepM: 1 }), aKit(), aCastSite());
    expect(aimed.ok && aimed.markRangeM).toBeCloseTo(Math.hypot(148, 1), 4);
  });
});
