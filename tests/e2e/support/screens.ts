import { randomUUID } from 'node:crypto';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { ChartList, PegPageView } from '@mereward/shared/charts/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { LakePictureView } from '@mereward/shared/lakes/picture-contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { aPhoto } from '../../support/pictures';
import { aFan } from '../../support/long-water';
import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Asking } from './people';
import { expect, type Site } from './site';
import { bookingOf } from './ticket-sales';
import { aLogRead, anOpenVisit, castMeanwhile } from './story-water';

const APP = fileURLToPath(new URL('../../../apps/mobile/src/app', import.meta.url));

/** Every address the client has a screen for, as its files name it: `/water/lakes/[lakeId]`. */
export const routes = (): string[] =>
  readdirSync(APP, { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.tsx') && !/(_layout|\+not-found)\.tsx$/.test(file))
    .map((file) => `/${file.replace(/\.tsx$/, '').replace(/(^|\/)index$/, '')}`)
    .filter((route) => route !== '/')
    .sort();

const KINDS = [
  'fisheryId',
  'lakeId',
  'pegId',
  'markId',
  'boardId',
  'chartId',
  'castId',
  'visitId',
  'spotId',
  'logId',
  'pictureId',
  'placeId',
  'ticketTypeId',
  'bookingId',
  'code',
  'token',
] as const;
export type Ids = Readonly<Record<(typeof KINDS)[number], string>>;

/** One thing of each kind from the demo, and an open visit of Joan's with a few casts. */
export async function demoIds(site: Site): Promise<Ids> {
  const joan = await Asking.as('joan', site);
  const { fisheries } = await joan.get('/fisheries', FisheryList);
  const lakeId = fisheries[0]?.lakes.find(({ name }) => name === 'Far Ostle')?.id ?? '';
  const lake = await joan.get(`/lakes/${lakeId}`, LakeView);
  const boardId = lake.boards[0]?.id ?? '';
  const { charts } = await joan.get(`/lakes/${lakeId}/charts`, ChartList);
  const startedAt = new Date(Date.now() - 60_000).toISOString();
  const visitId = await anOpenVisit(joan, { lakeId, boardId }, { startedAt, title: 'Still open' });
  await castMeanwhile(joan, visitId, aFan().slice(0, 6));
  const logId = await aLogRead(joan, visitId, { name: 'points.csv', text: pointsAt(lake.origin) });
  const { casts } = await joan.get(`/visits/${visitId}`, VisitWithCasts);
  const pegId = lake.pegs.find(({ number }) => number === 'FO7')?.id ?? '';
  const { spots } = await joan.get(`/pegs/${pegId}/page`, PegPageView);
  return {
    fisheryId: fisheries[0]?.id ?? '',
    lakeId,
    pegId,
    spotId: spots?.[0]?.id ?? '',
    markId: lake.marks[0]?.id ?? '',
    boardId,
    chartId: charts[0]?.id ?? '',
    castId: casts[0]?.id ?? '',
    visitId,
    logId,
    pictureId: await aPicture(site, lakeId),
    token: 'a-letter-of-no-closure', // what its screen says to whoever has a wrong link
    placeId: lake.details.places?.[0]?.id ?? '',
    ...(await aBooking(site, { fisheryId: fisheries[0]?.id ?? '', lakeId, pegId })),
  };
}

/** A few soundings at a place, one far from it and one that can't be read. */
const pointsAt = ([lon, lat]: readonly [number, number]): string =>
  [
    'lat,lon,depth',
    `${lat},${lon},2.1`,
    `${lat + 0.00002},${lon},2.2`,
    `${lat + 1},${lon},2`,
    `${lat},x,2`,
  ].join('\n');

const TOMORROW_MS = 86_400_000;

/** A kind of ticket on sale, and Priya's booking of it for tomorrow, made at the lodge. */
async function aBooking(site: Site, at: { fisheryId: string; lakeId: string; pegId: string }) {
  const marian = await Asking.as('marian', site);
  const [ticketTypeId, bookingId] = [randomUUID(), randomUUID()];
  const { fisheryId, lakeId, pegId } = at;
  const details = { ...TICKET_TEMPLATES.day, name: 'A looked-at day', lakeIds: [lakeId] };
  await marian.do('POST', `/fisheries/${fisheryId}/ticket-types`, { id: ticketTypeId, details });
  const angler = { name: 'Priya Nair', bornOn: null, kind: 'holder', rods: 2, people: 1 };
  await marian.do('POST', `/fisheries/${fisheryId}/bookings`, {
    id: bookingId,
    lakeId,
    day: new Date(Date.now() + TOMORROW_MS).toISOString().slice(0, 10),
    start: null,
    tickets: [{ ticketTypeId, pegId, ...angler }],
    holder: { name: angler.name, email: 'priya@ostlemere.example' },
    vehicle: '',
    note: '',
  });
  const { code } = await bookingOf(marian, bookingId);
  return { ticketTypeId, bookingId, code };
}

/** A picture to trace the lake over, once it is ready. */
async function aPicture(site: Site, lakeId: string): Promise<string> {
  const marian = await Asking.as('marian', site);
  const id = randomUUID();
  const picture = { name: 'drone.jpg', mimeType: 'image/jpeg', buffer: await aPhoto() };
  await marian.upload(`/lakes/${lakeId}/pictures`, { id, caption: 'From a drone', picture });
  await expect
    .poll(async () => (await marian.get(`/pictures/${id}`, LakePictureView)).state, { timeout: 30_000 })
    .toBe('ready');
  return id;
}

/** A route with its ids filled in, and what it asks for beside them. */
export function addressOf(route: string, ids: Ids): string {
  const path = KINDS.reduce((so, kind) => so.replace(`[${kind}]`, ids[kind]), route);
  return route.endsWith('/new') && !route.includes('[') ? `${path}?lakeId=${ids.lakeId}` : path;
}
