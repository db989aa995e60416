import { chromium, type Browser, type CDPSession, type Page } from '@playwright/test';
import { PegPageView } from '@mereward/shared/charts/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { webFolder } from '../../scripts/lib/build.mjs';
import { findChromium } from '../../scripts/lib/chromium.mjs';
import { benchLine } from './bench-line';
import { openHelloPage } from './hello-page';
import { lightLines } from './light-page';
import { median } from './median';
import { repeatVisitLine } from './repeat-visit';

const ROUNDS = 5;
/** A blank application of this stack with split routes, brotli, measured once; and its goal's multiple. */
const BLANK_BYTES = 246_000;
const PHONE = { width: 390, height: 844 };
const CPU_SLOWER = 4;
/** Slow 4G: 1.6 Mbit/s down, 0.75 up, 150 ms there and back. */
const SLOW_4G = { offline: false, latency: 150, downloadThroughput: 200_000, uploadThroughput: 93_750 };
const ARGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

type Opened = { page: Page; devtools: CDPSession; close: () => Promise<void> };

/** A phone that was never here: nothing is in its store. */
async function phone(browser: Browser): Promise<Opened> {
  const context = await browser.newContext({ viewport: PHONE });
  const page = await context.newPage();
  const devtools = await context.newCDPSession(page);
  await devtools.send('Network.enable');
  return { page, devtools, close: () => context.close() };
}

const slowed = async ({ devtools }: Opened): Promise<void> => {
  await devtools.send('Emulation.setCPUThrottlingRate', { rate: CPU_SLOWER });
  await devtools.send('Network.emulateNetworkConditions', SLOW_4G);
};

type Bytes = { program: number; answers: number };

/** What a first visit brings over the wire: scripts, styles and faces, and beside them the API's answers. */
async function firstVisit(browser: Browser, url: string): Promise<Bytes> {
  const opened = await phone(browser);
  const kinds = new Map<string, string>();
  const bytes: Bytes = { program: 0, answers: 0 };
  opened.devtools.on('Network.responseReceived', ({ requestId, type, response }) =>
    kinds.set(requestId, response.url.includes('/api/') ? (type === 'Image' ? 'photo' : 'api') : type),
  );
  opened.devtools.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    const kind = kinds.get(requestId) ?? '';
    if (kind === 'api') bytes.answers += encodedDataLength;
    if (['Script', 'Stylesheet', 'Font'].includes(kind)) bytes.program += encodedDataLength;
  });
  await opened.page.goto(url, { waitUntil: 'networkidle' });
  await opened.close();
  return bytes;
}

/** When the first words or picture stood on the screen of a slow phone, and when its heading did; ms. */
async function painted(browser: Browser, url: string, heading: string | null) {
  const opened = await phone(browser);
  await slowed(opened);
  await opened.page.goto(url, { waitUntil: 'commit' });
  const firstMs = await opened.page.evaluate(
    () =>
      new Promise<number>((found) => {
        new PerformanceObserver((list) => {
          const paint = list.getEntriesByName('first-contentful-paint')[0];
          if (paint) found(paint.startTime);
        }).observe({ type: 'paint', buffered: true });
      }),
  );
  if (heading !== null)
    await opened.page.getByRole('heading', { level: 1, name: heading }).waitFor({ timeout: 60_000 });
  const headingMs = await opened.page.evaluate(() => performance.now());
  await opened.close();
  return { firstMs, headingMs };
}

// Text, not a function: what runs here gives functions names by a helper the page doesn't have.
const COUNT_FRAMES = `new Promise((counted) => {
  const started = performance.now();
  let frames = 0;
  requestAnimationFrame(function next() {
    const passedMs = performance.now() - started;
    if (passedMs >= 1500) return counted((frames * 1000) / passedMs);
    frames += 1;
    requestAnimationFrame(next);
  });
})`;

/** Frames a second while a finger drags over the middle of the page, on a slow phone. */
async function dragged({ page }: Opened, selector: string): Promise<number> {
  const box = await page.locator(selector).first().boundingBox();
  if (!box) throw new Error(`There is no ${selector} to drag`);
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  const counting = page.evaluate<number>(COUNT_FRAMES);
  let dragging = true;
  void counting.finally(() => (dragging = false));
  for (let step = 0; dragging; step += 1)
    await page.mouse.move(x + 60 * Math.sin(step / 8), y + 40 * Math.cos(step / 8));
  await page.mouse.up();
  return counting;
}

async function ofTheDemo<T>(url: string, schema: { parse: (answer: unknown) => T }): Promise<T> {
  const answer = await fetch(url);
  if (!answer.ok) throw new Error(`${url} was answered ${answer.status}`);
  return schema.parse(await answer.json());
}

/** A peg with a published chart before it, out of the demo. */
async function pegOf(site: string): Promise<{ page: PegPageView; chartId: string }> {
  const { fisheries } = await ofTheDemo(`${site}/api/fisheries`, FisheryList);
  const charted = fisheries.flatMap(({ lakes }) => lakes).find(({ chart }) => chart !== null);
  if (!charted?.chart) throw new Error('The program shows no charted lake: start it with its demo');
  const { pegs } = await ofTheDemo(`${site}/api/lakes/${charted.id}`, LakeView);
  const pages = await Promise.all(
    pegs.map(({ id }) => ofTheDemo(`${site}/api/pegs/${id}/page`, PegPageView)),
  );
  const page = pages.sort((one, other) => (other.spots?.length ?? 0) - (one.spots?.length ?? 0))[0];
  if (!page) throw new Error('The charted lake has no peg');
  return { page, chartId: charted.chart.id };
}

/** The heaviest script that is not loaded by every screen, gzip. */
function largestScript(): { name: string; bytes: number } | null {
  const folder = join(webFolder, '_expo', 'static', 'js', 'web');
  if (!existsSync(folder)) return null;
  const weighed = readdirSync(folder)
    .filter((name) => name.endsWith('.js') && !/^(entry|__common|__expo)-/.test(name))
    .map((name) => ({ name, bytes: gzipSync(readFileSync(join(folder, name)), { level: 9 }).length }));
  return weighed.sort((one, other) => other.bytes - one.bytes)[0] ?? null;
}

/** The client's lines, measured in a browser on a program that runs with its demo at `site`. */
export async function benchClient(site: string): Promise<string[]> {
  const executablePath = findChromium();
  if (!executablePath) return ['client: not run: no Chromium on this machine'];
  const { page, chartId } = await pegOf(site);
  const pegUrl = `${site}/water/pegs/${page.id}`;
  const browser = await chromium.launch({ executablePath, args: ARGS });
  const hello = await openHelloPage();
  try {
    return [
      ...(await weightLines(browser, pegUrl)),
      ...(await paintLines(browser, { pegUrl, helloUrl: hello.url, heading: `Peg ${page.number}` })),
      ...(await lightLines(browser, firstPaint, {
        lightUrl: `${site}/p/${page.shortUrl.slice(-6)}`,
        staticUrl: `${hello.url}static`,
      })),
      await repeatVisitLine(browser, { pegUrl, heading: `Peg ${page.number}` }),
      await dragLine(browser, `${site}/water/charts/${chartId}`, hello.url),
    ];
  } finally {
    hello.stop();
    await browser.close();
  }
}

async function weightLines(browser: Browser, pegUrl: string): Promise<string[]> {
  const { program, answers } = await firstVisit(browser, pegUrl);
  const largest = largestScript();
  return [
    benchLine({
      name: 'client: first visit to a peg page, bytes of scripts, styles and faces',
      ours: program,
      other: { name: 'blank split application', figure: BLANK_BYTES },
      goal: '≤ 1.5',
    }),
    benchLine({
      name: 'client: a peg page’s answers without photos, bytes',
      ours: answers,
      other: { name: 'allowed', figure: 60_000 },
      goal: '≤ 1',
    }),
    largest === null
      ? 'client: largest script of a screen: not run: the client is not built here'
      : benchLine({
          name: `client: largest script not loaded by every screen (${largest.name.replace(/-[0-9a-f]{32}/, '')}), gzip bytes`,
          ours: largest.bytes,
          other: { name: 'allowed', figure: 80_000 },
          goal: '≤ 1',
        }),
  ];
}

const firstPaint = async (browser: Browser, url: string): Promise<number> =>
  (await painted(browser, url, null)).firstMs;

type Painting = { pegUrl: string; helloUrl: string; heading: string };

async function paintLines(browser: Browser, { pegUrl, helloUrl, heading }: Painting): Promise<string[]> {
  const first: number[] = [];
  const headings: number[] = [];
  const hellos: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    const ours = await painted(browser, pegUrl, heading);
    first.push(ours.firstMs);
    headings.push(ours.headingMs);
    hellos.push((await painted(browser, helloUrl, null)).firstMs);
  }
  const other = { name: 'react-native-web hello', figure: median(hellos) };
  return [
    benchLine({
      name: 'client: first paint of a peg page, slow phone on slow 4G, ms',
      ours: median(first),
      other,
      goal: '≤ 1.7',
    }),
    benchLine({
      name: 'client: the peg’s own heading, same visits, ms',
      ours: median(headings),
      other,
      goal: 'none set',
    }),
  ];
}

async function dragLine(browser: Browser, chartUrl: string, helloUrl: string): Promise<string> {
  const chart = await phone(browser);
  const bare = await phone(browser);
  await chart.page.goto(chartUrl, { waitUntil: 'networkidle' });
  await chart.page.locator('.map').first().waitFor();
  await bare.page.goto(helloUrl);
  for (const { devtools } of [chart, bare])
    await devtools.send('Emulation.setCPUThrottlingRate', { rate: CPU_SLOWER });
  const ours: number[] = [];
  const others: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    await chart.page.bringToFront();
    ours.push(await dragged(chart, '.map'));
    await bare.page.bringToFront();
    others.push(await dragged(bare, 'body'));
  }
  await chart.close();
  await bare.close();
  return benchLine({
    name: 'client: frames a second while a chart is dragged, slow phone',
    ours: median(ours),
    other: { name: 'the hello dragged', figure: median(others) },
    goal: '≥ 50 a second',
  });
}
