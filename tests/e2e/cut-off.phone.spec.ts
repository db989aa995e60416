import type { Page } from '@playwright/test';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { keepCast, typeCast } from './support/cast-form';
import { Asking, test } from './support/people';
import { expect, type Site } from './support/site';
import { anOpenVisit, aStoryWater, type StoryWater } from './support/story-water';

const NOW = '2027-04-03T08:30:00Z';
test.use({ now: NOW });

const CAST = {
  wraps: '14',
  landed: 'sharp crack',
  drags: 'fine rattle',
  back: 'nothing',
  pulls: '8',
};

async function atTheFirstCast(page: Page, site: Site): Promise<{ joan: Asking; visitId: string }> {
  const water: StoryWater = await aStoryWater(await Asking.as('marian', site));
  const joan = await Asking.as('joan', site);
  const visitId = await anOpenVisit(joan, water);
  await page.goto(`/bank/surveys/${visitId}/cast`);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 1');
  return { joan, visitId };
}

const castsOf = async (joan: Asking, visitId: string) =>
  (await joan.get(`/visits/${visitId}`, VisitWithCasts)).casts;

test('a cast kept while the server gives no answer waits on the phone, and is sent once it does', async ({
  pageOf,
  site,
}) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  const { joan, visitId } = await atTheFirstCast(page, site);
  await page.route('**/api/visits/**', (route) => route.abort('connectionreset'));
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByText('Cast 1 is kept on this phone and waits to be sent.')).toBeVisible();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 2');
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('');
  await expect(page.getByRole('region', { name: 'Sending' })).toContainText('No signal · 1 waiting');
  expect(await castsOf(joan, visitId)).toHaveLength(0);
  await page.unroute('**/api/visits/**');
  await expect(page.getByRole('region', { name: 'Sending' })).toContainText('All sent');
  expect(await castsOf(joan, visitId)).toHaveLength(1);
});

test('a refused cast stays typed, with what to do about it', async ({ pageOf, site }) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  const { joan, visitId } = await atTheFirstCast(page, site);
  await typeCast(page, CAST);
  await joan.do('POST', `/visits/${visitId}/close`, { endedAt: '2027-04-03T08:10:00.000Z', gaugeEndM: 0.62 });
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'This visit is closed' })).toBeVisible();
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('8');
  await expect(page.getByRole('region', { name: 'Sending' })).toContainText('Nothing waits to be sent');
});

test('a cast whose answer was lost is sent again by itself and kept once', async ({ pageOf, site }) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  const { joan, visitId } = await atTheFirstCast(page, site);
  await page.route(
    '**/api/visits/*/casts',
    async (route) => {
      await route.fetch();
      await route.abort('connectionreset');
    },
    { times: 1 },
  );
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(page.getByText(/^Cast 1 is kept/)).toBeVisible();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 2');
  expect(await castsOf(joan, visitId)).toHaveLength(1);
  await expect(page.getByRole('region', { name: 'Sending' })).toContainText('All sent');
  await typeCast(page, { ...CAST, wraps: '12' });
  await keepCast(page, 2);
  expect(await castsOf(joan, visitId)).toHaveLength(2);
});

test('a half-typed cast is there again after a reload', async ({ pageOf, site }) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  await atTheFirstCast(page, site);
  await typeCast(page, { ...CAST, wraps: '13' });
  await page.reload();
  await expect(page.getByLabel('Wraps of 12 ft', { exact: true })).toHaveValue('13');
  await expect(page.getByRole('radio', { name: 'sharp crack' })).toBeChecked();
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('8');
});

test('a form sent without a signal keeps every word, over a reload too', async ({ pageOf, site }) => {
  const water = await aStoryWater(await Asking.as('marian', site));
  const page = await pageOf({ who: 'marian', now: NOW });
  await page.goto(`/office/lakes/${water.lakeId}/details`);
  await page.getByLabel('Name', { exact: true }).fill('Wordy Water');
  await page.getByRole('button', { name: 'Surroundings and emergency' }).click();
  const wayIn = page.getByLabel('Way in for an ambulance, and boat slip');
  await wayIn.fill('By the lower gate, over the weir');
  await page.context().setOffline(true);
  await page.getByRole('button', { name: 'Keep the details' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'No answer from the server' })).toBeVisible();
  await expect(wayIn).toHaveValue('By the lower gate, over the weir');
  await page.context().setOffline(false);
  await page.reload();
  await expect(page.getByText('What you typed earlier is here again.')).toBeVisible();
  await expect(page.getByLabel('Name', { exact: true })).toHaveValue('Wordy Water');
  await page.getByRole('button', { name: 'Keep the details' }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === `/office/lakes/${water.lakeId}`);
  await page.goto(`/office/lakes/${water.lakeId}/details`);
  await expect(page.getByLabel('Name', { exact: true })).toHaveValue('Wordy Water');
});

test('a screen opens though a script that it shares with others comes late', async ({ pageOf }) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  await page.route('**/__part-*', async (route) => {
    await new Promise((later) => setTimeout(later, 1000));
    await route.fallback();
  });
  await page.goto('/bank');
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Bank');
  await expect(page.getByRole('link', { name: 'Open a visit' }).first()).toBeVisible();
});
