import type { Page } from '@playwright/test';
import { expectNoAxeFaults } from './support/axe';
import { mailedPath } from './support/mailed-path';
import { expect, test } from './support/site';

const PASSWORD = 'four words in a row';

async function signUp(page: Page, email: string): Promise<void> {
  await page.goto('/sign-up');
  await page.getByLabel('Name').fill('Nell Ashe');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Look in your mail');
}

async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.goto('/sign-in?next=/me');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.keyboard.press('Enter');
}

test('somebody signs up by mail, signs in, stays signed in over a reload and signs out everywhere', async ({
  page,
}, { project }) => {
  const email = `nell.${project.name}@example.org`;
  await signUp(page, email);

  await signIn(page, email, PASSWORD);
  await expect(page.getByRole('alert')).toContainText('not confirmed yet');

  await page.goto(await mailedPath(page, email, 'verify'));
  await expect(page.getByText('Your address is confirmed')).toBeVisible();
  await signIn(page, email, PASSWORD);
  await expect(page).toHaveURL(({ pathname }) => pathname === '/me');
  await expect(page.getByText(email)).toBeVisible();

  await page.reload();
  await expect(page.getByLabel('Name')).toHaveValue('Nell Ashe');
  await page.getByRole('radio', { name: 'Feet' }).check();
  await page.getByRole('button', { name: 'Keep my details' }).click();
  await expect(page.getByText('Your details are kept.')).toBeVisible();
  await expectNoAxeFaults(page);

  await page.getByRole('button', { name: 'Sign out everywhere' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(page.getByText('Nobody is signed in here')).toBeVisible();
  const kept = await page.evaluate(() => Object.keys(localStorage));
  expect(kept.filter((key) => key !== 'mereward.read' && key !== 'mereward.theme')).toEqual([]);
});

test('a forgotten password is replaced by a mailed link, and the old one opens nothing', async ({ page }, {
  project,
}) => {
  const email = `bran.${project.name}@example.org`;
  await signUp(page, email);
  await page.goto('/forgotten');
  await page.getByLabel('E-mail').fill(email);
  await page.keyboard.press('Enter');
  await expect(page.getByText('Look in your mail')).toBeVisible();

  await page.goto(await mailedPath(page, email, 'reset-password'));
  await page.getByRole('textbox', { name: 'New password' }).fill('another four words here');
  await page.keyboard.press('Enter');
  await expect(page.getByText('Your new password holds')).toBeVisible();

  await signIn(page, email, PASSWORD);
  await expect(page.getByRole('alert')).toContainText('don’t go together');
  await signIn(page, email, 'another four words here');
  await expect(page).toHaveURL(({ pathname }) => pathname === '/me');
});

test('what was typed outlives a reload, but a password is never kept', async ({ page }) => {
  await page.goto('/sign-up');
  await page.getByLabel('Name').fill('Half done');
  await page.getByLabel('E-mail').fill('half@example.org');
  await page.getByLabel('Password').fill(PASSWORD);
  await page.reload();
  await expect(page.getByText('What you typed earlier is here again.')).toBeVisible();
  await expect(page.getByLabel('Name')).toHaveValue('Half done');
  await expect(page.getByLabel('E-mail')).toHaveValue('half@example.org');
  await expect(page.getByLabel('Password')).toHaveValue('');
  const kept = await page.evaluate(() => JSON.stringify(localStorage));
  expect(kept).not.toContain(PASSWORD);
  await page.getByRole('button', { name: 'Start afresh' }).click();
  await expect(page.getByLabel('Name')).toHaveValue('');
});

test('a keyboard reaches the page past the places, and a wrong field takes the focus', async ({ page }) => {
  await page.goto('/sign-up');
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await page.keyboard.press('Tab');
  await expect(page.getByText('Skip to the page')).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('main')).toBeFocused();
  await page.getByLabel('Name').fill('Nell');
  await page.keyboard.press('Enter');
  await expect(page.getByLabel('E-mail')).toBeFocused();
  await expect(page.getByLabel('E-mail')).toHaveAccessibleDescription(/Fill this in/);
});

test('two windows opened at once stay signed in, and signing out in one signs out the other', async ({
  page,
  context,
}, { project }) => {
  const email = `twice.${project.name}@example.org`;
  await signUp(page, email);
  await page.goto(await mailedPath(page, email, 'verify'));
  await expect(page.getByText('Your address is confirmed')).toBeVisible();
  await signIn(page, email, PASSWORD);
  await expect(page).toHaveURL(({ pathname }) => pathname === '/me');

  const other = await context.newPage();
  let renewals = 0;
  for (const window of [page, other])
    window.on('request', (request) => (renewals += request.url().endsWith('/session/refresh') ? 1 : 0));
  await Promise.all([page.reload(), other.goto('/me')]);
  for (const window of [page, other]) await expect(window.getByLabel('Name')).toHaveValue('Nell Ashe');
  await expect.poll(() => renewals).toBe(2);

  await page.getByRole('button', { name: 'Sign out', exact: true }).click();
  await expect(page.getByText('Nobody is signed in here')).toBeVisible();
  await expect(other.getByText('Nobody is signed in here')).toBeVisible();
});

test('a sign-in leads on only to a page of this site', async ({ page }, { project }) => {
  const email = `outward.${project.name}@example.org`;
  await signUp(page, email);
  await page.goto(await mailedPath(page, email, 'verify'));
  await expect(page.getByText('Your address is confirmed')).toBeVisible();
  await page.goto('/sign-in?next=//elsewhere.example/me');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/^http:\/\/(127\.0\.0\.1|localhost):\d+\/water$/);
});

const PAGES = ['/sign-in', '/sign-up', '/forgotten', '/reset-password?token=x', '/me', '/nowhere'];

for (const theme of ['light', 'dark'] as const) {
  test.describe(`on ${theme} paper`, () => {
    test.use({ colorScheme: theme });
    test('the pages of accounts have no fault that axe finds', async ({ page }) => {
      for (const path of PAGES) {
        await page.goto(path);
        await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
        await expectNoAxeFaults(page);
      }
    });
  });
}
