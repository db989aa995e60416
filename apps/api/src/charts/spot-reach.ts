import type { Spot } from '@mereward/db/entities/charts/spot';
import type { Mark } from '@mereward/db/entities/lakes/mark';
import type { SpotView } from '@mereward/shared/charts/contract';
import { geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import type { Point } from '@mereward/shared/geometry/plane';
import { marksBeside, windFor, type SpotKit } from '@mereward/shared/surveys/same-spot';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';
import type { BuiltSounding, BuiltVisit } from './built';
import type { PegGround } from './peg-chart';

/** Taken where nothing was surveyed yet: twelve-foot sticks read to the rod tip, rod level. Common practice. */
export const USUAL_KIT: SpotKit = {
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
  const line = own ? ownLine(cast) : lineFor(rangeM, kit, depthM ?? 0);
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

function lineFor(rangeM: number, kit: SpotKit, depthM: number): Line | null {
  const wound = windFor(rangeM, kit, depthM);
  return wound.ok
    ? { lineOutM: wound.lineOutM, wrapsWhole: wound.wraps.whole, remainderM: wound.wraps.remainderM }
    : null;
}

type Aimed = { from: LonLat; bearingDeg: number; aimedAt: string | null };

/** The mark the cast was aimed at, else the one nearest to the line. */
export function markFor(marks: readonly Mark[], { from, bearingDeg, aimedAt }: Aimed): Reach['mark'] {
  const catalogued = marks.map(({ id, code, details }) => ({
    id,
    code,
    name: details.name,
    place: details.position,
  }));
  const beside = marksBeside(catalogued, { stance: from, bearingDeg });
  const seen = beside.find(({ mark }) => mark.id === aimedAt) ?? beside[0];
  return seen
    ? { code: seen.mark.code, name: seen.mark.name, offsetDeg: Math.round(seen.offsetDeg * 10) / 10 + 0 }
    : null;
}
