import type { Chart } from '@mereward/db/entities/charts/chart';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import type { AgeNow, ChartAge } from '@mereward/shared/charts/chart-age';
import type { LonLat } from '@mereward/shared/geometry/plane';
import type { LevelNow } from '@mereward/shared/lakes/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { findPeg } from '../lakes/found';
import { levelNow } from '../lakes/levels';
import { runningTicket, type RunningTicket } from '../lakes/running-ticket';
import { ageNow } from './chart-age-now';
import { chartContent, type ChartContent } from './chart-layers';
import { sightOf, type Sight } from './layers';

/** The published chart of a peg's lake, with its content. */
export type PegChart = {
  id: string;
  version: string;
  surveyedFrom: string;
  surveyedTo: string;
  datumM: number;
  contourStepM: number;
  age: ChartAge;
  ageNow: AgeNow; // with what dates it
  content: ChartContent;
};

/** Everything a page about a peg is made of, for one reader. */
export type PegGround = {
  peg: Peg;
  lake: Lake;
  fishery: Fishery;
  marks: Mark[];
  origin: LonLat; // of the plane the chart is drawn in
  sight: Sight;
  ticket: RunningTicket | null;
  levelNow: LevelNow | null;
  chart: PegChart | null;
};

export async function pegGround(ctx: Ctx, pegId: string): Promise<PegGround> {
  const { tx } = ctx;
  const { peg, lake } = await findPeg(tx, pegId);
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const ticket = await runningTicket(ctx, pegId);
  const chart = await publishedChart(ctx, lake, fishery.zone);
  return {
    peg,
    lake,
    fishery,
    marks: await tx.find(Mark, { where: { lakeId: lake.id }, order: { code: 'ASC' } }),
    origin: chart?.content.built.origin ?? [lake.originLon, lake.originLat],
    sight: sightOf(ctx, lake, ticket !== null),
    ticket,
    levelNow: await levelNow(tx, lake.id, chart?.datumM ?? lake.datumM),
    chart,
  };
}

type Published = Pick<Chart, 'id' | 'datumM' | 'contourStepM'> & {
  version: string;
  surveyedFrom: string;
  surveyedTo: string;
};

async function publishedRow(tx: EntityManager, lakeId: string): Promise<Published | null> {
  const [row] = await tx.query<Published[]>(
    `SELECT id, version, datum_m AS "datumM", contour_step_m AS "contourStepM", surveyed_from::text AS "surveyedFrom", surveyed_to::text AS "surveyedTo"
       FROM chart WHERE lake_id = $1 AND status = 'published'`,
    [lakeId],
  );
  return row ?? null;
}

async function publishedChart(ctx: Ctx, lake: Lake, zone: string): Promise<PegChart | null> {
  const row = await publishedRow(ctx.tx, lake.id);
  const content = row && (await chartContent(ctx.tx, row.id));
  if (!row || !content) return null;
  const now = await ageNow(ctx, { ...row, lakeId: lake.id, zone, origin: content.built.origin });
  return { ...row, age: now.age, ageNow: now, content };
}
