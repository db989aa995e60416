import type { LonLat, Point } from '../geometry/plane';
import { toPlane } from '../geometry/plane';
import { castPosition } from '../surveys/cast-position';
import type { CastSite, Refusal } from '../surveys/cast-site';
import {
  Cover,
  Substrate,
  type Bottom,
  type CastObservation,
  CoverShares,
  type Grade,
  type Kit,
  SubstrateShares,
} from '../surveys/contract';
import { ELLIPSE_95, ellipse95 } from '../surveys/covariance';
import { UNREAD_DEPTH } from '../surveys/error-budget';
import { NOTHING_FELT } from '../surveys/nothing-felt';
import { spotPlace } from '../surveys/spot-place';
import { USUAL_SPACING_M } from '../units/wraps';
import type { Found, FoundAt, Remeasured } from './disagreement';

/**
 * One-sigma errors of what an angler reports, metres. Sizes are common practice, no published source: a float is read to
 * half a foot with an arm's pull nobody taped, a count by the lead to some three feet, anything else to no better.
 */
export const REPORT_SIGMA = {
  float: 0.15,
  lead_count: 0.9,
  other: 0.9,
  remeasuredM: 0.1, // a float read by staff, tackle known
  touchedPlaceM: 4, // a finger on a chart, from memory of where the lead went in
  spotM: 1.5, // a cast wound to a spot's count and thrown over its mark
} as const;

/** Where something was found: on the lake's plane, with the ellipse that holds it 95 times in a hundred. */
export type ReportedPlace = {
  ok: true;
  position: LonLat;
  xM: number;
  yM: number;
  ellipse: { semiMajorM: number; semiMinorM: number; bearingDeg: number };
};

/** A place known to `sigmaM` each way; refused in words when it lies off the water. */
export function roundPlace(site: CastSite, position: LonLat, sigmaM: number): ReportedPlace | Refusal {
  const point = toPlane(site.origin, position);
  const onWater = spotPlace(site.outline, toPlane(site.origin, site.stance.place), point);
  if (!onWater.ok) return onWater;
  const semiM = sigmaM * ELLIPSE_95;
  return { ok: true, position, ...point, ellipse: { semiMajorM: semiM, semiMinorM: semiM, bearingDeg: 0 } };
}

type Count = Extract<FoundAt, { by: 'count' }>;

/** The place of a count over a far-bank mark, reduced as a cast is with a twelve-foot rod held level. */
export function countedPlace(site: CastSite, count: Count, depthM: number | null): ReportedPlace | Refusal {
  const depth = depthM === null ? UNREAD_DEPTH : { depthM, sigmaM: REPORT_SIGMA.float };
  const placed = castPosition(observationOf(count), [kitOf(count), site], depth);
  if (!placed.ok) return placed;
  const onWater = spotPlace(site.outline, placed.from, placed.point);
  if (!onWater.ok) return onWater;
  return { ok: true, position: placed.place, ...placed.point, ellipse: ellipse95(placed.covariance) };
}

function observationOf({ markId, offsetDeg, wrapsWhole, remainderM }: Count): CastObservation {
  return {
    aim: { by: 'mark', markId, offsetDeg },
    sidestepM: 0,
    wrapsWhole,
    remainderM,
    remainderStated: remainderM > 0,
    lineText: '',
    rodElevationDeg: 0,
    ...NOTHING_FELT,
    flags: [],
  };
}

/** Tackle nobody described: common practice, no published source. */
const kitOf = ({ stickSpacingM, wrapReference }: Count): Kit => ({
  stickSpacingM,
  stickMeasured: 'along_line',
  stickDiameterM: null,
  stickCheckedOn: null,
  wrapReference,
  rodLengthM: USUAL_SPACING_M,
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
  wrapSigmaShare: 0.25,
  pullM: 0.3048,
  floatOffsetM: 0.25,
  leadG: 85,
  leadShape: 'other',
  declinationDeg: 0,
});

/** The water over chart datum on a day, metres, with its σ; null when no reading is near enough. */
export type DayLevel = { aboveDatumM: number; sigmaM: number } | null;

/** What was found brought to datum: depth and σ in metres, or null when there is no depth or no level of that day. */
export function foundAtDatum(
  { depthM, depthBy }: Pick<Found, 'depthM' | 'depthBy'>,
  level: DayLevel,
): { depthM: number; sigmaM: number } | null {
  if (depthM === null || depthBy === null || level === null) return null;
  return { depthM: depthM - level.aboveDatumM, sigmaM: Math.hypot(REPORT_SIGMA[depthBy], level.sigmaM) };
}

/** How many σ of their difference two depths lie apart; positive when the found one is deeper. */
export function sigmasApart(
  found: { depthM: number; sigmaM: number },
  charted: { depthM: number; sigmaM: number },
): number {
  return (found.depthM - charted.depthM) / Math.hypot(found.sigmaM, charted.sigmaM);
}

type Graded = { grade: Grade; words: string };

/** The grade an accepted report counts with, and why: C for a float at a marked place, D else; B once staff measured again. */
export function gradeOfReport(
  { at, found }: { at: FoundAt; found: Pick<Found, 'depthM' | 'depthBy'> },
  depthAtDatum: boolean,
  remeasured: boolean,
): Graded {
  if (remeasured) return { grade: 'B', words: 'Grade B: measured again by staff. It joins the contours.' };
  const why =
    found.depthM === null
      ? 'no depth was measured'
      : found.depthBy !== 'float'
        ? 'the depth was not measured by float'
        : at.by === 'place'
          ? 'the place was touched on the chart, not counted over a mark'
          : !depthAtDatum
            ? 'the gauge board was not read within a fortnight of that day'
            : null;
  if (why !== null) return { grade: 'D', words: `Grade D, for staff only: ${why}.` };
  return {
    grade: 'C',
    words: 'Grade C: a float at a marked place. Shown as a point; no contour is drawn from it.',
  };
}

/** The one word for what was found on the bottom. */
export function foundBottom({ bottom, snag, weed }: Found): Bottom {
  if (snag) return 'snag';
  if (weed === 'thick') return 'weed_thick';
  if (weed === 'low') return 'weed_low';
  return bottom ?? 'unknown';
}

/** How sure a look that was reported is taken to be of its class. Common practice, no published source. */
const SURE = 0.8;

const SUBSTRATE_OF: Partial<Record<Bottom, Substrate>> = {
  gravel: 'gravel',
  shell: 'gravel',
  clay: 'clay',
  sand: 'sand',
  silt_firm: 'silt',
  silt_deep: 'silt',
};

/** The found bottom as shares over the chart's two lists; null: nothing was said of that one. */
export function foundShares({ bottom, snag, weed }: Found): {
  substrate: SubstrateShares | null;
  cover: CoverShares | null;
} {
  const substrate = bottom === null ? undefined : SUBSTRATE_OF[bottom];
  const cover: Cover | undefined = snag
    ? 'snag'
    : weed === 'thick'
      ? 'tall_weed'
      : weed === 'low'
        ? 'low_weed'
        : bottom === 'leaf'
          ? 'leaf_litter'
          : weed === 'clear'
            ? 'clear'
            : undefined;
  return {
    substrate: substrate === undefined ? null : SubstrateShares.parse(leaning(Substrate.options, substrate)),
    cover: cover === undefined ? null : CoverShares.parse(leaning(Cover.options, cover)),
  };
}

function leaning<Class extends string>(classes: readonly Class[], named: Class): unknown {
  const rest = (1 - SURE) / (classes.length - 1);
  return Object.fromEntries(classes.map((each) => [each, each === named ? SURE : rest]));
}

/** An accepted report as a chart is built from it: metres on the lake's plane, depth at datum. */
export type ReportEvidence = Point & {
  observedOn: string;
  ellipse: ReportedPlace['ellipse'];
  depthM: number | null;
  sigmaM: number | null;
  grade: Grade;
  bottom: Bottom;
  substrate: SubstrateShares | null;
  cover: CoverShares | null;
};

type Accepted = {
  at: FoundAt;
  found: Found;
  day: string;
  place: Pick<ReportedPlace, 'xM' | 'yM' | 'ellipse'>;
  level: DayLevel; // of the day it was found, or measured again
  remeasured: Remeasured | null;
};

/** The evidence an accepted report becomes. What staff measured again stands in place of what was reported. */
export function reportEvidence({ at, found, day, place, level, remeasured }: Accepted): ReportEvidence {
  const depth = remeasured ? remeasuredDepth(remeasured, level) : foundAtDatum(found, level);
  return {
    xM: place.xM,
    yM: place.yM,
    observedOn: remeasured?.day ?? day,
    ellipse: place.ellipse,
    depthM: depth?.depthM ?? null,
    sigmaM: depth?.sigmaM ?? null,
    grade: gradeOfReport({ at, found }, depth !== null, remeasured !== null).grade,
    bottom: foundBottom(found),
    ...foundShares(found),
  };
}

function remeasuredDepth({ depthM }: Remeasured, level: DayLevel): { depthM: number; sigmaM: number } | null {
  if (depthM === null || level === null) return null;
  return {
    depthM: depthM - level.aboveDatumM,
    sigmaM: Math.hypot(REPORT_SIGMA.remeasuredM, level.sigmaM),
  };
}
