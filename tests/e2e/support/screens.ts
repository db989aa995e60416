import { FisheryList } from '@mereward/shared/fisheries/contract';
import { ChartList } from '@mereward/shared/charts/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { VisitList, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Asking } from './people';
import type { Site } from './site';
import { anOpenVisit } from './story-water';

const APP = fileURLToPath(new URL('../../../apps/mobile/src/app', import.meta.url));

/** Every address the client has a screen for, as its files name it: `/water/lakes/[lakeId]`. */
export const routes = (): string[] =>
  readdirSync(APP, { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.tsx') && !/(_layout|\+not-found)\.tsx$/.test(file))
    .map((file) => `/${file.replace(/\.tsx$/, '').replace(/(^|\/)index$/, '')}`)
    .filter((route) => route !== '/')
    .sort();

const KINDS = ['lakeId', 'pegId', 'markId', 'boardId', 'chartId', 'castId', 'visitId', 'openId'] as const;
export type Ids = Readonly<Record<(typeof KINDS)[number], string>>;

/** One thing of each kind from the demo, its first closed visit, and an open one of Joan's. */
export async function demoIds(site: Site): Promise<Ids> {
  const joan = await Asking.as('joan', site);
  const { fisheries } = await joan.get('/fisheries', FisheryList);
  const lakeId = fisheries[0]?.lakes.find(({ name }) => name === 'Far Ostle')?.id ?? '';
  const lake = await joan.get(`/lakes/${lakeId}`, LakeView);
  const boardId = lake.boards[0]?.id ?? '';
  const { visits } = await joan.get(`/lakes/${lakeId}/visits`, VisitList);
  const visitId = visits.at(-1)?.id ?? '';
  const { casts } = await joan.get(`/visits/${visitId}`, VisitWithCasts);
  const { charts } = await joan.get(`/lakes/${lakeId}/charts`, ChartList);
  const opened = { startedAt: new Date().toISOString(), title: 'Still open' };
  return {
    lakeId,
    pegId: lake.pegs.find(({ number }) => number === 'FO7')?.id ?? '',
    markId: lake.marks[0]?.id ?? '',
    boardId,
    chartId: charts[0]?.id ?? '',
    castId: casts[0]?.id ?? '',
    visitId,
    openId: await anOpenVisit(joan, { lakeId, boardId }, opened),
  };
}

const WHILE_OPEN = /\/(cast|close|import)$/;

/** A route with its ids filled in, and what it asks for beside them. */
export function addressOf(route: string, ids: Ids): string {
  const asked = WHILE_OPEN.test(route) ? route.replace('[visitId]', '[openId]') : route;
  const path = KINDS.reduce((so, kind) => so.replace(`[${kind}]`, ids[kind]), asked);
  return route.endsWith('/new') && !route.includes('[') ? `${path}?lakeId=${ids.lakeId}` : path;
}
