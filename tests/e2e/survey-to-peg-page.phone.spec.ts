import { randomUUID } from 'node:crypto';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { aFan } from '../support/long-water';
import { keepCast, typeCast } from './support/cast-form';
import { Asking, signIn, test } from './support/people';
import { expect } from './support/site';
import { aStoryWater, castMeanwhile, type StoryWater } from './support/story-water';

/**
 * A peg surveyed on a phone, its chart published by another, and read in July at another level. Expected figures are
 * worked by hand: 7.5 × 0.3048 + 0.25 = 2.536 m; 14 × 3.6576 = 51.206 m; 2.536 − 0.24 = 2.296 m; 25 m = 8 × 3.048 + 0.616.
 */
const SURVEY_DAY = '2027-04-03T08:30:00Z';
const JULY_DAY = '2027-07-17T09:00:00Z';
const DAY_AFTER = '2027-07-18T09:00:00Z';

test.use({ now: SURVEY_DAY });
test.describe.configure({ mode: 'serial', timeout: 120_000 });

let water: StoryWater;
let visitId: string;
let chartPath: string;
const fan = aFan().filter(
  ({ aim, wrapsWhole }) => !(aim?.by === 'mark' && aim.offsetDeg === 0 && wrapsWhole === 14),
);

test('Joan casts from FO7 on her phone and sees each call while she types it', async ({ pageOf, site }) => {
  water = await aStoryWater(await Asking.as('marian', site));
  const joanAsks = await Asking.as('joan', site);
  const page = await pageOf({ now: SURVEY_DAY });
  await signIn(page, 'joan', `/bank/surveys/new?lakeId=${water.lakeId}`);
  await page.getByLabel('Gauge board FO-G1 reads, m').fill('0.62');
  await page.getByLabel('Name of the visit').fill('Spring survey');
  await page.getByRole('radio', { name: 'lead', exact: true }).check();
  await page.getByRole('radio', { name: /^lead to clip/ }).check();
  await expect(page.getByRole('radio', { name: '12 ft', exact: true })).toBeChecked();
  await page.getByLabel('Last checked by tape on').fill('2027-04-03');
  await expect(page.getByLabel('Float and link above the ring, metres')).toHaveValue('0.25');
  await page.getByRole('button', { name: 'Open the visit' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 1');
  visitId = /surveys\/([^/]+)\/cast/.exec(page.url())?.[1] ?? '';

  await castMeanwhile(joanAsks, visitId, fan.slice(0, 16));
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 17');
  await expect(page.getByText('Take the marker out before you fish.')).toBeVisible();
  await expect(page.getByRole('button', { name: /^Aim, from peg FO7 pump-house chimney/ })).toBeVisible();
  const call = page.getByRole('status').filter({ hasText: 'grade' });
  await typeCast(page, {
    wraps: '14',
    landed: 'sharp crack',
    drags: 'fine rattle',
    draggedM: '0.8',
    back: 'nothing',
    pulls: '8',
  });
  await expect(page.getByText('51.2 m of line')).toBeVisible();
  await expect(call).toContainText(/Gravel \d+\s%/);
  await expect(call).toContainText('depth at datum 2.54 m');
  await expect(call).toContainText('grade A');
  await keepCast(page, 17);

  await castMeanwhile(joanAsks, visitId, fan.slice(16, 20));
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 22');
  await typeCast(page, {
    wraps: '17',
    landed: 'soft, slow',
    drags: 'stuck, then smooth',
    back: 'black silt',
    pulls: '10',
  });
  await expect(call).toContainText('Deep soft silt');
  await keepCast(page, 22);
  await typeCast(page, {
    wraps: '17',
    beside: '6',
    landed: 'sharp crack',
    drags: 'smooth skim',
    back: 'clay smear',
    pulls: '10',
  });
  await expect(call).toContainText('Clay');
  await keepCast(page, 23);

  await castMeanwhile(joanAsks, visitId, fan.slice(20, 26));
  await page.reload();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 30');
  await typeCast(page, {
    wraps: '11',
    beside: '-5',
    landed: 'sharp crack',
    drags: 'sticks, frees',
    back: 'nothing',
    pulls: '8',
  });
  await expect(call).toContainText(/grade [CD]/);
  await expect(call).toContainText('Cast again 1–2 m away');
  await keepCast(page, 30);

  await castMeanwhile(joanAsks, visitId, fan.slice(26));
  const { casts } = await joanAsks.get(`/visits/${visitId}`, VisitWithCasts);
  expect(casts.map(({ seq }) => seq)).toEqual(casts.map((_, i) => i + 1));
  const kept = [17, 22, 23, 30].map((seq) => casts[seq - 1]?.reduced);
  expect(kept.map((reduced) => reduced?.ok && reduced.sounding.bottom).slice(0, 3)).toEqual([
    'gravel',
    'silt_deep',
    'clay',
  ]);
});

test('Joan drafts the chart and watches it being built, and may not approve her own', async ({
  pageOf,
  site,
}) => {
  site.setNow('2027-04-03T10:40:00Z');
  const page = await pageOf({ who: 'joan', now: '2027-04-03T10:40:00Z' });
  await page.goto(`/bank/surveys/${visitId}`);
  await page.getByRole('link', { name: 'Close the visit' }).click();
  await page.getByLabel('Gauge board FO-G1 reads now, m').fill('0.62');
  await page.getByRole('button', { name: 'Close the visit' }).click();
  await expect(page.getByText('closed', { exact: true })).toBeVisible();
  await page.goto(`/office/charts/new?lakeId=${water.lakeId}`);
  await page.getByLabel('Title').fill('Spring survey of FO7');
  await expect(page.getByRole('checkbox', { name: /Spring survey/ })).toBeChecked();
  await page.getByRole('button', { name: 'Build the draft' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Spring survey of FO7');
  await expect(page.getByRole('progressbar')).toBeVisible();
  await expect(page.getByRole('button', { name: 'Submit for approval' })).toBeVisible({ timeout: 40_000 });
  await expect(page.getByRole('progressbar')).toHaveCount(0);
  chartPath = new URL(page.url()).pathname;
  await page.getByRole('button', { name: 'Submit for approval' }).click();
  await expect(page.getByText('waits for approval')).toBeVisible();
  await expect(page.getByText('Stands against publishing')).toHaveCount(0);
  await expect(page.getByText('Not yours to approve')).toBeVisible();
  await expect(page.getByText('The owner or a manager approves charts.')).toBeVisible();
  await expect(page.getByRole('button', { name: 'Approve and publish' })).toHaveCount(0);
});

test('Idris looks it over and approves it as 2027.1', async ({ pageOf, site }) => {
  const page = await pageOf({ who: 'idris', now: '2027-04-03T12:00:00Z' });
  await page.goto('/office/charts');
  await page.getByRole('link', { name: /Spring survey of FO7/ }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === chartPath);
  await expect(page.getByRole('list', { name: 'Checks' })).toContainText('passed');
  await page.getByRole('button', { name: 'Approve and publish' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('2027.1, Spring survey of FO7');
  await expect(page.getByText('published', { exact: true })).toBeVisible();

  const joanAsks = await Asking.as('joan', site);
  const { casts } = await joanAsks.get(`/visits/${visitId}`, VisitWithCasts);
  const reduced = casts[16]?.reduced;
  if (!reduced?.ok) throw new Error('Cast 17 was not reduced');
  await joanAsks.do('PUT', `/pegs/${water.pegId}/spots/${randomUUID()}`, {
    details: { name: 'The bar', position: reduced.sounding.position, usableRadiusM: 1, note: '' },
    version: null,
  });
});

const SENTENCE =
  '14 wraps (12 ft): about 2.3 m today (2.5 m at survey level 0.62), gravel, grade A, surveyed 3 Apr 2027, chart 2027.1';

test('Sofia, with a ticket, reads the spot at today’s level, and on her own sticks', async ({
  pageOf,
  site,
}) => {
  site.setNow('2027-07-17T06:00:00Z');
  await (
    await Asking.as('joan', site)
  ).do('POST', `/boards/${water.boardId}/readings`, {
    id: randomUUID(),
    at: '2027-07-17T06:00:00.000Z',
    levelM: 0.38,
    levelText: '0.38',
    note: '',
  });
  await (
    await Asking.as('priya', site)
  ).do('POST', `/pegs/${water.pegId}/bookings`, {
    id: randomUUID(),
    email: 'sofia@ostlemere.example',
    from: '2027-07-17T06:00:00.000Z',
    until: '2027-07-18T06:00:00.000Z',
  });
  site.setNow(JULY_DAY);
  const page = await pageOf({ who: 'sofia', now: JULY_DAY });
  await page.goto(`/water/pegs/${water.pegId}`);
  await expect(page.getByText(SENTENCE)).toBeVisible();

  await page.goto('/me');
  await page.getByRole('radio', { name: '10 ft' }).check();
  await page.getByRole('button', { name: 'Keep my details' }).click();
  await expect(page.getByText('Your details are kept.')).toBeVisible();
  await page.goto(`/water/pegs/${water.pegId}`);
  await page.getByLabel('A count or a length of line').fill('25 m');
  await expect(page.getByRole('status').filter({ hasText: 'On your sticks' })).toContainText(
    '10 ft apart: 8 + 0.62 m wraps',
  );

  site.setNow(DAY_AFTER);
  await page.clock.setFixedTime(DAY_AFTER);
  await page.reload();
  await expect(page.getByText(/ticket for this peg/).first()).toBeVisible();
  await expect(page.getByText(/grade A/)).toHaveCount(0);
  await expect(page.getByRole('radiogroup', { name: 'Spots from this peg' })).toHaveCount(0);
  await expect(page.getByText(SENTENCE)).toHaveCount(0);
});

test('a stranger reads the peg’s access and hazards, and why the bottom is not shown', async ({
  pageOf,
  site,
}) => {
  site.setNow(DAY_AFTER);
  const page = await pageOf({ now: DAY_AFTER });
  await page.goto(`/water/pegs/${water.pegId}`);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Peg FO7, The Point');
  await expect(page.getByText('deep margin')).toBeVisible();
  await expect(page.getByText('120 m', { exact: true })).toBeVisible();
  await expect(page.getByText(/ticket for this peg/).first()).toBeVisible();
});
