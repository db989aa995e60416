import { addDays } from '@mereward/shared/time/zoned';
import type { Page } from '@playwright/test';
import { expectNoAxeFaults } from './support/axe';
import { Asking, fillSignIn, test } from './support/people';
import { expect } from './support/site';
import { holdFor, pegAddress, sellTickets, type Sales } from './support/ticket-sales';

/** Reads the rules where the fishery has published some for the ticket. */
async function readRules(page: Page): Promise<void> {
  await expect(page.getByRole('heading', { name: 'Who comes' })).toBeVisible();
  const read = page.getByRole('button', { name: 'I have read the rules and will keep them' });
  if ((await read.count()) > 0) await read.click();
}

async function fillIn(page: Page, name: string): Promise<void> {
  const form = page.getByRole('form', { name: 'Your booking' });
  await form.getByLabel('Angler’s name').fill(name);
  const born = form.getByLabel('Date of birth');
  if ((await born.count()) > 0) await born.fill('1988-04-02');
  const ring = form.getByLabel(/^Whom to ring/);
  if ((await ring.count()) > 0) await ring.fill('Hal Marsh, 01632 960123');
  await form.getByLabel(/^Vehicle registration/).fill('none');
  const licence = form.getByRole('checkbox', { name: /There is a rod licence/ });
  if ((await licence.count()) > 0) await licence.check();
}

/** On the demo's page, which takes no real card. */
async function payWith(page: Page, card: string): Promise<void> {
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Pay £28.00');
  await page.getByRole('radio', { name: card }).check();
  await page.getByRole('button', { name: 'Pay £28.00' }).click();
}

let sales: Sales;
test.beforeEach(async ({ site }) => {
  sales ??= await sellTickets(site);
});

test('a stranger finds a peg, signs in on the way, is declined once, pays and has the ticket', async ({
  pageOf,
}) => {
  const page = await pageOf();
  await page.goto(pegAddress(sales, 'FO11').replace(/&peg=.*/, ''));
  await page.getByRole('button', { name: /^Peg FO11/ }).click();
  await page.getByRole('link', { name: 'Sign in to hold it' }).click();
  await fillSignIn(page, 'sofia');
  await page.getByRole('button', { name: 'Hold peg FO11' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Peg FO11, Far Ostle');
  await expect(page.getByRole('timer')).toHaveText(/^(10:00|9:\d\d)$/);
  await expect(page.getByRole('list', { name: 'Price' })).toContainText('£28.00');
  await readRules(page);
  await fillIn(page, 'Sofia Marsh');
  await page.reload();
  await expect(page.getByLabel('Angler’s name')).toHaveValue('Sofia Marsh');
  await expectNoAxeFaults(page);
  await page.getByRole('button', { name: 'Pay £28.00' }).click();

  await payWith(page, 'A card that is declined');
  await expect(page.getByRole('alert')).toBeVisible();
  await page.getByRole('link', { name: 'Back without paying' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'The peg is still held' })).toBeVisible();
  await page.getByRole('button', { name: 'Pay £28.00 again' }).click();
  await payWith(page, 'A card that is paid');

  await expect(page.getByText(/^[0-9A-Z]{3} [0-9A-Z]{3}$/)).toBeVisible({ timeout: 30_000 });
  await expect(page.getByRole('img', { name: /code for the bailiff/ })).toBeVisible();
  await expect(page.getByText('booked', { exact: true })).toBeVisible();
  await page.getByRole('button', { name: /^Receipt / }).click();
  await expect(page.getByText(/£4\.67 in £28\.00; net £23\.33/)).toBeVisible();
  await expectNoAxeFaults(page);
  await page.getByRole('button', { name: 'Cancel this ticket…' }).click();
  await expect(page.getByRole('dialog')).toContainText('£28.00 of £28.00 goes back');
});

test('whoever is a moment too late is told so, and offered pegs like it', async ({ pageOf, site }) => {
  const page = await pageOf({ who: 'sofia' });
  await page.route('**/board/events', (route) => route.abort()); // her phone has not heard of it yet
  await page.goto(pegAddress(sales, 'FO14'));
  await expect(page.getByRole('button', { name: 'Hold peg FO14' })).toBeVisible();
  await holdFor(await Asking.as('colin', site), sales, 'FO14');
  await page.getByRole('button', { name: 'Hold peg FO14' }).click();
  const sheet = page.getByRole('dialog');
  await expect(sheet.getByRole('status').filter({ hasText: /taken/ })).toBeVisible();
  const like = sheet.getByRole('list', { name: 'Free pegs most like it' });
  await expect(like.getByRole('listitem')).toHaveCount(3);
  await like.getByRole('button').first().click();
  await page.getByRole('button', { name: /^Hold peg FO/ }).click();
  await expect(page.getByRole('timer')).toBeVisible();
});

test('a mother books for her son: a junior’s ticket asks for his birth, a guardian and somebody to ring', async ({
  pageOf,
}) => {
  const page = await pageOf({ who: 'sofia' });
  const day = addDays(sales.day, 3); // on which she holds no peg elsewhere: a guardian stays beside the junior
  await page.goto(`/tickets?day=${day}&kind=${sales.kindIds.junior}&peg=${sales.pegIds.get('SC2') ?? ''}`);
  await expect(page.getByRole('list', { name: 'Price' })).toContainText('£6.00');
  await page.getByRole('button', { name: 'Hold peg SC2' }).click();
  await readRules(page);
  const form = page.getByRole('form', { name: 'Your booking' });
  await form.getByLabel('Junior’s name').fill('Kit Marsh');
  await form.getByRole('button', { name: 'Pay £6.00' }).click();
  await expect(form.getByText('Name who stays with the junior')).toBeVisible();
  await form.getByLabel('Date of birth').fill(`${String(Number(day.slice(0, 4)) - 12)}-01-01`);
  await form.getByLabel('Guardian’s name').fill('Sofia Marsh');
  await form.getByLabel(/^Guardian’s telephone/).fill('01632 960124');
  await form.getByLabel(/^Whom to ring/).fill('Sofia Marsh, 01632 960124');
  await form.getByRole('checkbox', { name: /I am the guardian/ }).check();
  await expect(form.getByRole('checkbox', { name: /There is a rod licence/ })).toHaveCount(0); // he is twelve
  await form.getByRole('button', { name: 'Pay £6.00' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Pay £6.00');
});
