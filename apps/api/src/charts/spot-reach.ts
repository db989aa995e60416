import type { Spot } from '@mereward/db/entities/charts/spot';
import type { Mark } from '@mereward/db/entities/lakes/mark';
import type { SpotView } from '@mereward/shared/charts/contract';
import { bearingDifferenceDeg, geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import type { Point } from '@mereward/shared/geometry/plane';
import type { Kit } from '@mereward/shared/surveys/contract';
import { lineForRange } from '@mereward/shared/surveys/ground-range';
import { lineAWrapM, stretchOf } from '@mereward/shared/surveys/line-out';
import { metresToWraps, USUAL_SPACING_M } from '@mereward/shared/units/wraps';
import type { BuiltSounding, BuiltVisit } from './built';
import type { PegGround } from './peg-chart';

export type SpotKit = Pick<
  Kit,
  | 'stickSpacingM'
  | 'stickMeasured'
  | 'stickDiameterM'
  | 'wrapReference'
  | 'lineAlongRodM'
  | 'reelHeightM'
  | 'rodElevationDeg'
  | 'lineType'
  | 'stretchShare'
  | 'stretchSigmaShare'
>;

/** Taken where nothing was surveyed yet: twelve-foot sticks read to the rod tip, rod level. Common practice. */
const USUAL_KIT: SpotKit = {
  stickSpacingM: USUAL_SPACING_M,
  stickMeasured: 'along_line',
  stickDiameterM: null,
  wrapReference: 'lead_to_rod_tip',
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
};

/** A spot no farther from a cast of this same peg than this is that cast's own: its count is quoted as it was wound. */
const SAME_PLACE_M = 0.25;
/** A mark farther to the side than this is no help in aiming. */
const WIDEST_OFFSET_DEG = 30;

export type Reach = Pick<
  SpotView,
  | 'lineOutM'
  | 'wrapsWhole'
  | 'remainderM'
  | 'stickSpacingM'
  | 'wrapReference'
  | 'bearingDeg'
  | 'mark'
  | 'rangeM'
>;

type Asked = {
  ground: PegGround;
  spot: Spot;
  place: Point;
  cast: BuiltSounding | null;
  visit: BuiltVisit | null;
  depthM: number | null;
};

export const kitOf = (visit: BuiltVisit | null): SpotKit => visit?.kit ?? USUAL_KIT;

/** How a spot is reached from this peg with the survey's sticks; null when it lies under the rod itself. */
export function reachOf({ ground, spot, place, cast, visit, depthM }: Asked): Reach | null {
  const kit = kitOf(visit);
  const { distanceM: rangeM, bearingDeg } = geodesicBetween(ground.peg.details.origin, spot.details.position);
  const own =
    cast?.pegId === ground.peg.id && Math.hypot(cast.xM - place.xM, cast.yM - place.yM) <= SAME_PLACE_M;
  const line = own ? ownLine(cast) : windFor({ rangeM, kit, depthM: depthM ?? 0 });
  if (!line) return null;
  return {
    ...line,
    rangeM,
    bearingDeg,
    stickSpacingM: kit.stickSpacingM,
    wrapReference: kit.wrapReference,
    mark: markFor(ground.marks, {
      from: ground.peg.details.origin,
      bearingDeg,
      aimedAt: own ? cast.markId : null,
    }),
  };
}

type Line = Pick<Reach, 'lineOutM' | 'wrapsWhole' | 'remainderM'>;

const ownLine = ({ lineOutM, wrapsWhole, remainderM }: BuiltSounding): Line => ({
  lineOutM,
  wrapsWhole,
  remainderM,
});

/** The count that reaches a range, metres, over a bottom `depthM` deep. */
export function windFor({
  rangeM,
  kit,
  depthM,
}: {
  rangeM: number;
  kit: SpotKit;
  depthM: number;
}): Line | null {
  const answer = lineForRange(rangeM, { ...kit, reference: kit.wrapReference, depthM });
  if (!answer.ok) return null;
  const wraps = metresToWraps(answer.lineOutM / (1 + stretchOf(kit).share), lineAWrapM(kit));
  return { lineOutM: answer.lineOutM, wrapsWhole: wraps.whole, remainderM: wraps.remainderM };
}

type Aimed = { from: LonLat; bearingDeg: number; aimedAt: string | null };

/** The mark the cast was aimed at, else the one nearest to the line. */
function markFor(marks: readonly Mark[], { from, bearingDeg, aimedAt }: Aimed): Reach['mark'] {
  const seen = marks.map(({ id, code, details }) => {
    const offsetDeg = bearingDifferenceDeg(geodesicBetween(from, details.position).bearingDeg, bearingDeg);
    return { id, code, name: details.name, offsetDeg };
  });
  const nearest = seen
    .filter(({ offsetDeg }) => Math.abs(offsetDeg) <= WIDEST_OFFSET_DEG)
    .sort((a, b) => Math.abs(a.offsetDeg) - Math.abs(b.offsetDeg) || (a.code < b.code ? -1 : 1));
  const mark = seen.find(({ id }) => id === aimedAt) ?? nearest[0];
  return mark
    ? { code: mark.code, name: mark.name, offsetDeg: Math.round(mark.offsetDeg * 10) / 10 + 0 }
    : null;
}
