/**
 * Truth by simulation: casts are thrown with the very errors the budget states, each reduced as if it had none, and the
 * scatter of where they come out is held against the stated covariance. 6,000 casts know a variance to
 * √(2/6000) = 1.8 %, so 8 % (over four of those) allows for that and for the slopes being taken to first order.
 */
import { describe, expect, test } from 'vitest';
import { geodesicAlong } from '@mereward/shared/geometry/geodesic';
import { castPosition } from '@mereward/shared/surveys/cast-position';
import type { CastObservation, Kit } from '@mereward/shared/surveys/contract';
import { SIGMA } from '@mereward/shared/surveys/error-budget';
import { aCastSite, MARK_ID, STANCE } from '../../support/cast-sites';
import { aKit, anObservation } from '../../support/kit';

const CASTS = 6000;
const DEPTH = { depthM: 2.5, sigmaM: 0.1 };

/** Standard normal numbers from a fixed seed (Box–Muller over a 32-bit congruential generator). */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

function scatter(cast: CastObservation, kit: Kit, seed: number) {
  const draw = normals(seed);
  const points = Array.from({ length: CASTS }, () => {
    const wrong = {
      ...kit,
      lineAlongRodM: kit.lineAlongRodM + SIGMA.lineAlongRodM * draw(),
      reelHeightM: kit.reelHeightM + SIGMA.reelHeightM * draw(),
      declinationDeg: SIGMA.compassSightingDeg * draw(),
      stretchShare: kit.stretchShare + kit.stretchSigmaShare * draw(),
    };
    const countM = cast.remainderStated ? SIGMA.markedRemainderM : kit.wrapSigmaShare * kit.stickSpacingM;
    const thrown = {
      ...cast,
      remainderM: cast.remainderM + Math.hypot(countM, SIGMA.clipM) * draw(),
      sidestepM: SIGMA.besideMarkedOriginM * draw(),
      rodElevationDeg: cast.rodElevationDeg + SIGMA.rodElevationDeg * draw(),
    };
    const east = geodesicAlong(STANCE, 90, 0.3 * draw());
    const stance = { place: geodesicAlong(east, 0, 0.3 * draw()), sigmaM: 0.3, originMarked: true };
    const depthM = DEPTH.depthM + DEPTH.sigmaM * draw();
    const position = castPosition(thrown, [wrong, aCastSite({ stance })], { ...DEPTH, depthM });
    if (!position.ok) throw new Error(position.reason);
    return position.point;
  });
  const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const middle = { xM: mean(points.map(({ xM }) => xM)), yM: mean(points.map(({ yM }) => yM)) };
  return {
    xx: mean(points.map(({ xM }) => (xM - middle.xM) ** 2)),
    xy: mean(points.map(({ xM, yM }) => (xM - middle.xM) * (yM - middle.yM))),
    yy: mean(points.map(({ yM }) => (yM - middle.yM) ** 2)),
  };
}

const aim = { by: 'compass', bearingDeg: 30, method: 'compass_sighting' } as const;
const nylon = { lineType: 'mono', stretchShare: 0.05, stretchSigmaShare: 0.02 } as const;

describe('the stated error of a spot', () => {
  test.each([
    ['a measured count at fifty metres', { aim }, {}],
    ['a bare count', { aim, remainderStated: false }, {}],
    ['a raised rod near in', { aim, wrapsWhole: 5, rodElevationDeg: 45 }, {}],
    ['a count read to the rod tip', { aim, wrapsWhole: 8 }, { wrapReference: 'lead_to_rod_tip' as const }],
    ['nylon', { aim }, nylon],
  ])('is the scatter of such casts: %s', (_, with_, kitWith) => {
    const cast = anObservation(MARK_ID, with_);
    const kit = aKit(kitWith);
    const stated = castPosition(cast, [kit, aCastSite()], DEPTH);
    if (!stated.ok) throw new Error(stated.reason);
    const met = scatter(cast, kit, 20270403);
    const { xx, xy, yy } = stated.covariance;
    expect(Math.abs(met.xx / xx - 1)).toBeLessThan(0.08);
    expect(Math.abs(met.yy / yy - 1)).toBeLessThan(0.08);
    expect(Math.abs(met.xy - xy)).toBeLessThan(0.08 * Math.sqrt(xx * yy));
  });

  // Over a mark the aim holds part of a stance's own error back, but an error that peg and mark share moves all of it, so
  // the whole is stated: never less than met.
  test('over a far-bank mark is not less than met', () => {
    const cast = anObservation(MARK_ID);
    const stated = castPosition(cast, [aKit(), aCastSite()], DEPTH);
    if (!stated.ok) throw new Error(stated.reason);
    const met = scatter(cast, aKit(), 17);
    expect(met.xx).toBeLessThan(stated.covariance.xx);
    expect(Math.abs(met.yy / stated.covariance.yy - 1)).toBeLessThan(0.08);
  });
});
