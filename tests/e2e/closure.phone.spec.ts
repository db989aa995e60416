import { BookingList, type BookingListItem } from '@mereward/shared/bookings/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import type { Page } from '@playwright/test';
import { z } from 'zod';
import { expectNoAxeFaults } from './support/axe';
import { Asking, test } from './support/people';
import { expect } from './support/site';

const Caught = z.object({ mails: z.array(z.object({ to: z.string(), text: z.string() })) });

/** The link of the newest letter that asks somebody to choose. */
async function choosePath(page: Page, email: string): Promise<string> {
  const find = async (): Promise<string> => {
    const { mails } = Caught.parse(await (await page.request.get('/demo/mail.json')).json());
    const found = mails
      .filter(({ to }) => to.includes(email))
      .map(({ text }) => /\/choose\/[\w-]+/.exec(text));
    return found.find((each) => each !== null)?.[0] ?? '';
  };
  await expect.poll(find, { timeout: 20_000 }).not.toBe('');
  return find();
}

const mine = async (asking: Asking): Promise<BookingListItem | undefined> => {
  const { bookings } = await asking.get('/bookings/mine', BookingList);
  return bookings.find(({ status }) => status === 'confirmed' || status === 'choosing');
};

test('Idris closes Far Ostle, Sofia settles her ticket from her letter without signing in', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(120_000);
  const sofiaAsks = await Asking.as('sofia', site);
  const { fisheries } = await sofiaAsks.get('/fisheries', FisheryList);
  const fisheryId = fisheries[0]?.id ?? '';
  expect((await mine(sofiaAsks))?.lakeName).toBe('Far Ostle');

  const idris = await pageOf({ who: 'idris' });
  await idris.goto(`/office/closures/new?fisheryId=${fisheryId}`);
  await idris.getByRole('checkbox', { name: 'Far Ostle' }).check();
  await idris.getByLabel('What visitors read').fill('The banks are under water. Keep off them.');
  await idris.getByRole('button', { name: 'See what it hits' }).click();
  await expect(idris.getByText(/^Hits \d+ bookings? worth £/).first()).toBeVisible();
  await expectNoAxeFaults(idris);
  await idris.getByRole('button', { name: 'Close it' }).click();
  await idris.getByRole('dialog').getByRole('button', { name: 'Close it' }).click();
  await expect(idris.getByRole('heading', { name: 'Far Ostle: flood' })).toBeVisible();
  await expectNoAxeFaults(idris);

  const stranger = await pageOf();
  await stranger.goto('/water');
  await expect(stranger.getByText('Closed. Far Ostle: flood').first()).toBeVisible();
  await expect(stranger.getByText('The banks are under water. Keep off them.').first()).toBeVisible();

  expect((await mine(sofiaAsks))?.status).toBe('choosing');
  await stranger.goto(await choosePath(stranger, 'sofia@ostlemere.example'));
  await expect(stranger.getByRole('heading', { level: 1 })).toHaveText('Your ticket and the closure');
  await expectNoAxeFaults(stranger);
  await stranger.getByRole('button', { name: /^(Take £|End the ticket)/ }).click();
  await stranger
    .getByRole('dialog')
    .getByRole('button', { name: /^(Take the money back|End the ticket)$/ })
    .click();
  await expect(stranger.getByText('You have chosen')).toBeVisible();
  await expect.poll(async () => (await mine(sofiaAsks))?.status).toBeUndefined();
});
