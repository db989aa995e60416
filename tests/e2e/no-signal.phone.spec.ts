import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { VisitList, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { typeCast } from './support/cast-form';
import {
  CAST,
  castWithoutSignal,
  deviceText,
  firstCast,
  packBeforeTheSignalGoes,
  sending,
  test,
  waitUntilKept,
} from './support/no-signal';
import { Asking, signIn } from './support/people';
import { expect } from './support/site';
import { anOpenVisit } from './support/story-water';

test.use({ serviceWorkers: 'allow' });
test.describe.configure({ timeout: 150_000 });

const WRAPS = ['14', '13', '12', '11', '10', '9'];

const visitOf = (joan: Asking, visitId: string) => joan.get(`/visits/${visitId}`, VisitWithCasts);

test('a whole survey is filled in with no signal, outlives a reload and a sign-out, and is sent once and in order', async ({
  packed: page,
  joan,
  water,
}) => {
  await page.context().setOffline(true);

  await page.goto(`/bank/surveys/new?lakeId=${water.lakeId}`);
  await page.getByLabel('Gauge board FO-G1 reads, m').fill('0.62');
  await page.getByLabel('Name of the visit').fill('Out of reach');
  await page.getByRole('radio', { name: /^lead to clip/ }).check();
  await page.getByRole('button', { name: 'Open the visit' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 1');
  const visitId = /surveys\/([^/]+)\/cast/.exec(page.url())?.[1] ?? '';
  await castWithoutSignal(page, WRAPS.slice(0, 3));
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 4');
  await castWithoutSignal(page, [...WRAPS.slice(3), '8'], 4);
  await page.getByRole('button', { name: 'Take back cast 7' }).click();
  await expect(page.getByText('Cast 7 is taken back.')).toBeVisible();
  await expect(sending(page)).toContainText('No signal · 7 waiting');

  await page.goto(`/bank/surveys/${visitId}`);
  await expect(page.getByRole('heading', { name: '6 casts' })).toBeVisible();
  await expect(page.getByText('waiting to be sent').first()).toBeVisible();
  const phone = page.viewportSize() ?? { width: 390, height: 844 };
  await page.setViewportSize({ width: 1280, height: 800 }); // a tablet on the bank, which never fetched a wide table
  await expect(page.getByText('waiting to be sent').first()).toBeVisible();
  await page.setViewportSize(phone);
  await page.getByRole('link', { name: 'Close the visit' }).click();
  await page.getByLabel('Gauge board FO-G1 reads now, m').fill('0.62');
  await page.getByRole('button', { name: 'Close the visit' }).click();
  await expect(page.getByText('closed', { exact: true })).toBeVisible();
  await page.reload();
  await expect(page.getByText('closed', { exact: true })).toBeVisible();
  await expect(sending(page)).toContainText('8 waiting');

  await page.goto('/me');
  await expect(page.getByText('8 things are not sent yet')).toBeVisible();
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await expect(page.getByText('Nobody is signed in here')).toBeVisible();
  expect(await deviceText(page)).not.toContain('Out of reach');
  await page.context().setOffline(false);
  const { visits: before } = await joan.get(`/lakes/${water.lakeId}/visits`, VisitList);
  expect(before).toEqual([]);

  await signIn(page, 'joan', '/bank');
  await expect(sending(page)).toContainText(/^All sent \d\d:\d\d/);
  const { visit, casts } = await visitOf(joan, visitId);
  expect(visit).toMatchObject({ title: 'Out of reach', status: 'closed', castCount: 6 });
  expect(casts.map(({ seq }) => seq)).toEqual([1, 2, 3, 4, 5, 6]);
  expect(casts.map(({ observation }) => String(observation.wrapsWhole))).toEqual(WRAPS);
});

test('what was sent but never answered is sent again and kept once', async ({ joan, pageOf, visitId }) => {
  const page = await pageOf({ who: 'joan' });
  await firstCast(page, visitId);
  let answers = 0;
  await page.route('**/api/visits/*/casts', async (route) => {
    const answer = await route.fetch();
    answers += 1;
    if (answers === 1) await route.abort('connectionreset');
    else await route.fulfill({ response: answer });
  });
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByText(/^Cast 1 is kept/)).toBeVisible();
  await expect(sending(page)).toContainText(/All sent/);
  expect(answers).toBe(2);
  expect((await visitOf(joan, visitId)).casts).toHaveLength(1);
});

test('the server goes away in the middle of a visit and comes back: nothing is lost and nothing is doubled', async ({
  packed: page,
  site,
  visitId,
}) => {
  await firstCast(page, visitId);
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByText('Cast 1 is kept.')).toBeVisible();
  await site.killServer();
  await castWithoutSignal(page, ['13', '12'], 2);
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 4');
  await expect(sending(page)).toContainText('No signal · 2 waiting');
  await site.startServer();
  await page.getByRole('link', { name: /Look/ }).click();
  await page.getByRole('button', { name: 'Send now' }).click();
  await expect(page.getByText('Nothing waits')).toBeVisible();
  const { casts } = await visitOf(await Asking.as('joan', site), visitId);
  expect(casts.map(({ observation }) => observation.wrapsWhole)).toEqual([14, 13, 12]);
  expect(casts.map(({ seq }) => seq)).toEqual([1, 2, 3]);
});

test('a second person at the phone sees how much of another waits, and nothing of it', async ({
  packed: page,
  joan,
  water,
}) => {
  const visitId = await anOpenVisit(joan, water, {
    startedAt: new Date().toISOString(),
    title: 'Joan’s own business',
  });
  await firstCast(page, visitId);
  await page.context().setOffline(true);
  await castWithoutSignal(page, ['14', '13']);
  await page.goto('/me');
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await expect(sending(page)).toContainText('2 things of another person wait on this phone');
  await page.context().setOffline(false);

  await signIn(page, 'tom', '/waiting');
  await expect(page.getByText('2 things of another person wait on this phone')).toBeVisible();
  await expect(page.getByRole('list', { name: 'Waiting to be sent' })).toHaveCount(0);
  const kept = await deviceText(page);
  expect(kept).not.toContain('Joan’s own business');
  expect(kept).not.toContain(visitId);
  await page.goto('/me');
  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  expect((await visitOf(joan, visitId)).casts).toEqual([]);

  await signIn(page, 'joan', '/bank');
  await expect(sending(page)).toContainText(/^All sent/);
  const { casts } = await visitOf(joan, visitId);
  expect(casts.map(({ observation }) => observation.wrapsWhole)).toEqual([14, 13]);
});

test('a refusal is kept with its words, holds its own visit only, and goes when it is taken away by hand', async ({
  packed: page,
  joan,
  water,
}) => {
  const startedAt = new Date().toISOString();
  const [closed, open] = [
    await anOpenVisit(joan, water, { startedAt, title: 'Closed meanwhile' }),
    await anOpenVisit(joan, water, { startedAt, title: 'Still open' }),
  ];
  for (const visitId of [closed, open]) {
    await firstCast(page, visitId);
    await waitUntilKept(page, 'surveys', 'visit', visitId);
  }
  const endedAt = new Date().toISOString();
  await joan.do('POST', `/visits/${closed}/close`, { endedAt, gaugeEndM: 0.62 });
  await page.context().setOffline(true);
  for (const visitId of [closed, open]) {
    await page.goto(`/bank/surveys/${visitId}/cast`);
    await castWithoutSignal(page, ['14', '12']);
  }
  await page.context().setOffline(false);
  await expect(sending(page)).toContainText('1 refused · 1 waiting');
  expect((await visitOf(joan, open)).casts).toHaveLength(2);
  expect((await visitOf(joan, closed)).casts).toEqual([]);

  await sending(page).getByRole('link').click();
  const waiting = page.getByRole('list', { name: 'Waiting to be sent' }).getByRole('listitem');
  await expect(waiting).toHaveCount(2);
  await expect(waiting.first()).toContainText('This visit is closed');
  await expect(waiting.first()).toContainText('Open another visit for it.');
  await expect(waiting.first()).toContainText('14 wraps');
  await expect(waiting.last()).toContainText('Stands behind “Cast 1”');
  for (const left of [1, 0]) {
    await expect(waiting.first()).toContainText('refused');
    await waiting.first().getByRole('button', { name: 'Take it away' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Take it away' }).click();
    await expect(waiting).toHaveCount(left);
  }
  await expect(page.getByText('Nothing waits')).toBeVisible();
});

test('what was refused for a fast clock is opened again as it was typed, put right, and sent', async ({
  joan,
  water,
  pageOf,
}) => {
  const page = await pageOf({ who: 'joan', now: new Date(Date.now() + 3_600_000).toISOString() });
  await packBeforeTheSignalGoes(page, water.lakeId);
  await page.context().setOffline(true);
  await page.goto(`/bank/levels/${water.lakeId}`);
  await page.getByLabel('Board FO-G1 reads, metres').fill('0.60');
  await page.getByRole('button', { name: 'Keep the reading' }).click();
  await expect(page.getByText('It waits to be sent.')).toBeVisible();
  await page.context().setOffline(false);
  await expect(sending(page)).toContainText('1 refused');
  await sending(page).getByRole('link').click();
  const refused = page.getByRole('list', { name: 'Waiting to be sent' }).getByRole('listitem');
  await expect(refused).toContainText('This reading lies in the future');
  await page.clock.setFixedTime(new Date());
  await refused.getByRole('link', { name: 'Open it again' }).click();
  await expect(page.getByLabel('Board FO-G1 reads, metres')).toHaveValue('0.60');
  await page.getByRole('button', { name: 'Keep the reading' }).click();
  await expect(page.getByText('Nothing waits')).toBeVisible();
  const { boards } = await joan.get(`/lakes/${water.lakeId}`, LakeView);
  expect(boards[0]?.readings.map(({ levelM }) => levelM)).toEqual([0.6]);
});

test('a phone that has no room left says so and keeps what is typed', async ({
  packed: page,
  joan,
  visitId,
}) => {
  await firstCast(page, visitId);
  await page.context().setOffline(true);
  await page.evaluate(() => {
    IDBObjectStore.prototype.put = () => {
      throw new DOMException('No room', 'QuotaExceededError');
    };
  });
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  const alert = page.getByRole('alert').filter({ hasText: 'Not kept: this phone has no room' });
  await expect(alert).toContainText('It stands in this form only.');
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('8');
  await page.context().setOffline(false);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByText('Cast 1 is kept.')).toBeVisible();
  expect((await visitOf(joan, visitId)).casts).toHaveLength(1);
});

test('a level is read with no signal, misread levels are taken back, and the rest is sent', async ({
  packed: page,
  joan,
  water,
}) => {
  await page.context().setOffline(true);
  await page.goto(`/bank/levels/${water.lakeId}`);
  const reading = page.getByLabel('Board FO-G1 reads, metres');
  for (const [reads, misread] of [
    ['6.2', true],
    ['0.60', false],
  ] as const) {
    await reading.fill(reads);
    await page.getByRole('button', { name: 'Keep the reading' }).click();
    await expect(page.getByText('It waits to be sent.')).toBeVisible();
    if (misread) await page.getByRole('button', { name: 'Misread: take it back' }).click();
    if (misread) await expect(page.getByText('It waits to be sent.')).toHaveCount(0);
  }
  await expect(sending(page)).toContainText(/^No signal · \d waiting/);
  await page.context().setOffline(false);
  await expect(sending(page)).toContainText(/^All sent/);
  const { boards } = await joan.get(`/lakes/${water.lakeId}`, LakeView);
  expect(boards[0]?.readings.map(({ levelM }) => levelM)).toEqual([0.6]);
});

test('what was opened once opens again with no signal: lake, peg, chart, bank and the emergency card', async ({
  joan,
  pageOf,
}) => {
  const { fisheries } = await joan.get('/fisheries', FisheryList);
  const far = fisheries[0]?.lakes.find(({ name }) => name === 'Far Ostle');
  const { pegs } = await joan.get(`/lakes/${far?.id ?? ''}`, LakeView);
  const pegId = pegs.find(({ number }) => number === 'FO7')?.id ?? '';
  const page = await pageOf({ who: 'joan' });
  const settled = async (): Promise<string> => {
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    await expect(page.getByRole('status').filter({ hasText: /…$/ })).toHaveCount(0);
    return page.getByRole('heading', { level: 1 }).innerText();
  };
  const [chartId, lakeId] = [far?.chart?.id ?? '', far?.id ?? ''];
  const titles = new Map<string, string>();
  for (const path of [
    `/water/lakes/${lakeId}`,
    `/water/charts/${chartId}`,
    `/water/pegs/${pegId}`,
    '/bank',
  ]) {
    await page.goto(path);
    titles.set(path, await settled());
  }
  await waitUntilKept(page, 'charts', 'one', chartId);
  await waitUntilKept(page, 'charts', 'peg', pegId);
  await waitUntilKept(page, 'surveys', 'pegs', lakeId);
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await page.context().setOffline(true);
  for (const [path, title] of titles) {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(title);
    await settled();
    await expect(page.getByText('Something in this page failed')).toHaveCount(0);
    await expect(page.getByRole('button', { name: 'Try again' })).toHaveCount(0);
  }
  await page.getByRole('link', { name: 'Emergency card' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Emergency card');
  await expect(page.getByRole('main')).toContainText('Ostlemere Waters');
  await expect(page.getByRole('main')).toContainText('reach or throw, don’t go in');
  await expect(page.getByRole('main')).toContainText('Nearest throw line');
  await expect(page.getByRole('button', { name: /^Duty phone/ })).toBeVisible();
});
