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

test('a cast sent without a signal stays typed, says what to do, and is kept once there is one', async ({
  pageOf,
  site,
}) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  const { joan, visitId } = await atTheFirstCast(page, site);
  await typeCast(page, CAST);
  await page.context().setOffline(true);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  const alert = page.getByRole('alert').filter({ hasText: 'No answer from the server' });
  await expect(alert).toContainText('What you typed is kept on this device; try again when there is');
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('8');
  await expect(page.getByRole('radio', { name: 'fine rattle' })).toBeChecked();
  await page.context().setOffline(false);
  await keepCast(page, 1);
  expect(await castsOf(joan, visitId)).toHaveLength(1);
});

test('a cast whose answer was lost is kept once: sent again, or found when the visit is read anew', async ({
  pageOf,
  site,
}) => {
  const page = await pageOf({ who: 'joan', now: NOW });
  const { joan, visitId } = await atTheFirstCast(page, site);
  let cut = false;
  await page.route('**/api/visits/**', async (route) => {
    if (cut && route.request().method() === 'GET') return route.abort('connectionreset');
    return route.fallback();
  });
  const loseOneAnswer = () =>
    page.route(
      '**/api/visits/*/casts',
      async (route) => {
        await route.fetch();
        await route.abort('connectionreset');
      },
      { times: 1 },
    );
  const noAnswer = page.getByRole('alert').filter({ hasText: 'No answer from the server' });

  cut = true;
  await loseOneAnswer();
  await typeCast(page, CAST);
  await page.getByRole('button', { name: 'Keep cast 1' }).click();
  await expect(noAnswer).toBeVisible();
  expect(await castsOf(joan, visitId)).toHaveLength(1);
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('8');
  cut = false;
  await keepCast(page, 1);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 2');
  expect(await castsOf(joan, visitId)).toHaveLength(1);

  await loseOneAnswer();
  await typeCast(page, { ...CAST, wraps: '12' });
  await page.getByRole('button', { name: 'Keep cast 2' }).click();
  await expect(page.getByText('Cast 2 is kept.')).toBeVisible();
  await expect(noAnswer).toHaveCount(0);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 3');
  await expect(page.getByLabel('Float, pulls of 1 ft')).toHaveValue('');
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
