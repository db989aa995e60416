import { Account } from '@mereward/db/entities/accounts/account';
import { Chart } from '@mereward/db/entities/charts/chart';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { coverageOf } from '../surveys/coverage';
import { Built } from './built';
import { castsTable, chartCasts, type ChartCasts } from './chart-casts';
import { drawPaper } from './draw-paper';
import { fileName } from './file-name';
import { reportDocument, type EarlierChart, type SurveyReport } from './report-document';

/** The whole account of a survey, for the staff: how it was made, every cast, how good it is, and whose it is. */
export async function surveyReport(ctx: Ctx, chartId: string): Promise<{ filename: string; pdf: Buffer }> {
  const { tx, now } = ctx;
  const casts = await chartCasts(ctx, chartId);
  const { chart, lake, visits, zone } = casts;
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const table = await castsTable(tx, casts);
  const report: SurveyReport = {
    ...casts,
    fisheryName: fishery.name,
    people: await namesOf(tx, casts),
    readings: await readingsOf(tx, casts),
    coverage: visits.map(({ site, casts: own }) => coverageOf(site, own)),
    earlier: await chartBefore(tx, casts),
    table,
    writtenAt: now,
    writtenOn: civilDay(now, zone),
  };
  const pdf = await drawPaper({ kind: 'pages', paper: reportDocument(report) });
  return { filename: `${fileName(lake.name, 'report', chart.version ?? 'draft')}.pdf`, pdf };
}

async function namesOf(
  tx: EntityManager,
  { chart, visits }: ChartCasts,
): Promise<ReadonlyMap<string, string>> {
  const ids = [
    chart.draftedBy,
    chart.submittedBy,
    chart.approvedBy,
    ...visits.map(({ visit }) => visit.surveyorId),
  ].filter((id) => id !== null);
  const people = await tx.createQueryBuilder(Account, 'a').where('a.id = ANY (:ids)', { ids }).getMany();
  return new Map(people.map(({ id, name }) => [id, name]));
}

/** What the lake's datum board read from the day before the survey's first to the day after its last. */
async function readingsOf(tx: EntityManager, { chart }: ChartCasts): Promise<SurveyReport['readings']> {
  const { surveyedFrom, surveyedTo } = chart;
  if (!surveyedFrom || !surveyedTo) return [];
  return tx.query<SurveyReport['readings']>(
    `SELECT r.at, r.level_m AS "levelM", b.details ->> 'code' AS board
       FROM level_reading r JOIN gauge_board b ON b.id = r.board_id
      WHERE b.lake_id = $1 AND b.is_datum_board AND r.at >= $2::date - 1 AND r.at < $3::date + 2
      ORDER BY r.at, r.id LIMIT 200`,
    [chart.lakeId, surveyedFrom, surveyedTo],
  );
}

/** The chart that was published before this one. */
async function chartBefore(tx: EntityManager, { chart }: ChartCasts): Promise<EarlierChart | null> {
  const [row] = await tx.query<{ id: string }[]>(
    `SELECT id FROM chart WHERE lake_id = $1 AND id <> $2 AND published_at < $3::timestamptz
      ORDER BY published_at DESC, id LIMIT 1`,
    [chart.lakeId, chart.id, chart.publishedAt ?? 'infinity'],
  );
  if (!row) return null;
  const { version, surveyedFrom, surveyedTo, visitIds, datumM, built } = await tx.findOneOrFail(Chart, {
    where: { id: row.id },
    select: {
      id: true,
      version: true,
      surveyedFrom: true,
      surveyedTo: true,
      visitIds: true,
      datumM: true,
      built: true,
    },
  });
  const { figures, soundings } = Built.parse(built);
  return { version, surveyedFrom, surveyedTo, visitIds, datumM, figures, casts: soundings.length };
}
