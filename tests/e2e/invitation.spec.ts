import type { Page } from '@playwright/test';
import { SignedIn } from '@mereward/shared/accounts/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { expectNoAxeFaults } from './support/axe';
import { mailedPath } from './support/mailed-path';
import { expect, test } from './support/site';

/** The owner invites by the API, so that this journey is the guest's alone. */
async function invite(page: Page, email: string): Promise<void> {
  const owner = { email: 'marian@ostlemere.example', password: 'heron by the sluice' };
  const signedIn = SignedIn.parse(
    await (await page.request.post('/api/accounts/session', { data: owner })).json(),
  );
  const { fisheries } = FisheryList.parse(await (await page.request.get('/api/fisheries')).json());
  const answer = await page.request.post(`/api/fisheries/${fisheries[0]?.id ?? ''}/invitations`, {
    data: { email, role: 'bailiff' },
    headers: { Authorization: `Bearer ${signedIn.accessToken}` },
  });
  expect(answer.status()).toBeLessThan(300);
  await page.context().clearCookies();
}

test('a stranger takes an invitation up and finds the bank among the places', async ({ page }, {
  project,
}) => {
  const email = `wilf.${project.name}@example.org`;
  await invite(page, email);
  const invitation = await mailedPath(page, email, 'invitation');

  await page.goto(invitation);
  await expect(page.getByText(`invites ${email} as bailiff`)).toBeVisible();
  await expect(page.getByRole('navigation').getByRole('link', { name: 'Bank' })).toHaveCount(0);
  await expectNoAxeFaults(page);

  await page.getByRole('link', { name: 'Make an account' }).click();
  await expect(page.getByLabel('E-mail')).toHaveValue(email);
  await page.getByLabel('Name').fill('Wilf Tanner');
  await page.getByLabel('Password').fill('four words in a row');
  await page.keyboard.press('Enter');
  await expect(page.getByText('A mail is on its way')).toBeVisible();
  await page.goto(await mailedPath(page, email, 'verify'));
  await expect(page.getByText('Your address is confirmed')).toBeVisible();

  await page.goto(invitation);
  await page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill('four words in a row');
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: 'Take it up' }).click();
  await expect(page.getByText(/You are bailiff at/)).toBeVisible();
  await page.getByRole('navigation').getByRole('link', { name: 'Bank' }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === '/bank');
  await expect(page.getByRole('navigation').getByRole('link', { name: 'Office' })).toHaveCount(0);
});
