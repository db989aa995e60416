import { Account } from '@mereward/db/entities/accounts/account';
import type { Chart } from '@mereward/db/entities/charts/chart';
import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import type { ReportEvidence } from '@mereward/shared/charts/reported-evidence';
import type { BottomEnding } from '@mereward/shared/surveys/bottom-ending';
import type { BottomFeel } from '@mereward/shared/surveys/bottom-table-contract';
import type { ConfirmedPlace } from '@mereward/shared/surveys/confirmed-pairs';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In, IsNull, type EntityManager } from 'typeorm';
import { digestOf } from '../digest';
import { feelInForce } from '../surveys/bottom-feel';
import { confirmedPlaces } from '../surveys/confirmed-places';
import { endingsOf } from '../surveys/endings';
import type { ObservedCast, VisitSite } from '../surveys/reduce-visit';
import { watersOf, type WatersFound } from '../lakes/peg-waters';
import { visitSite } from '../surveys/visit-site';
import { keyOf, leftOutOf, type SourceLeftOut } from './source-left-out';
import { logsOf, soundingsOf, type SourceLog } from './source-logs';

export type SourceCast = ObservedCast & { seq: number; lineId: string; observedOn: string };
export type SourceReport = ReportEvidence & { id: string; pegId: string };
export type SourceVisit = {
  site: VisitSite;
  surveyorName: string;
  day: string;
  casts: SourceCast[];
  logs: SourceLog[];
};

/** Everything a chart is made from, as it was observed. It survives structured cloning: a thread reads it. */
export type BuildSource = {
  lake: Lake;
  zone: string;
  contourStepM: number;
  visits: SourceVisit[]; // with every cast, those left out too
  leftOut: SourceLeftOut[]; // by a person
  feel: BottomFeel;
  tableVersion: number; // of the feel; 0 is the built-in
  endings: BottomEnding[]; // works and seasons, oldest first
  confirmed: ConfirmedPlace[]; // by id
  asOf: string; // civil day the chart is made for: covers fade up to it
  reports: SourceReport[]; // what anglers found otherwise and the fishery accepted, by id
  waters: WatersFound; // for the advice on where to cast next; no part of the chart itself
};

export type Wanted = Pick<Chart, 'id' | 'lakeId' | 'visitIds' | 'contourStepM' | 'draftedAt'>;

/** Loads what a chart is made from, in an order of its own: visits and casts by their ids. */
export async function buildSource(tx: EntityManager, chart: Wanted): Promise<BuildSource> {
  const lake = await tx.findOneByOrFail(Lake, { id: chart.lakeId });
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const visits = await tx.find(SurveyVisit, { where: { id: In(chart.visitIds) }, order: { id: 'ASC' } });
  const casts = await tx.find(SurveyCast, {
    where: { visitId: In(chart.visitIds), undoneAt: IsNull() },
    order: { id: 'ASC' },
  });
  const logs = await logsOf(tx, chart.visitIds);
  const people = await tx.findBy(Account, { id: In(visits.map((visit) => visit.surveyorId)) });
  const sourced: SourceVisit[] = [];
  for (const visit of visits)
    sourced.push({
      site: await visitSite(tx, { visit, lake }),
      surveyorName: people.find((person) => person.id === visit.surveyorId)?.name ?? '',
      day: civilDay(visit.startedAt, zone),
      casts: casts
        .filter((cast) => cast.visitId === visit.id)
        .map(({ id, pegId, lineId, seq, observedAt, observation }) => ({
          id,
          pegId,
          lineId,
          seq,
          observedAt,
          observation,
          observedOn: civilDay(observedAt, zone),
        })),
      logs: logs.filter((log) => log.visitId === visit.id),
    });
  const reports = await acceptedReports(tx, lake.id);
  const { feel, version } = await feelInForce(tx, lake.fisheryId);
  return {
    lake,
    zone,
    contourStepM: chart.contourStepM,
    visits: sourced,
    leftOut: await leftOutOf(tx, { chartId: chart.id, visits: sourced, zone }),
    reports,
    feel,
    tableVersion: version,
    endings: await endingsOf(tx, lake),
    confirmed: await confirmedPlaces(tx, lake),
    asOf: civilDay(chart.draftedAt, zone),
    waters: await watersOf(tx, lake),
  };
}

/** The same with the soundings of its logs, which only the building asks for. */
export async function withSoundings(tx: EntityManager, source: BuildSource): Promise<BuildSource> {
  const visits: SourceVisit[] = [];
  for (const visit of source.visits) {
    const logs: SourceLog[] = [];
    for (const log of visit.logs) logs.push({ ...log, soundings: await soundingsOf(tx, log) });
    visits.push({ ...visit, logs });
  }
  return { ...source, visits };
}

async function acceptedReports(tx: EntityManager, lakeId: string): Promise<SourceReport[]> {
  const pegs = await tx.find(Peg, { where: { lakeId }, select: { id: true } });
  const rows = await tx.find(Disagreement, {
    where: { pegId: In(pegs.map(({ id }) => id)), status: 'accepted' },
    order: { id: 'ASC' },
  });
  return rows.flatMap(({ id, pegId, evidence }) => (evidence ? [{ id, pegId, ...evidence }] : []));
}

/**
 * A digest of everything that decides how the chart comes out, and of nothing else: the same digest, the same chart.
 * Names and notes are no part of it.
 */
export function sourceDigest(source: BuildSource): Buffer {
  const { lake, contourStepM, visits, leftOut, reports, feel, tableVersion, endings, confirmed } = source;
  const decides = {
    outline: lake.details.outline,
    ...(lake.details.outlineFrom ? { shoreWithinM: lake.details.outlineFrom.withinM } : {}),
    origin: [lake.originLon, lake.originLat],
    maxGapM: lake.details.maxGapM,
    contourStepM,
    visits: visits.map(({ site, casts, logs }) => ({
      id: site.visit.id,
      kit: site.visit.kit,
      ...(site.lead ? { lead: site.lead } : {}),
      gauge: site.gauge,
      pegs: [...new Set(casts.map((cast) => cast.pegId))].sort().map((id) => stanceOf(site, id)),
      marks: [...new Set(casts.flatMap(markOf))]
        .sort()
        .map((id) => [id, site.marks.get(id)?.details ?? null]),
      casts: casts.map(({ id, pegId, observedAt, observation }) => [
        id,
        pegId,
        observedAt.toISOString(),
        observation,
      ]),
      ...(logs.length > 0 ? { logs: logs.map(({ id, options }) => [id, options]) } : {}), // as before there were logs
    })),
    ...(leftOut.length > 0 ? { leftOut: leftOut.map(({ what }) => keyOf(what)) } : {}),
    ...(tableVersion > 0 ? { feel } : {}),
    ...(endings.length > 0 ? { endings } : {}),
    ...(confirmed.length > 0 ? { confirmed } : {}),
    ...(reports.length > 0 ? { reports } : {}), // what a chart has none of is no part of its digest
  };
  return digestOf(decides);
}

function stanceOf({ pegs }: VisitSite, id: string): unknown {
  const details = pegs.get(id)?.details;
  return [id, details?.origin ?? null, details?.originFixedBy ?? null, details?.originMarked ?? null];
}

const markOf = ({ observation: { aim } }: SourceCast): string[] => (aim.by === 'mark' ? [aim.markId] : []);
