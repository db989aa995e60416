import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { csvText } from '@mereward/shared/writing/csv-cells';
import { createHash } from 'node:crypto';
import { In, type EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { STAFF } from '../lakes/policy';
import { LEFT_OUT_FLAG } from '@mereward/shared/surveys/casts-row';
import { CAST_COLUMNS_OUT, castRow, soundingCells, type CastCells } from '../surveys/cast-cells';
import type { VisitSite } from '../surveys/reduce-visit';
import { castsOf } from '../surveys/reduce-again';
import { visitSite } from '../surveys/visit-site';
import type { Built, BuiltSounding } from './built';
import { chartContent } from './chart-layers';
import { fileName } from './file-name';
import { chartForStaff, type ChartFound } from './find-chart';

/** A visit of a chart with its casts as they are kept. */
export type ChartVisit = { visit: SurveyVisit; site: VisitSite; casts: SurveyCast[] };

export type ChartCasts = ChartFound & { built: Built; visits: ChartVisit[]; zone: string };

/** Everything a chart was surveyed by, for its staff. */
export async function chartCasts(ctx: Ctx, chartId: string): Promise<ChartCasts> {
  const { tx } = ctx;
  const found = await chartForStaff(ctx, chartId, STAFF);
  const content = await chartContent(tx, chartId);
  if (!content) throw notFound('built chart');
  const { zone } = await tx.findOneByOrFail(Fishery, { id: found.lake.fisheryId });
  return { ...found, built: content.built, visits: await visitsOf(tx, found), zone };
}

async function visitsOf(tx: EntityManager, { chart, lake }: ChartFound): Promise<ChartVisit[]> {
  const visits = await tx.find(SurveyVisit, {
    where: { id: In(chart.visitIds) },
    order: { startedAt: 'ASC', id: 'ASC' },
  });
  const sited: ChartVisit[] = [];
  for (const visit of visits)
    sited.push({ visit, site: await visitSite(tx, { visit, lake }), casts: await castsOf(tx, visit.id) });
  return sited;
}

export type CastsTable = { filename: string; text: string; sha256: string };

/** The casts of a chart as a table with its digest: as observed, and as this chart was made of them. */
export async function chartCastsCsv(ctx: Ctx, chartId: string): Promise<CastsTable> {
  return castsTable(ctx.tx, await chartCasts(ctx, chartId));
}

/** SHA-256 is of every byte of the file, the mark of UTF-8 at its beginning included. */
export async function castsTable(
  tx: EntityManager,
  { built, visits, zone, lake, chart }: ChartCasts,
): Promise<CastsTable> {
  const charted = new Map(built.soundings.map((each) => [each.id, each]));
  const leftOut = new Map(built.leftOut.map((each) => [each.id, each]));
  const keepers = visits.flatMap(({ casts }) => casts.map((cast) => cast.keptBy));
  const people = await tx.findBy(Account, { id: In([...new Set(keepers)]) });
  const names = new Map(people.map(({ id, name }) => [id, name]));
  const rows = visits.flatMap(({ site, casts }) =>
    casts.map((cast) =>
      castRow(
        { site, cast, zone, by: names.get(cast.keptBy) ?? '' },
        chartedCells(built, { cast, charted: charted.get(cast.id), leftOut: leftOut.get(cast.id) }),
      ),
    ),
  );
  const text = `\uFEFF${csvText([CAST_COLUMNS_OUT, ...rows])}`;
  return {
    filename: `${fileName(lake.name, 'casts', chart.version ?? 'draft')}.csv`,
    text,
    sha256: createHash('sha256').update(text).digest('hex'),
  };
}

type Charted = {
  cast: SurveyCast;
  charted: BuiltSounding | undefined;
  leftOut: Built['leftOut'][number] | undefined;
};

/** What the chart was made of, frozen with it; not what the same cast would come to today. */
function chartedCells({ origin }: Built, { cast, charted, leftOut }: Charted): CastCells {
  if (!charted)
    return {
      ...(leftOut?.byHand ? { flags: [...cast.observation.flags, LEFT_OUT_FLAG].join(';') } : {}),
      not_reduced_because: leftOut?.why ?? 'Not in this chart.',
    };
  const { xM, yM } = charted;
  const rangeM = cast.reduced.ok ? cast.reduced.sounding.rangeM : Number.NaN; // a chart keeps the place, not the range
  const position = fromPlane(origin, { xM, yM });
  return {
    ...soundingCells({ ...charted, rangeM, position, depthSigmaM: charted.sigmaM }),
    not_reduced_because: leftOut?.why ?? null,
  };
}
