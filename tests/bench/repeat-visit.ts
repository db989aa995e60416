import type { Browser, Page } from '@playwright/test';
import { benchLine } from './bench-line';
import { median } from './median';

const ROUNDS = 5;
const CPU_SLOWER = 4;
const PHONE = { width: 390, height: 844 };

/** When the peg's own heading stands on the screen, ms after the visit began. */
async function headingMs(page: Page, { pegUrl, heading }: Visit): Promise<number> {
  await page.goto(pegUrl, { waitUntil: 'commit' });
  await page.getByRole('heading', { level: 1, name: heading }).waitFor({ timeout: 60_000 });
  return page.evaluate(() => performance.now());
}

type Visit = { pegUrl: string; heading: string };

/** A peg page seen before, opened again with a signal and without, turn by turn on one slow phone. */
export async function repeatVisitLine(browser: Browser, visit: Visit): Promise<string> {
  const context = await browser.newContext({ viewport: PHONE });
  const page = await context.newPage();
  await page.goto(visit.pegUrl, { waitUntil: 'networkidle' });
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await page.goto(visit.pegUrl, { waitUntil: 'networkidle' });
  const devtools = await context.newCDPSession(page);
  await devtools.send('Emulation.setCPUThrottlingRate', { rate: CPU_SLOWER });
  const [signal, none]: [number[], number[]] = [[], []];
  for (let round = 0; round < ROUNDS; round += 1) {
    signal.push(await headingMs(page, visit));
    await context.setOffline(true);
    none.push(await headingMs(page, visit));
    await context.setOffline(false);
  }
  await context.close();
  return benchLine({
    name: 'client: a peg page seen before, opened with no signal, its heading, slow phone, ms',
    ours: median(none),
    other: { name: 'the same with a signal', figure: median(signal) },
    goal: '≤ 1.5',
  });
}
