import { readFile } from 'node:fs/promises';
import { deflateRawSync } from 'node:zlib';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import type { Page } from '@playwright/test';
import { castWithoutSignal, firstCast, sending, test, waitUntilKept } from './support/no-signal';
import { fillSignIn } from './support/people';
import { expect } from './support/site';
import { anOpenVisit } from './support/story-water';

test.use({ serviceWorkers: 'allow' });
test.describe.configure({ timeout: 150_000 });

const waiting = (page: Page) => page.getByRole('list', { name: 'Waiting to be sent' }).getByRole('listitem');

const inFile = (page: Page) => page.getByRole('list', { name: 'In the file' }).getByRole('listitem');

test('what waits on a phone without a signal is sent from another, arrives once, and a refused cast moves to another visit', async ({
  packed: page,
  joan,
  water,
  visitId,
  pageOf,
}) => {
  const castsOf = async (id: string) => (await joan.get(`/visits/${id}`, VisitWithCasts)).casts;
  await firstCast(page, visitId);
  await waitUntilKept(page, 'surveys', 'visit', visitId);
  await page.context().setOffline(true);
  await castWithoutSignal(page, ['14', '13']);
  await page.getByRole('link', { name: /Look/ }).click();
  await expect(waiting(page)).toHaveCount(2);
  const saving = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Save what waits as a file' }).click();
  const saved = await readFile(await (await saving).path());
  await page.getByRole('button', { name: 'Show it as a QR code' }).click();
  const code = page.getByRole('dialog', { name: 'Look at it with the other phone' });
  await expect(code.getByText(/^It is too much for one code: [\d,]+ letters/)).toBeVisible();
  await code.getByRole('button', { name: 'Close' }).click();

  const bringIn = async (other: Page, buffer: Buffer): Promise<void> => {
    const chooser = other.waitForEvent('filechooser');
    await other.getByRole('button', { name: 'Choose the file' }).click();
    await (await chooser).setFiles({ name: 'waiting.json', mimeType: 'application/json', buffer });
  };
  const toms = await pageOf({ who: 'tom' });
  await toms.goto('/waiting');
  await bringIn(toms, saved);
  await expect(toms.getByText('These are another person’s things')).toBeVisible();
  await expect(toms.getByRole('button', { name: 'Bring them in' })).toHaveCount(0);

  const looking = await pageOf();
  await looking.goto(`/waiting#in=${deflateRawSync(saved).toString('base64url')}`); // as a code's address
  await looking.getByRole('link', { name: 'Sign in and look' }).click();
  await fillSignIn(looking, 'joan');
  await expect(inFile(looking)).toHaveCount(2);
  expect(looking.url()).not.toContain('#');

  const other = await pageOf({ who: 'joan' });
  await other.goto('/waiting');
  await expect(other.getByText('Nothing waits')).toBeVisible();
  await bringIn(other, saved);
  await expect(inFile(other)).toHaveText([/^Cast 1.*14 wraps/, /^Cast 2.*13 wraps/]);
  await other.getByRole('button', { name: 'Bring them in' }).click();
  await expect(other.getByText('2 things brought in')).toBeVisible();
  await expect(other.getByText('Nothing waits')).toBeVisible();
  const sent = await castsOf(visitId);
  expect(sent.map(({ observation }) => observation.wrapsWhole)).toEqual([14, 13]);

  await page.context().setOffline(false);
  await expect(page.getByText('Nothing waits')).toBeVisible();
  expect((await castsOf(visitId)).map(({ id }) => id)).toEqual(sent.map(({ id }) => id));

  const endedAt = new Date().toISOString();
  const nextId = await anOpenVisit(joan, water, { startedAt: endedAt, title: 'Afternoon' });
  await page.context().setOffline(true);
  await page.goto(`/bank/surveys/${visitId}/cast`);
  await castWithoutSignal(page, ['12', '11'], 3);
  await joan.do('POST', `/visits/${visitId}/close`, { endedAt, gaugeEndM: 0.62 });
  await page.context().setOffline(false);
  await expect(sending(page)).toContainText('1 refused · 1 waiting');
  await page.getByRole('link', { name: /Look/ }).click();
  await expect(waiting(page).first()).toContainText('This visit is closed');
  await waiting(page).first().getByRole('button', { name: 'Move to another visit' }).click();
  const moving = page.getByRole('dialog', { name: 'Move “Cast 3” to another visit' });
  await expect(moving.getByRole('radio', { name: /^Afternoon/ })).toBeChecked();
  await expect(moving.getByText('Its kit may not be the same')).toHaveCount(0);
  await moving.getByRole('button', { name: 'Move it' }).click();
  await expect(page.getByText('Nothing waits')).toBeVisible();
  const moved = await castsOf(nextId);
  expect(moved.map(({ observation }) => observation.wrapsWhole)).toEqual([12, 11]);
  expect(await castsOf(visitId)).toHaveLength(2);
});
