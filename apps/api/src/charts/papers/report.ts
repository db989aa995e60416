import { Account } from '@mereward/db/entities/accounts/account';
import { Chart } from '@mereward/db/entities/charts/chart';
import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { LeadCalibration } from '@mereward/db/entities/surveys/lead-calibration';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In, type EntityManager } from 'typeorm';
import type { Ctx } from '../../ctx';
import type { FileStore } from '../../files/store';
import { coverageOf } from '../../surveys/coverage';
import { eventsOf } from '../../surveys/endings';
import { Built } from '../built';
import { ageNow } from '../chart-age-now';
import { castsTable, chartCasts, type ChartCasts } from '../chart-casts';
import { soundingsTable } from '../chart-soundings';
import { drawPaper } from './draw-paper';
import { fileName } from '../file-name';
import type { LogBrought } from './report-logs';
import { reportPhotos } from './report-photos';
import { leftOutViews } from '../left-out-views';
import { reportDocument, type EarlierChart, type SurveyReport } from './report-document';

/** The whole account of a survey, for the staff: how it was made, every cast, how good it is, and whose it is. */
export async function surveyReport(
  ctx: Ctx,
  chartId: string,
  store: FileStore,
): Promise<{ filename: string; pdf: Buffer }> {
  const { tx, now } = ctx;
  const casts = await chartCasts(ctx, chartId);
  const { chart, lake, visits, zone, built } = casts;
  const { surveyedTo, datumM } = chart;
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const table = await castsTable(tx, casts);
  const report: SurveyReport = {
    ...casts,
    fisheryName: fishery.name,
    people: await namesOf(tx, casts),
    readings: await readingsOf(tx, casts),
    coverage: visits.map(({ site, casts: own }) => coverageOf(site, own)),
    earlier: await chartBefore(tx, casts),
    logs: await logsBrought(tx, casts),
    leads: await leadsOf(tx, casts),
    events: await eventsOf(tx, lake.id),
    ageNow:
      surveyedTo === null
        ? null
        : await ageNow(ctx, { lakeId: lake.id, surveyedTo, datumM, zone, origin: built.origin }),
    accepted: await acceptedOf(tx, casts),
    photos: await reportPhotos(ctx, casts, store),
    leftOut: (await leftOutViews(tx, chartId)).filter(({ putBack }) => putBack === null),
    table,
    soundingsTable: soundingsTable(casts),
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

/** How each of the chart's logs was read, and who brought it. */
async function logsBrought(tx: EntityManager, { built }: ChartCasts): Promise<SurveyReport['logs']> {
  const imports = await tx.findBy(SoundingImport, { id: In(built.logs.map(({ id }) => id)) });
  const people = await tx.findBy(Account, { id: In(imports.map(({ importedBy }) => importedBy)) });
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return new Map(
    imports.map(({ id, options, report, importedBy, importedAt }): [string, LogBrought] => [
      id,
      { options, report, by: names.get(importedBy) ?? 'not known', at: importedAt },
    ]),
  );
}

async function leadsOf(tx: EntityManager, { visits }: ChartCasts): Promise<SurveyReport['leads']> {
  const ids = visits.flatMap(({ visit: { kit } }) => kit.leadId ?? []);
  const leads = await tx.findBy(LeadCalibration, { id: In(ids) });
  return new Map(leads.map((lead) => [lead.id, lead]));
}

async function acceptedOf(tx: EntityManager, { built, zone }: ChartCasts): Promise<SurveyReport['accepted']> {
  const rows = await tx.findBy(Disagreement, { id: In(built.reports.map(({ id }) => id)) });
  const pegs = await tx.findBy(Peg, { id: In(built.reports.map(({ pegId }) => pegId)) });
  return built.reports.map((report) => {
    const row = rows.find(({ id }) => id === report.id);
    return {
      ...report,
      peg: pegs.find(({ id }) => id === report.pegId)?.number ?? '',
      place: row?.place.words ?? '',
      acceptedOn: row?.decidedAt ? civilDay(row.decidedAt, zone) : null,
      takenBackOn: row?.takenBackAt ? civilDay(row.takenBackAt, zone) : null,
    };
  });
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
  const { figures, soundings, logs } = Built.parse(built);
  const merged = logs.reduce((sum, { grades }) => sum + grades.length, 0);
  return { version, surveyedFrom, surveyedTo, visitIds, datumM, figures, casts: soundings.length, merged };
}
