import { PegPageView } from '@mereward/shared/charts/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { expectNoAxeFaults } from './support/axe';
import { test } from './support/people';
import { expect } from './support/site';

test.describe('with scripts switched off', () => {
  test.use({ javaScriptEnabled: false });

  test('a card’s code opens the peg, and its counts follow the angler’s own sticks', async ({ page }) => {
    const { fisheries } = FisheryList.parse(await (await page.request.get('/api/fisheries')).json());
    const lake = fisheries.flatMap(({ lakes }) => lakes).find(({ chart }) => chart !== null);
    const { pegs } = LakeView.parse(await (await page.request.get(`/api/lakes/${lake?.id}`)).json());
    const peg = pegs[0];
    const view = PegPageView.parse(await (await page.request.get(`/api/pegs/${peg?.id}/page`)).json());
    const code = view.shortUrl.slice(-6);

    await page.goto(`/p/${code.toLowerCase()}`);
    await expect(page.getByRole('heading', { level: 1 })).toContainText(`Peg ${view.number}`);
    await expect(page.getByRole('img', { name: /looking out from it/ })).toBeVisible();
    const counts = page.locator('ol .figure').first();
    await expect(counts).toContainText('of 12 ft');

    await page.getByLabel(/your own distance sticks/).fill('10 ft');
    await page.getByRole('button', { name: 'Count on these' }).click();
    await expect(counts).toContainText('of 10 ft');
    await page.getByRole('link', { name: 'Show it in feet' }).click();
    await expect(counts).toContainText('of 10 ft');
    await expect(page.locator('ol .figure').nth(1)).toContainText(/\sft\s+deep/);
  });

  test('a slip in the code is told, and it is typed again', async ({ page }) => {
    await page.goto('/p/nosuch');
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('No peg has this code');
    await expect(page.getByLabel('Code on the card')).toBeVisible();
  });
});

for (const colorScheme of ['light', 'dark'] as const)
  test(`axe finds no fault on it in the ${colorScheme}`, async ({ page }) => {
    await page.emulateMedia({ colorScheme });
    const { fisheries } = FisheryList.parse(await (await page.request.get('/api/fisheries')).json());
    const lake = fisheries.flatMap(({ lakes }) => lakes).find(({ chart }) => chart !== null);
    const { pegs } = LakeView.parse(await (await page.request.get(`/api/lakes/${lake?.id}`)).json());
    const answer = await page.request.get(`/api/pegs/${pegs[0]?.id}/page`);
    const { shortUrl } = PegPageView.parse(await answer.json());
    await page.goto(`/p/${shortUrl.slice(-6)}`);
    await expectNoAxeFaults(page);
    await page.goto('/p/nosuch');
    await expectNoAxeFaults(page);
  });
