import type { Page } from '@playwright/test';
import { axeFaults } from './support/axe';
import { type Somebody, test } from './support/people';
import { addressOf, demoIds, routes, type Ids } from './support/screens';
import { expect } from './support/site';

/** Who looks at which screens; `undefined` is a stranger. Each screen is in one place at least. */
const LOOKS: readonly { place: string; who: Somebody | undefined; sees: RegExp }[] = [
  { place: 'the water', who: undefined, sees: /^\/(water|tickets|emergency|choose|t\/)/ },
  {
    place: 'the doors',
    who: undefined,
    sees: /^\/(sign-in|sign-up|forgotten|reset-password|verify|invitation|me)$/,
  },
  { place: 'the bank', who: 'joan', sees: /^\/(bank|waiting)/ },
  { place: 'the office', who: 'idris', sees: /^\/office/ },
  {
    place: 'the tickets and the pegs they are written for',
    who: 'priya',
    sees: /^\/(tickets|t\/|me|office\/lakes\/\[lakeId\]\/pegs\/\[pegId\]|water\/pegs)/,
  },
];

let ids: Ids;
test.beforeAll(async ({ sites }, { project, file }) => {
  test.setTimeout(60_000);
  ids = await demoIds(
    await sites.siteFor({ name: `${project.name}-${file.split('/').at(-1) ?? ''}`, now: undefined }),
  );
});

/** Opens what is folded away, so that it is looked at too. */
async function unfold(page: Page): Promise<void> {
  const folded = page.getByRole('main').getByRole('button', { expanded: false });
  for (let left = await folded.count(); left > 0; left = Math.min(left - 1, await folded.count()))
    await folded.first().click();
  // A sticky head lies over whatever is scrolled under it, which is no fault of a target's size.
  await page.evaluate(() => {
    for (const element of document.querySelectorAll('*')) element.scrollTop = 0;
  });
}

test('every screen of the client is looked at by somebody', () => {
  const unseen = routes().filter((route) => !LOOKS.some(({ sees }) => sees.test(route)));
  expect(unseen).toEqual([]);
});

for (const { place, who, sees } of LOOKS)
  test(`${place} as ${who ?? 'a stranger'}: axe finds no fault by light or at dusk`, async ({ pageOf }) => {
    test.setTimeout(240_000);
    const page = await pageOf(who === undefined ? {} : { who });
    for (const route of routes().filter((each) => sees.test(each)))
      await test.step(route, async () => {
        await page.emulateMedia({ colorScheme: 'light' });
        await page.goto(addressOf(route, ids));
        await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
        await expect(page.getByRole('status').filter({ hasText: /…$/ })).toHaveCount(0);
        await expect(page.getByText('Something in this page failed')).toHaveCount(0);
        await unfold(page);
        expect.soft(await axeFaults(page), route).toEqual([]);
        await page.emulateMedia({ colorScheme: 'dark' });
        await expect(page.locator('html')).toHaveAttribute('data-theme', 'dusk');
        expect.soft(await axeFaults(page, 'colours'), `${route} at dusk`).toEqual([]);
      });
  });
