/**
 * Whatever the contract lets through must come back as an answer in the contract's own shape: a sounding of finite
 * numbers on the water, or a refusal in words. Nothing numeric is compared with a source.
 */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import {
  CameBack,
  CastFlag,
  CastObservation,
  Drag,
  Drop,
  Kit,
  Reduced,
} from '@mereward/shared/surveys/contract';
import { aCastSite, MARK_ID } from '../../support/cast-sites';
import { aKit, anObservation } from '../../support/kit';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const aims: fc.Arbitrary<CastObservation['aim']> = fc.oneof(
  between(-90, 90).map((offsetDeg) => ({ by: 'mark' as const, markId: MARK_ID, offsetDeg })),
  fc.record({
    by: fc.constant('compass' as const),
    bearingDeg: between(0, 359.99),
    method: fc.constantFrom('compass_phone' as const, 'compass_sighting' as const, 'estimated' as const),
  }),
);

const casts = fc
  .record({
    aim: aims,
    sidestepM: between(-10, 10),
    wrapsWhole: fc.integer({ min: 0, max: 120 }),
    remainderM: between(0, 10),
    remainderStated: fc.boolean(),
    rodElevationDeg: between(0, 90),
    drop: fc.option(fc.constantFrom(...Drop.options)),
    dropCountS: fc.option(between(0, 60)),
    drag: fc.option(fc.constantFrom(...Drag.options)),
    cameBack: fc.option(fc.subarray([...CameBack.options])),
    smell: fc.option(fc.constantFrom('none' as const, 'bad_eggs' as const)),
    pulls: fc.option(between(0.5, 200)),
    pullsAgain: fc.option(between(0.5, 200)),
    floatSight: fc.option(fc.constantFrom('good' as const, 'poor' as const)),
    flags: fc.subarray([...CastFlag.options]),
  })
  .map((wishes) => CastObservation.parse(anObservation(MARK_ID, wishes)));

const kits = fc
  .record({
    stickSpacingM: between(0.3, 10),
    stickMeasured: fc.constantFrom('along_line' as const, 'centres' as const),
    wrapReference: fc.constantFrom('lead_to_rod_tip' as const, 'lead_to_clip' as const),
    lineAlongRodM: between(0, 6),
    reelHeightM: between(0, 6),
    lineType: fc.constantFrom('braid' as const, 'mono' as const, 'other' as const),
    stretchShare: between(0, 0.3),
    wrapSigmaShare: between(0.005, 1),
    pullM: between(0.05, 2),
    floatOffsetM: between(0, 2),
    declinationDeg: between(-90, 90),
  })
  .map((wishes) => Kit.parse(aKit(wishes)));

test('any cast the contract lets through is answered in the contract’s shape', () => {
  const site = aCastSite();
  let reducedCasts = 0;
  fc.assert(
    fc.property(casts, kits, (cast, kit) => {
      const reduced = Reduced.parse(reduceCast(cast, kit, site)); // zod takes no NaN and no infinity for a number
      if (!reduced.ok) {
        expect(reduced.reason.length).toBeGreaterThan(10);
        expect(reduced.remedy.length).toBeGreaterThan(10);
        return;
      }
      reducedCasts++;
      const { sounding } = reduced;
      expect(insideOutline(site.outline, { xM: sounding.xM, yM: sounding.yM })).toBe(true);
      expect(sounding.covariance.xx * sounding.covariance.yy).toBeGreaterThan(sounding.covariance.xy ** 2);
      expect(sounding.askAgain && sounding.grade < 'C').toBe(false);
    }),
    { numRuns: 1500, seed: 20270403 },
  );
  expect(reducedCasts).toBeGreaterThan(50);
});
