import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import { PegPageView, type SpotView } from '@mereward/shared/charts/contract';
import { depthNow, depthShown } from '@mereward/shared/charts/depth-words';
import { layerReasons } from '@mereward/shared/charts/layer-reasons';
import { aimWords, depthCaption, ownCountWords } from '@mereward/shared/charts/spot-figures';
import { Audience, PegDetails, type LayerAudiences } from '@mereward/shared/lakes/contract';
import { emergencyFacts, pegFacts, statusWords, wayFacts } from '@mereward/shared/lakes/peg-facts';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import fc from 'fast-check';
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { publishedChart } from '../support/charts';
import { aStranger } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, aReading, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let code: string;

const OPEN: LayerAudiences = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'staff' };

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere <Waters>' });
  water = await aLongWater(server, here);
  const joan = here.people.head_bailiff;
  const visitId = await aSurvey(joan, water);
  await publishedChart(server, {
    person: joan,
    approver: here.people.manager,
    lakeId: water.lake.id,
    visitIds: [visitId],
  });
  const { casts } = VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
  const landed = casts.flatMap(({ reduced }) => (reduced.ok ? [reduced.sounding.position] : []));
  for (const [i, position] of [landed[3], landed[12]].entries())
    await joan.put(`/pegs/${water.peg.id}/spots/${randomUUID()}`).send({
      details: { name: `Bar & <shelf> ${i + 1}`, position, usableRadiusM: 1, note: 'Fish over the "edge"' },
      version: null,
    });
  await aReading(server, water.board, { levelM: 0.38, at: '2027-07-17T05:00:00Z' });
  server.setNow('2027-07-17T09:00:00Z');
  await setAudiences(OPEN);
  code = (await server.server.source.manager.findOneByOrFail(Peg, { id: water.peg.id })).code;
});
afterAll(() => server.close());

const ask = (path: string) => request(server.app).get(path).redirects(0);
const pegPage = async (): Promise<PegPageView> =>
  PegPageView.parse((await aStranger(server).get(`/pegs/${water.peg.id}/page`)).body);

async function setAudiences(audiences: LayerAudiences): Promise<void> {
  const lake = await server.server.source.manager.findOneByOrFail(Lake, { id: water.lake.id });
  await server.server.source.manager.update(
    Lake,
    { id: lake.id },
    { details: { ...lake.details, audiences } },
  );
}

async function setDetails(change: Partial<PegDetails>): Promise<void> {
  const peg = await server.server.source.manager.findOneByOrFail(Peg, { id: water.peg.id });
  await server.server.source.manager.update(Peg, { id: peg.id }, { details: { ...peg.details, ...change } });
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&amp;': '&',
  '&lt;': '<',
  '&gt;': '>',
  '&quot;': '"',
  '&#39;': "'",
};

/** What a reader reads of a page: its words, with the drawing and the style left out. */
const wordsOf = (page: string): string =>
  page
    .replace(/<style>.*?<\/style>|<svg.*?<\/svg>/gs, '')
    .replace(/<[^>]*>/g, ' ')
    .replace(/&\w+;|&#39;/g, (entity) => ENTITIES[entity] ?? entity)
    .replace(/\s+/g, ' ');

const said = (words: string): string => words.replace(/\s+/g, ' ').trim();

describe('a peg’s light page', () => {
  test('stands at its code in any letters, with a slash or none, light and without a script', async () => {
    for (const at of [code, code.toLowerCase(), `${code}/`, `${code.slice(0, 3)}-${code.slice(3)}`]) {
      const answer = await ask(`/p/${at}`);
      expect(answer.status).toBe(200);
      expect(answer.headers['content-type']).toContain('text/html');
      expect(Buffer.byteLength(answer.text)).toBeLessThanOrEqual(50_000);
      expect(answer.text).not.toMatch(/<script|javascript:|\son\w+=/i);
      expect(
        answer.text.match(/(src|href)="(?!\/|\?|#|data:,|http:\/\/127\.0\.0\.1:4310\/p\/)[^"]*"/),
      ).toBeNull();
      expect(answer.text).toContain('<svg');
    }
  });

  test('is held by its own policy to one style and no script', async () => {
    const answer = await ask(`/p/${code}`);
    const policy = answer.headers['content-security-policy'] ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).not.toMatch(/script-src|unsafe/);
    const style = /<style>(.*?)<\/style>/s.exec(answer.text)?.[1] ?? '';
    const digest = await crypto.subtle.digest('SHA-256', Buffer.from(style));
    expect(policy).toContain(`'sha256-${Buffer.from(digest).toString('base64')}'`);
    expect(answer.text).not.toMatch(/ style="/);
  });

  test('is kept a minute, and not sent again while it is the same', async () => {
    const first = await ask(`/p/${code}`);
    expect(first.headers['cache-control']).toBe('public, max-age=60');
    const again = await ask(`/p/${code}`).set('If-None-Match', first.headers['etag'] ?? '');
    expect(again.status).toBe(304);
    const feet = await ask(`/p/${code}?in=ft`).set('If-None-Match', first.headers['etag'] ?? '');
    expect(feet.status).toBe(200);
  });

  test('counts on the reader’s own sticks, in metres or feet, and says what it can’t read', async () => {
    const [spot] = (await pegPage()).spots ?? [];
    if (!spot) throw new Error('The peg has no spot');
    const at = async (query: string) => wordsOf((await ask(`/p/${code}${query}`)).text);
    const count = (stickSpacingM: number, length: 'm' | 'ft') =>
      said(ownCountWords(spot, { stickSpacingM, length }));
    expect(await at('')).toContain(count(3.6576, 'm'));
    expect(await at('?sticks=3.05')).toContain(count(3.05, 'm'));
    expect(await at('?sticks=10+ft&in=ft')).toContain(count(3.048, 'ft'));
    const faulty = await at('?sticks=%3Cb%3E');
    expect(faulty).toContain('Type it like 3.05 m or 10 ft');
    expect(faulty).toContain(count(3.6576, 'm'));
  });

  test('says first that a peg is closed, and of a power line', async () => {
    const { details } = await server.server.source.manager.findOneByOrFail(Peg, { id: water.peg.id });
    await setDetails({
      status: 'closed',
      statusReason: 'Platform broken',
      statusUntil: '2027-08-01',
      overheadLine: { ...details.overheadLine, kind: 'present', distanceM: 12, fishing: 'no_fishing' },
    });
    const words = wordsOf((await ask(`/p/${code}`)).text);
    const map = words.indexOf('In front of the peg');
    for (const caution of [
      'This peg is closed',
      'Platform broken. Until Sun 1 August 2027.',
      'Do not fish here.',
    ])
      expect(words.indexOf(caution)).toBeGreaterThan(0);
    expect(words.indexOf('Do not fish here.')).toBeLessThan(map);
    expect(words.indexOf('This peg is closed')).toBeLessThan(map);
    await setDetails(details);
  });

  test('says no more to staff than to anybody', async () => {
    await setAudiences({ depth: 'staff', bottom: 'members', spots: 'ticket', soundings: 'staff' });
    await setDetails({ notesMembers: 'gate code 4711', notesStaff: 'rota' });
    const stranger = await ask(`/p/${code}`);
    const { authorization } = { authorization: 'Bearer nonsense' };
    const withToken = await ask(`/p/${code}`).set({ authorization });
    expect(withToken.text).toBe(stranger.text);
    expect(stranger.text).not.toMatch(/4711|rota|shelf/);
    await setAudiences(OPEN);
  });
});

describe('a code that is no peg’s', () => {
  test.each(['333333', 'nosuch', '%3Cscript%3E', 'K7M3XO'])('%s is a page that helps', async (typed) => {
    const answer = await ask(`/p/${typed}`);
    expect(answer.status).toBe(404);
    expect(answer.headers['content-security-policy']).toContain("default-src 'none'");
    expect(wordsOf(answer.text)).toContain('No peg has this code');
    expect(answer.text).toContain('action="/p"');
    expect(answer.text).not.toContain('<script');
  });

  test('may be typed anew, and leads to its peg', async () => {
    expect((await ask('/p')).status).toBe(200);
    const found = await ask(`/p?code=${code.toLowerCase()}`);
    expect([found.status, found.headers['location']]).toEqual([303, `/p/${code}`]);
    expect((await ask('/p?code=far')).status).toBe(404);
  });

  test('a broken address is told as a page too', async () => {
    const answer = await ask('/p/%E0%A4%A');
    expect(answer.status).toBe(400);
    expect(answer.headers['content-type']).toContain('text/html');
    expect(wordsOf(answer.text)).toContain('This address can’t be read');
  });
});

describe('the light page and the peg’s own page say the same', () => {
  const audience = fc.constantFrom(...Audience.options);
  const audiences = fc.record({ depth: audience, bottom: audience, spots: audience, soundings: audience });
  const sticks = fc.constantFrom(3.6576, 3.048, 2);

  test('to a stranger, whatever the lake shows', async () => {
    await setAudiences(OPEN);
    const names = (await pegPage()).spots?.map(({ name }) => name) ?? [];
    expect(names).toHaveLength(2);
    await fc.assert(
      fc.asyncProperty(
        audiences,
        sticks,
        fc.constantFrom('m', 'ft'),
        async (shown, stickSpacingM, length) => {
          await setAudiences(shown);
          const page = await pegPage();
          const { text } = await ask(`/p/${code}?sticks=${stickSpacingM}&in=${length}`);
          const words = wordsOf(text);
          const units = { stickSpacingM, length } as const;
          const expected = [
            ...(page.spots ?? []).flatMap((spot) => spotSays(spot, page, units)),
            ...page.cautions,
            ...layerReasons(page.layerNotes),
            ...factsOf(page, units),
            page.emergencyWords,
            `Chart ${page.chart?.version}`,
          ];
          for (const each of expected) expect(words).toContain(said(each));
          if (page.spots === null) for (const name of names) expect(words).not.toContain(name);
          if (shown.depth !== 'public') {
            expect(words).not.toMatch(/\d (m|ft) deep|dry bank/);
            expect(figuresIn(text)).toEqual([]);
          } else expect(figuresIn(text).length).toBeGreaterThan(0);
          if (shown.bottom !== 'public') expect(words).not.toMatch(/Gravel|Firm silt|Clay|What suits/);
        },
      ),
      { numRuns: 25 },
    );
    await setAudiences(OPEN);
  }, 60_000);
});

type Units = { stickSpacingM: number; length: 'm' | 'ft' };

function spotSays(spot: SpotView, page: PegPageView, units: Units): string[] {
  const water = { levelM: page.levelNow?.levelM ?? null, datumM: page.chart?.datumM ?? 0 };
  const shown = spot.depthM === null ? null : depthShown(spot.depthM, water);
  return [
    spot.name,
    `${ownCountWords(spot, units)}, ${aimWords(spot)}`,
    ...(shown ? [`${depthNow(shown.depthM, units.length)} ${depthCaption(spot, shown.when, units)}`] : []),
    ...(spot.bottom ? [capital(BOTTOM_WORDS[spot.bottom])] : []),
    `${spot.words}.`,
    spot.note,
    ...(spot.presentation ? [spot.presentation, page.rigCaution] : []),
  ];
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

function factsOf(page: PegPageView, units: Units): string[] {
  const details = PegDetails.parse(page.details);
  const facts = [
    ...wayFacts(details),
    ...pegFacts(details, units),
    ...emergencyFacts(page, details.emergency),
  ];
  return [
    statusWords(details),
    ...details.hazards,
    ...facts.flatMap(({ term, fact }) => (fact === null || fact === '' ? [] : [`${term} ${fact}`])),
  ];
}

/** Figures of depth in the drawing: words that are nothing but a number and stand on an isobath. */
const figuresIn = (page: string): string[] =>
  [...page.matchAll(/<text[^>]*>([^<]*)<\/text>/g)]
    .map(([, words = '']) => words)
    .filter((words) => /^\d+\.\d+$/.test(words));
