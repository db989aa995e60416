import { geodesicAlong } from '../geometry/geodesic';
import { toPlane, type LonLat, type Point } from '../geometry/plane';
import { aimedFrom, sidestepShare } from './aim';
import type { CastSite, Refusal } from './cast-site';
import type { CastObservation, Kit, ReductionStep } from './contract';
import { BAND_95, ELLIPSE_95, ellipse95, spotCovariance, type Covariance } from './covariance';
import { SIGMA } from './error-budget';
import { groundRange, rangeSigmaM, rangeStep, type Slope } from './ground-range';
import { lineOut } from './line-out';
import { degrees, metres, plusMinus, step } from './reduction-step';

/** Where the lead lies, and how surely: metres, degrees, one σ unless named otherwise. */
export type CastPosition = {
  ok: true;
  place: LonLat;
  point: Point;
  from: Point; // where the angler stood
  bearingDeg: number;
  rangeM: number;
  lineOutM: number;
  radialSigmaM: number;
  lateralSigmaM: number;
  covariance: Covariance;
  steps: ReductionStep[];
};

/** Line out, bearing, ground range, spot, covariance, in that order. Steps done before a refusal are kept with it. */
export function castPosition(
  cast: CastObservation,
  [kit, site]: readonly [Kit, CastSite],
  depth: { depthM: number; sigmaM: number },
): CastPosition | (Refusal & { steps: ReductionStep[] }) {
  const line = lineOut(cast, kit);
  const aimed = aimedFrom(cast, kit, site);
  if (!aimed.ok) return { ...aimed, steps: line.steps };
  const slope = slopeOf(cast, kit, depth.depthM);
  const range = groundRange(line.lineOutM, slope);
  if (!range.ok) return { ...range, steps: [...line.steps, ...aimed.steps] };
  const { rangeM } = range;
  const bowM = cast.flags.includes('crosswind') ? SIGMA.crosswindBowM : 0;
  const slackM = cast.flags.includes('slack_line') ? SIGMA.slackLineM : 0;
  const besideM = site.stance.originMarked ? SIGMA.besideMarkedOriginM : SIGMA.besideUnmarkedOriginM;
  const alongM = Math.hypot(
    rangeSigmaM(line.lineOutM, slope, { lineM: line.sigmaM, depthM: depth.sigmaM }),
    (8 * bowM * bowM) / (3 * line.lineOutM), // extra line in a belly b deep: 8b²/3L
    slackM,
    besideM, // nearer the water or farther back moves the spot as much
    arcBendM(rangeM, aimed.sigmaDeg),
  );
  const acrossM = Math.hypot(
    rangeM * Math.tan((aimed.sigmaDeg * Math.PI) / 180),
    besideM * sidestepShare(rangeM, aimed.markRangeM),
    bowM,
    slackM,
  );
  const { bearingDeg } = aimed;
  const place = geodesicAlong(aimed.from, bearingDeg, rangeM);
  const covariance = spotCovariance(bearingDeg, { alongM, acrossM, stanceM: site.stance.sigmaM });
  const point = toPlane(site.origin, place);
  const rangeLine = rangeStep(line.lineOutM, slope, { rangeM, sigmaM: alongM });
  return {
    ok: true,
    place,
    point,
    from: toPlane(site.origin, aimed.from),
    bearingDeg,
    rangeM,
    lineOutM: line.lineOutM,
    radialSigmaM: Math.hypot(alongM, site.stance.sigmaM),
    lateralSigmaM: Math.hypot(acrossM, site.stance.sigmaM),
    covariance,
    steps: [
      ...line.steps,
      ...aimed.steps,
      rangeLine,
      spotStep({ bearingDeg, rangeM, point, covariance }, site),
    ],
  };
}

/**
 * What an uncertain bearing adds to σ along the line, metres. Places at one range lie on an arc that bends away from the
 * straight error across the line by R·(1 − cos θ); this much along it makes the 95 % ellipse reach the arc out to 1.96 σ of the
 * bearing: (1.96)² + (bend / σ)² = −2 ln 0.05. Millimetres over a mark, two metres for a bearing guessed to 10° at 50 m.
 */
function arcBendM(rangeM: number, sigmaDeg: number): number {
  const turn = Math.min(Math.PI / 2, (BAND_95 * sigmaDeg * Math.PI) / 180);
  return (rangeM * (1 - Math.cos(turn))) / Math.sqrt(ELLIPSE_95 ** 2 - BAND_95 ** 2);
}

/** The triangle of one cast over water `depthM` deep; the cast's own rod angle counts. */
export function slopeOf(cast: Pick<CastObservation, 'rodElevationDeg'>, kit: Kit, depthM: number): Slope {
  return {
    reference: kit.wrapReference,
    lineAlongRodM: kit.lineAlongRodM,
    reelHeightM: kit.reelHeightM,
    rodElevationDeg: cast.rodElevationDeg,
    depthM,
  };
}

function spotStep(
  spot: { bearingDeg: number; rangeM: number; point: Point; covariance: Covariance },
  site: CastSite,
): ReductionStep {
  const ellipse = ellipse95(spot.covariance);
  return step(
    ['spot', 'Spot', 'spot = stance + P along θ'],
    [
      ['θ', degrees(spot.bearingDeg, 3)],
      ['P', metres(spot.rangeM)],
      ['stance', plusMinus(site.stance.sigmaM, 'm')],
      [
        '95 times in 100 within',
        `${metres(ellipse.semiMajorM, 2)} × ${metres(ellipse.semiMinorM, 2)}, long axis ${degrees(ellipse.bearingDeg, 0)}`,
      ],
    ],
    { value: `${metres(spot.point.xM, 2)} east, ${metres(spot.point.yM, 2)} north of the lake’s origin` },
  );
}
