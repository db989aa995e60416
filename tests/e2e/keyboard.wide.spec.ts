import type { Locator, Page } from '@playwright/test';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { Asking } from './support/people';
import { expect, test } from './support/site';
import { anOpenVisit, aStoryWater } from './support/story-water';

const MOST_TABS = 120;

const isFocused = (wanted: Locator): Promise<boolean> =>
  wanted.first().evaluate((element) => element === document.activeElement);

/** Goes on with Tab until `wanted` has the focus, and sees that the focus shows. */
async function tabTo(page: Page, wanted: Locator): Promise<void> {
  await wanted.first().waitFor();
  for (let presses = 0; presses < MOST_TABS; presses++) {
    if (await isFocused(wanted)) {
      const outline = await wanted.first().evaluate((element) => {
        const seen = element.matches('.choice input') ? (element.parentElement ?? element) : element;
        return getComputedStyle(seen).outlineStyle;
      });
      expect(outline, 'the focus must show').not.toBe('none');
      return;
    }
    await page.keyboard.press('Tab');
  }
  throw new Error(`Tab never reached ${String(wanted)}`);
}

async function press(page: Page, wanted: Locator): Promise<void> {
  await tabTo(page, wanted);
  await page.keyboard.press('Enter');
}

async function type(page: Page, wanted: Locator, text: string): Promise<void> {
  await tabTo(page, wanted);
  await page.keyboard.press('ControlOrMeta+A');
  await page.keyboard.type(text);
}

/** Steps through a group of radio buttons with the arrows until the named one is chosen. */
async function choose(page: Page, group: string, name: string): Promise<void> {
  const cells = page.getByRole('group', { name: group }).getByRole('radio');
  const wanted = page.getByRole('group', { name: group }).getByRole('radio', { name, exact: true });
  await tabTo(page, cells);
  await page.keyboard.press('Space');
  for (let steps = await cells.count(); steps > 0 && !(await wanted.isChecked()); steps--)
    await page.keyboard.press('ArrowRight');
  await expect(wanted).toBeChecked();
}

test('a keyboard alone signs in, reads a chart and a peg, and keeps a cast', async ({ page, site }) => {
  test.setTimeout(120_000);
  const water = await aStoryWater(await Asking.as('marian', site), { name: 'Keyboard Water' });
  const joan = await Asking.as('joan', site);
  const visitId = await anOpenVisit(joan, water, {
    title: 'By keyboard',
    startedAt: new Date(Date.now() - 60_000).toISOString(),
  });
  const nav = page.getByRole('navigation', { name: 'Places' });
  const title = page.getByRole('heading', { level: 1 });

  await page.goto('/water');
  await press(page, nav.getByRole('link', { name: 'Me' }));
  await press(page, page.getByRole('main').getByRole('link', { name: 'Sign in' }));
  await type(page, page.getByLabel('E-mail'), 'joan@ostlemere.example');
  await type(page, page.getByLabel('Password'), 'heron by the sluice');
  await page.keyboard.press('Enter');
  await expect(nav.getByRole('link', { name: 'Bank' })).toBeVisible();

  await press(page, nav.getByRole('link', { name: 'Water' }));
  await press(page, page.getByRole('link', { name: /^Far Ostle/ }));
  await expect(title).toHaveText('Far Ostle');
  await expect(title).toBeFocused();
  await press(page, page.getByRole('link', { name: 'The whole chart' }));
  await expect(title).toContainText('Far Ostle, chart');
  const chart = page.getByRole('main').locator('[tabindex="0"][aria-label*="hart"]');
  await tabTo(page, chart);
  const before = await chart.first().screenshot();
  await page.keyboard.press('+');
  await page.keyboard.press('ArrowRight');
  await expect.poll(async () => (await chart.first().screenshot()).equals(before)).toBe(false);

  await press(page, page.getByRole('main').getByRole('link', { name: /Far Ostle/ }));
  await expect(title).toHaveText('Far Ostle');
  await press(
    page,
    page.getByRole('list', { name: 'Pegs in walking order' }).getByRole('button', { name: /^FO7/ }),
  );
  await press(page, page.getByRole('link', { name: 'Open Peg FO7, The Point' }));
  await expect(title).toHaveText('Peg FO7, The Point');
  await expect(title).toBeFocused();
  await expect(page.getByText(/wraps \(12 ft\): about/)).toBeVisible();

  await press(page, nav.getByRole('link', { name: 'Bank' }));
  await press(page, page.getByRole('main').getByRole('link', { name: /^By keyboard/ }));
  await press(page, page.getByRole('link', { name: 'Next cast' }));
  await expect(title).toHaveText('Cast 1');
  await type(page, page.getByLabel('Wraps of 12 ft', { exact: true }), '14');
  await type(page, page.getByLabel('left over', { exact: true }), '0');
  await choose(page, 'How it landed', 'sharp crack');
  await choose(page, 'How it drags', 'fine rattle');
  await press(page, page.getByRole('button', { name: /^What came back/ }));
  await tabTo(page, page.getByRole('checkbox', { name: 'nothing', exact: true }));
  await page.keyboard.press('Space');
  await type(page, page.getByLabel('Float, pulls of 1 ft'), '8');
  await press(page, page.getByRole('button', { name: 'Keep cast 1' }));
  await expect(page.getByText('Cast 1 is kept.')).toBeVisible();
  const { casts } = await joan.get(`/visits/${visitId}`, VisitWithCasts);
  expect(
    casts.map(({ observation }) => [observation.wrapsWhole, observation.pulls, observation.drag]),
  ).toEqual([[14, 8, 'fine_rattle']]);
});
