import type { CastAsked, CastReading } from '@mereward/shared/charts/chart-answers';
import { countWords, spotWords, stickWords } from '@mereward/shared/charts/spot-words';
import { aimWords } from '@mereward/shared/charts/spot-figures';
import { normaliseBearing } from '@mereward/shared/geometry/bearing';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { Problem } from '@mereward/shared/problems/problem';
import { castPosition, type CastPosition } from '@mereward/shared/surveys/cast-position';
import type { CastSite, Refusal } from '@mereward/shared/surveys/cast-site';
import type { CastObservation, Kit } from '@mereward/shared/surveys/contract';
import { ellipse95 } from '@mereward/shared/surveys/covariance';
import { UNREAD_DEPTH } from '@mereward/shared/surveys/error-budget';
import { NOTHING_FELT } from '@mereward/shared/surveys/nothing-felt';
import { spotPlace } from '@mereward/shared/surveys/spot-place';
import type { Ctx } from '../ctx';
import { watersOf } from '../lakes/peg-waters';
import { siteOf } from './asked-site';
import { castView } from './cast-to';
import { layersOf } from './chart-layers';
import { pegGround, type PegGround } from './peg-chart';
import { placeReading, slopingDepthM, whyMissing, type PlaceAsked } from './place-reading';
import { reachWarnings } from './reach-warnings';
import { markFor } from './spot-reach';
import { newestVisit } from './spot-view';

/** Reads a cast back from the chart: where it lands and what lies there, for this reader. */
export async function castReading(ctx: Ctx, pegId: string, asked: CastAsked): Promise<CastReading> {
  const ground = await pegGround(ctx, pegId);
  const { chart, sight } = ground;
  if (!chart)
    return {
      ok: false,
      reason: 'No chart of this water is published yet',
      remedy: 'Ask the fishery, or look again when one is',
    };
  if (!sight.sees.depth && !sight.sees.bottom)
    throw new Problem('forbidden', 'What lies in front of this peg is not shown to you', {
      detail: sight.notes.depth ?? sight.notes.bottom ?? '',
    });
  const open = { chart, layers: layersOf(chart.content) };
  const kit = kitFor(ground, asked);
  if (kit === null)
    return { ok: false, reason: 'This chart keeps no visit to count by', remedy: 'Ask the fishery' };
  const site = siteOf(ground, ground.marks.find(({ id }) => id === asked.markId) ?? null);
  const landed = whereItLands({ ground, open }, { asked, kit, site });
  if (!landed.ok) return { ok: false, reason: landed.reason, remedy: landed.remedy };
  const place: PlaceAsked = { ground, open, waters: await watersOf(ctx.tx, ground.lake) };
  return answer(place, asked, { kit, ...landed });
}

/** The newest survey's rod and line, wound on the sticks asked for. */
function kitFor({ chart, peg }: PegGround, { stickSpacingM, wrapReference }: CastAsked): Kit | null {
  const visit = chart && newestVisit(chart.content.built, peg.id);
  if (!visit) return null;
  const sticks =
    stickSpacingM === undefined
      ? {}
      : { stickSpacingM, stickMeasured: 'along_line' as const, stickDiameterM: null };
  return { ...visit.kit, ...sticks, ...(wrapReference === undefined ? {} : { wrapReference }) };
}

type Throw = { asked: CastAsked; kit: Kit; site: CastSite };
type Landed = { ok: true; position: CastPosition; warnings: string[] };

/** The depth slopes the line and the line finds the depth: three rounds bring both to a millimetre on any bed. */
const ROUNDS = 3;

function whereItLands(
  at: Pick<PlaceAsked, 'ground' | 'open'>,
  { asked, kit, site }: Throw,
): Landed | Refusal {
  const observation = observationOf(asked, kit);
  const sigmaM = UNREAD_DEPTH.sigmaM;
  let position = castPosition(observation, [kit, site], { depthM: UNREAD_DEPTH.depthM, sigmaM });
  for (let round = 0; round < ROUNDS && position.ok; round++) {
    const depthM = slopingDepthM(at, position.place);
    position = castPosition(observation, [kit, site], { depthM, sigmaM: round === 0 ? sigmaM : 0.2 });
  }
  if (!position.ok) return position;
  const onWater = spotPlace(site.outline, position.from, position.point);
  return onWater.ok ? { ok: true, position, warnings: onWater.warnings } : onWater;
}

function observationOf(
  { markId, offsetDeg, bearingDeg, wrapsWhole, remainderM }: CastAsked,
  kit: Kit,
): CastObservation {
  return {
    aim:
      markId === undefined
        ? {
            by: 'compass',
            bearingDeg: normaliseBearing((bearingDeg ?? 0) - kit.declinationDeg),
            method: 'compass_phone',
          }
        : { by: 'mark', markId, offsetDeg },
    sidestepM: 0,
    wrapsWhole,
    remainderM,
    remainderStated: remainderM > 0,
    lineText: '',
    rodElevationDeg: kit.rodElevationDeg,
    ...NOTHING_FELT,
    flags: [],
  };
}

type Read = Omit<Landed, 'ok'> & { kit: Kit };

function answer(at: PlaceAsked, asked: CastAsked, { kit, position, warnings }: Read): CastReading {
  const { ground, open } = at;
  if (!open) throw new Error('A cast is read back from a chart');
  const { shown, place } = placeReading(at, position.place);
  const { distanceM, bearingDeg } = geodesicBetween(ground.peg.details.origin, position.place);
  const line = {
    rangeM: ground.sight.sees.depth ? distanceM : Math.round(distanceM),
    bearingDeg,
    lineOutM: position.lineOutM,
    wraps: { whole: asked.wrapsWhole, remainderM: asked.remainderM },
  };
  const cast = castView(line, kit, {
    mark: markFor(ground.marks, {
      from: ground.peg.details.origin,
      bearingDeg,
      aimedAt: asked.markId ?? null,
    }),
  });
  const { chart } = open;
  const told = spotWords({
    ...cast,
    ...shown,
    survey:
      shown.surveyLevelM === null || shown.depthAtSurveyM === null
        ? null
        : { depthM: shown.depthAtSurveyM, levelM: shown.surveyLevelM },
    datumM: chart.datumM,
    levelM: ground.levelNow?.levelM ?? null,
    chartVersion: chart.version,
  });
  const count = `${countWords(cast.wrapsWhole, cast.remainderM)} (${stickWords(cast.stickSpacingM)})`;
  return {
    ok: true,
    pegId: ground.peg.id,
    chart: { id: chart.id, version: chart.version, surveyedTo: chart.surveyedTo, datumM: chart.datumM },
    age: chart.age,
    cast,
    place,
    spreadM: Math.round(ellipse95(position.covariance).semiMajorM * 10) / 10,
    warnings: [...warnings.map((words) => `${words}.`), ...reachWarnings(at, position.point, place.water)],
    words: `Peg ${ground.peg.number}, ${told.replace(count, `${count} ${aimWords(cast)}`)}.`,
    whyNot: whyMissing(at, shown),
  };
}
