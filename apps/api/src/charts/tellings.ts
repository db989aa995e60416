import { Mark } from '@mereward/db/entities/lakes/mark';
import { FEATURE_METHOD } from '@mereward/shared/charts/feature-words';
import type {
  ChartFeatures,
  NextCasts,
  StandOutPatch,
  StandOutPatches,
} from '@mereward/shared/charts/chart-answers';
import { readChart } from '@mereward/shared/charts/chart-reading';
import { PATCH_CAUTION, PATCH_LIMITS } from '@mereward/shared/charts/stand-out-patches';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { ownerAt, reachFrom } from '@mereward/shared/lakes/peg-waters';
import { UNREAD_DEPTH } from '@mereward/shared/surveys/error-budget';
import type { Ctx } from '../ctx';
import { originOfLake } from '../lakes/found';
import { levelNow } from '../lakes/levels';
import { watersOf } from '../lakes/peg-waters';
import { STAFF } from '../lakes/policy';
import type { BuiltNextCasts, BuiltTellings } from './built-tellings';
import { castTo, castView } from './cast-to';
import { chartContent, layersOf, type ChartContent } from './chart-layers';
import { surveyDays } from './chart-view';
import { chartForStaff, chartToRead, type ChartFound, type LightChart } from './find-chart';
import { sightOnChart, type Layer, type Sight } from './layers';
import { kitOf, markFor } from './spot-reach';
import { newestVisit } from './spot-view';

/** How a chart is named in an answer about it. */
export const chartNamed = (chart: LightChart) => ({
  id: chart.id,
  version: chart.version,
  surveyedTo: surveyDays(chart).surveyedTo,
  datumM: chart.datumM,
});

type Told = { content: ChartContent | null; tellings: BuiltTellings | null; whyNot: string | null };

const FROM_BEFORE = 'This chart was built before such things were looked for. The next one will have them.';

/** What a chart was found to tell, or in words why this reader gets none of it. */
async function toldOf(
  ctx: Ctx,
  { chart }: ChartFound,
  { sight, layer }: { sight: Sight; layer: Layer },
): Promise<Told> {
  const nothing = (whyNot: string): Told => ({ content: null, tellings: null, whyNot });
  const hidden = sight.notes[layer];
  if (hidden !== null) return nothing(hidden);
  if (chart.status === 'withdrawn' && !sight.staff) return nothing('This chart was withdrawn.');
  const content = await chartContent(ctx.tx, chart.id);
  if (content === null) return nothing('This chart is not built yet.');
  const { tellings } = content.built;
  return tellings ? { content, tellings, whyNot: null } : nothing(FROM_BEFORE);
}

/** Bars, shelves, gullies and holes, for whoever sees depths. */
export async function chartFeatures(ctx: Ctx, chartId: string): Promise<ChartFeatures> {
  const found = await chartToRead(ctx, chartId);
  const { chart, lake } = found;
  const { tellings, whyNot } = await toldOf(ctx, found, {
    sight: await sightOnChart(ctx, lake),
    layer: 'depth',
  });
  return {
    chart: chartNamed(chart),
    levelNow: await levelNow(ctx.tx, lake.id, chart.datumM),
    features: tellings?.features ?? null,
    whyNot,
    method: FEATURE_METHOD,
  };
}

const MOST_REACHING = 4;

/** Patches whose bottom stands out, for whoever sees bottoms, with the pegs that reach them today. */
export async function chartPatches(ctx: Ctx, chartId: string): Promise<StandOutPatches> {
  const found = await chartToRead(ctx, chartId);
  const { chart, lake } = found;
  const sight = await sightOnChart(ctx, lake);
  const { content, tellings, whyNot } = await toldOf(ctx, found, { sight, layer: 'bottom' });
  const reaching = content && (await reachOf(ctx, found, { content, sight }));
  return {
    chart: chartNamed(chart),
    patches:
      tellings && reaching ? tellings.patches.map((patch) => ({ ...patch, reach: reaching(patch) })) : null,
    whyNot,
    ringM: PATCH_LIMITS.ringM,
    caution: PATCH_CAUTION,
  };
}

type Reach = StandOutPatch['reach'];
type Reaching = (place: { xM: number; yM: number }) => Reach;

async function reachOf(
  { tx }: Ctx,
  { chart, lake }: ChartFound,
  { content, sight }: { content: ChartContent; sight: Sight },
): Promise<Reaching> {
  const { pegs, stances, waters, outline } = await watersOf(tx, lake);
  const marks = await tx.find(Mark, { where: { lakeId: lake.id }, order: { code: 'ASC' } });
  const level = await levelNow(tx, lake.id, chart.datumM);
  const kit = kitOf(newestVisit(content.built, null));
  const reaches = stances.map((stance) => reachFrom(outline, stance));
  const origin = originOfLake(lake);
  return (place) => {
    const to = fromPlane(origin, place);
    const owner = ownerAt(waters, place);
    // Line goes down too: the true depth would show through the count for whoever may not see it.
    const charted = sight.sees.depth ? readChart(layersOf(content), place).depthM : null;
    const depthM =
      charted === null ? UNREAD_DEPTH.depthM : charted + (level ? level.levelM - chart.datumM : 0);
    return pegs
      .flatMap((peg, i) => {
        const { inArc, inRange, inSight } = reaches[i]!(place);
        if (!(inArc && inRange && inSight)) return [];
        const cast = castTo({ from: peg.details.origin, to, kit, depthM: Math.max(0, depthM), marks });
        return cast ? [{ pegId: peg.id, number: peg.number, own: i === owner, cast }] : [];
      })
      .sort((a, b) => Number(b.own) - Number(a.own) || a.cast.rangeM - b.cast.rangeM)
      .slice(0, MOST_REACHING);
  };
}

/** Where each peg's next casts would teach most, for staff. */
export async function chartNextCasts(ctx: Ctx, chartId: string): Promise<NextCasts> {
  const found = await chartForStaff(ctx, chartId, STAFF);
  const { chart, lake } = found;
  const { content, tellings, whyNot } = await toldOf(ctx, found, {
    sight: await sightOnChart(ctx, lake),
    layer: 'depth',
  });
  const built = tellings?.nextCasts ?? null;
  return {
    chart: chartNamed(chart),
    pegs: built && content ? await nextCastsOf(ctx, found, { built, content }) : null,
    meanSigmaM: built?.meanSigmaM ?? null,
    whyNot:
      whyNot ??
      (built
        ? null
        : 'No visit of this chart tells of sticks and a rod to cast with, so no cast can be named.'),
    method: built ? methodOf(built) : '',
  };
}

function methodOf({ places, meanErrorShare, isMerged }: BuiltNextCasts): string {
  const percent = Math.max(1, Math.round(100 * meanErrorShare));
  return (
    `Chosen one after another so that the mean variance of the depth over ${places} places of the water (its mean known to ` +
    `${percent} %) falls most; each peg by itself, within its own water, its arc and its longest cast, on the survey’s sticks.` +
    (isMerged
      ? ' The soundings are so many that neighbours were merged for this: gains are good to a tenth of the best.'
      : '')
  );
}

async function nextCastsOf(
  { tx }: Ctx,
  { lake }: ChartFound,
  { built, content }: { built: BuiltNextCasts; content: ChartContent },
): Promise<NextCasts['pegs']> {
  const { pegs } = await watersOf(tx, lake);
  const marks = await tx.find(Mark, { where: { lakeId: lake.id }, order: { code: 'ASC' } });
  const kit = kitOf(newestVisit(content.built, null));
  return pegs.map(({ id, number, details }) => {
    const chosen = built.pegs.find(({ pegId }) => pegId === id)?.casts ?? [];
    const casts = chosen.map(({ gainShare, xM, yM, ...line }, i) => ({
      order: i + 1,
      xM,
      yM,
      gainShare,
      cast: castView({ ...line, wraps: { whole: line.wrapsWhole, remainderM: 0 } }, kit, {
        mark: markFor(marks, { from: details.origin, bearingDeg: line.bearingDeg, aimedAt: null }),
      }),
    }));
    const gainShare = chosen.reduce((sum, each) => sum + each.gainShare, 0);
    return {
      pegId: id,
      number,
      name: details.name,
      gainShare,
      casts,
      words: gainWords(casts.length, gainShare),
    };
  });
}

function gainWords(count: number, gainShare: number): string {
  if (count === 0) return 'No cast from here would tell the chart much more.';
  const casts = count === 1 ? 'This cast' : `These ${count} casts`;
  return `${casts} would take ${(100 * gainShare).toFixed(1)} % off the lake’s uncertainty.`;
}
