import type { Spot } from '@mereward/db/entities/charts/spot';
import { BOTTOM_OF_COVER, BOTTOM_OF_SUBSTRATE } from '@mereward/shared/charts/bottom-words';
import { gradeNow } from '@mereward/shared/charts/chart-age';
import { readChart, type ChartLayers, type ChartReading } from '@mereward/shared/charts/chart-reading';
import type { SpotView } from '@mereward/shared/charts/contract';
import { PRESENTATION } from '@mereward/shared/charts/presentation';
import { spotWords } from '@mereward/shared/charts/spot-words';
import { toPlane, type Point } from '@mereward/shared/geometry/plane';
import type { Bottom } from '@mereward/shared/surveys/contract';
import type { Built, BuiltSounding, BuiltVisit } from './built';
import type { PegChart, PegGround } from './peg-chart';
import { castToQuote } from './spot-cast';
import { reachOf, type Reach } from './spot-reach';
import { sectionPoints } from './section';

/** Section of a spot: a few metres past it, on a step that keeps the page small. */
const BEYOND_M = 6;
const SECTION_POINTS = 40;

/** A chart with its grids laid open, for every spot of a page. */
export type OpenChart = { chart: PegChart; layers: ChartLayers };

/** A spot as this reader may see it; the layers kept from them are left out one by one. */
export function spotView(
  ground: PegGround,
  open: OpenChart | null,
  spot: Spot,
): Omit<SpotView, 'water'> | null {
  const place = toPlane(ground.origin, spot.details.position);
  const cast = open
    ? castToQuote(open.chart.content.built.soundings, place, spot.details.usableRadiusM)
    : null;
  const visit = open ? visitOf(open.chart, cast, ground.peg.id) : null;
  const reading = open ? readChart(open.layers, place) : null;
  const reach = reachOf({
    ground,
    spot,
    place,
    cast,
    visit,
    depthM: cast?.depthAsReadM ?? reading?.depthM ?? null,
  });
  if (!reach) return null;
  const shown = within(ground, quoted({ chart: open?.chart ?? null, cast, reading }));
  const { sees } = ground.sight;
  return {
    id: spot.id,
    name: spot.details.name,
    note: spot.details.note,
    usableRadiusM: spot.details.usableRadiusM,
    ...reach,
    ...whereabouts(ground, place, reach),
    ...shown,
    words: wordsOf(ground, reach, shown),
    section: open && sees.depth ? sectionOf(ground, open, reach) : null,
    presentation: shown.bottom === null ? null : PRESENTATION[shown.bottom],
    version: spot.version,
  };
}

/** Wraps go down as well as out: beside an exact range they would tell a depth that this reader may not see. */
function whereabouts(
  { sight: { sees } }: PegGround,
  { xM, yM }: Point,
  { rangeM }: Reach,
): Pick<SpotView, 'xM' | 'yM' | 'rangeM'> {
  if (sees.depth) return { xM, yM, rangeM };
  return { xM: Math.round(xM), yM: Math.round(yM), rangeM: Math.round(rangeM) };
}

/** Whose sticks a spot is counted in: the visit of that cast, else the newest that cast from this peg, else the newest. */
function visitOf(
  { content: { built } }: PegChart,
  cast: BuiltSounding | null,
  pegId: string,
): BuiltVisit | null {
  if (cast) return built.visits.find((visit) => visit.id === cast.visitId) ?? null;
  return newestVisit(built, pegId);
}

/** The newest visit that cast from a peg, else (or for no peg) the newest of all. */
export function newestVisit(
  { visits, soundings }: Pick<Built, 'visits' | 'soundings'>,
  pegId: string | null,
): BuiltVisit | null {
  const newest = [...visits].sort((a, b) => (a.day < b.day ? 1 : a.day > b.day ? -1 : a.id < b.id ? -1 : 1));
  const here = new Set(soundings.filter((each) => each.pegId === pegId).map((each) => each.visitId));
  return newest.find((visit) => here.has(visit.id)) ?? newest[0] ?? null;
}

export type Quoted = Pick<
  SpotView,
  | 'depthM'
  | 'depthSigmaM'
  | 'bottom'
  | 'bottomConfidence'
  | 'quotedFrom'
  | 'surveyLevelM'
  | 'depthAtSurveyM'
  | 'grade'
  | 'surveyedOn'
>;

const UNSURVEYED: Quoted = {
  depthM: null,
  depthSigmaM: null,
  bottom: null,
  bottomConfidence: null,
  quotedFrom: null,
  surveyLevelM: null,
  depthAtSurveyM: null,
  grade: null,
  surveyedOn: null,
};

type Source = { chart: PegChart | null; cast: BuiltSounding | null; reading: ChartReading | null };

export function quoted({ chart, cast, reading }: Source): Quoted {
  if (chart && cast)
    return {
      depthM: cast.depthM,
      depthSigmaM: cast.sigmaM,
      bottom: cast.bottom,
      bottomConfidence: cast.bottomShare,
      quotedFrom: 'cast',
      surveyLevelM: chart.datumM + cast.depthAsReadM - cast.depthM, // the water over datum at that hour
      depthAtSurveyM: cast.depthAsReadM,
      grade: gradeNow(cast.grade, cast, chart.ageNow),
      surveyedOn: cast.observedOn,
    };
  if (!chart || !reading || (reading.depthM === null && reading.bottom === null)) return UNSURVEYED;
  const bottom = bottomOf(reading);
  return {
    ...UNSURVEYED,
    depthM: reading.depthM,
    depthSigmaM: reading.sigmaM,
    bottom: bottom?.bottom ?? null,
    bottomConfidence: bottom?.confidence ?? null,
    quotedFrom: 'chart',
    surveyedOn: chart.surveyedTo,
  };
}

function bottomOf({ cover, substrate }: ChartReading): { bottom: Bottom; confidence: number } | null {
  if (cover && cover.bottom !== 'clear') return { ...cover, bottom: BOTTOM_OF_COVER[cover.bottom] };
  return substrate && { ...substrate, bottom: BOTTOM_OF_SUBSTRATE[substrate.bottom] };
}

/** What of it this reader may see. Without depth and bottom there is nothing left to grade or date. */
export function within({ sight: { sees } }: PegGround, whole: Quoted): Quoted {
  if (!sees.depth && !sees.bottom) return UNSURVEYED;
  const depth = sees.depth
    ? {}
    : { depthM: null, depthSigmaM: null, surveyLevelM: null, depthAtSurveyM: null };
  const bottom = sees.bottom ? {} : { bottom: null, bottomConfidence: null };
  return { ...whole, ...depth, ...bottom };
}

function wordsOf({ chart, levelNow, lake }: PegGround, reach: Reach, shown: Quoted): string {
  const { surveyLevelM, depthAtSurveyM } = shown;
  return spotWords({
    ...reach,
    ...shown,
    survey:
      surveyLevelM === null || depthAtSurveyM === null
        ? null
        : { depthM: depthAtSurveyM, levelM: surveyLevelM },
    datumM: chart?.datumM ?? lake.datumM,
    levelM: levelNow?.levelM ?? null,
    chartVersion: chart?.version ?? null,
  });
}

function sectionOf(ground: PegGround, open: OpenChart, reach: Reach): SpotView['section'] {
  const toM = reach.rangeM + BEYOND_M;
  return sectionPoints(ground, open, { bearingDeg: reach.bearingDeg, toM, stepM: toM / SECTION_POINTS });
}
