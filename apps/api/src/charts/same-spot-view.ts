import { Spot } from '@mereward/db/entities/charts/spot';
import type { SameSpotAsked, SameSpotView } from '@mereward/shared/charts/chart-answers';
import { aimWords } from '@mereward/shared/charts/spot-figures';
import type { LonLat } from '@mereward/shared/geometry/geodesic';
import { toPlane } from '@mereward/shared/geometry/plane';
import { marksBeside, type SpotKit } from '@mereward/shared/surveys/same-spot';
import { spotPlace } from '@mereward/shared/surveys/spot-place';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { placeWater, watersOf } from '../lakes/peg-waters';
import { castTo } from './cast-to';
import { layersOf } from './chart-layers';
import { sightOf } from './layers';
import { pegGround, type PegGround } from './peg-chart';
import { placeReading, slopingDepthM, whyMissing, type PlaceAsked } from './place-reading';
import { reachOfPeg, reachWarnings } from './reach-warnings';
import { kitOf } from './spot-reach';
import { newestVisit } from './spot-view';

/** Any spot of the lake, or any place of its water, as reached from this peg. */
export async function sameSpotFrom(ctx: Ctx, pegId: string, asked: SameSpotAsked): Promise<SameSpotView> {
  const ground = await pegGround(ctx, pegId);
  const waters = await watersOf(ctx.tx, ground.lake);
  const spot = asked.spotId === undefined ? null : await seenSpot(ctx, { ground, waters }, asked.spotId);
  const position: LonLat = spot?.position ?? [asked.lon ?? 0, asked.lat ?? 0];
  const point = toPlane(ground.origin, position);
  const onWater = spotPlace(waters.outline, toPlane(ground.origin, ground.peg.details.origin), point);
  if (!onWater.ok)
    return { ok: false, reason: onWater.reason, remedy: 'Choose a place on the water of this lake' };
  const open = ground.chart && { chart: ground.chart, layers: layersOf(ground.chart.content) };
  return answer({ ground, open, waters }, asked, { spot, position });
}

type Grounded = Pick<PlaceAsked, 'ground' | 'waters'>;
type SeenSpot = { id: string; name: string; pegId: string; pegNumber: string; position: LonLat };

/**
 * A spot of this lake that this reader is shown; to anybody else it isn't there. A ticket opens the peg's own spots and those
 * that lie in its water, and no others.
 */
async function seenSpot(ctx: Ctx, at: Grounded, spotId: string): Promise<SeenSpot> {
  const { peg, lake, sight, origin } = at.ground;
  const spot = sight.sees.spots ? await ctx.tx.findOneBy(Spot, { id: spotId }) : null;
  const of = at.waters.pegs.find(({ id }) => id === spot?.pegId);
  if (!spot || !of) throw notFound('spot');
  const { name, position } = spot.details;
  const own = of.id === peg.id || placeWater(at.waters, peg.id, toPlane(origin, position)).own;
  if (!own && !sightOf(ctx, lake, false).sees.spots) throw notFound('spot');
  return { id: spot.id, name, pegId: of.id, pegNumber: of.number, position };
}

type Asked = { spot: SeenSpot | null; position: LonLat };

function answer(at: PlaceAsked, asked: SameSpotAsked, { spot, position }: Asked): SameSpotView {
  const { ground } = at;
  const { peg, chart, marks } = ground;
  const surveyKit = kitOf(chart && newestVisit(chart.content.built, peg.id));
  const from = peg.details.origin;
  const depthM = slopingDepthM(at, position);
  const throwOn = (kit: SpotKit) => castTo({ from, to: position, kit, depthM, marks });
  const surveySticks = throwOn(surveyKit);
  if (surveySticks === null)
    return {
      ok: false,
      reason: 'This place lies under the rod itself, so no count of wraps reaches it',
      remedy: 'Fish it by lowering the lead, not by casting',
    };
  const yours = yourKit(surveyKit, asked);
  const { shown, place } = placeReading(at, position);
  const point = toPlane(ground.origin, position);
  const warnings = reachWarnings(at, point, place.water);
  const beside = marksBeside(
    marks.map(({ code, details }) => ({ code, name: details.name, place: details.position })),
    { stance: from, bearingDeg: surveySticks.bearingDeg },
  );
  return {
    ok: true,
    pegId: peg.id,
    spot: spot && { id: spot.id, name: spot.name, pegId: spot.pegId, pegNumber: spot.pegNumber },
    place,
    surveySticks: coarse(ground, surveySticks),
    yourSticks: yours && coarse(ground, throwOn(yours) ?? surveySticks),
    marks: beside.slice(0, 3).map(({ mark, offsetDeg }) => ({
      code: mark.code,
      name: mark.name,
      offsetDeg: Math.round(offsetDeg * 10) / 10 + 0,
    })),
    reachable: reachOfPeg(at, point),
    warnings,
    words: [
      `From peg ${peg.number}: ${surveySticks.countWords} ${aimWords(surveySticks)}.`,
      place.water.words,
    ].join(' '),
    whyNot: whyMissing(at, shown),
  };
}

/** The reader's sticks, when they differ from the survey's. */
function yourKit(kit: SpotKit, { stickSpacingM, wrapReference }: SameSpotAsked): SpotKit | null {
  const sameSticks = stickSpacingM === undefined || Math.abs(stickSpacingM - kit.stickSpacingM) < 5e-4;
  if (sameSticks && (wrapReference === undefined || wrapReference === kit.wrapReference)) return null;
  const sticks = sameSticks
    ? {}
    : { stickSpacingM, stickMeasured: 'along_line' as const, stickDiameterM: null };
  return { ...kit, ...sticks, ...(wrapReference === undefined ? {} : { wrapReference }) };
}

const coarse = <C extends { rangeM: number }>({ sight }: PegGround, cast: C): C =>
  sight.sees.depth ? cast : { ...cast, rangeM: Math.round(cast.rangeM) };
