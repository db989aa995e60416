import { expectNoAxeFaults } from './support/axe';
import { test } from './support/people';
import { expect } from './support/site';

test('the draft of Ostle Pool is looked over, approved by another, published and withdrawn', async ({
  pageOf,
}) => {
  test.setTimeout(150_000);
  const joan = await pageOf({ who: 'joan' });
  await joan.goto('/office/charts');
  await joan.getByRole('link', { name: /First look/ }).click();
  await expect(joan.getByRole('heading', { level: 1 })).toHaveText('First look');
  await expect(joan.getByRole('list', { name: 'Checks' }).getByText('passed')).toHaveCount(12);
  await expect(joan.getByText('Root mean square error')).toBeVisible();
  await expect(joan.getByText(/^0\.\d\d\sm$/).first()).toBeVisible();
  await joan.getByRole('button', { name: 'The ten soundings that fit worst' }).click();
  await expect(joan.getByRole('list', { name: 'Casts that fit worst' })).toContainText('than foretold');
  await expectNoAxeFaults(joan);
  await joan.getByRole('button', { name: 'Submit for approval' }).click();
  await expect(joan.getByText('waits for approval')).toBeVisible();
  await expect(joan.getByRole('button', { name: 'Approve and publish' })).toHaveCount(0);

  const stranger = await pageOf();
  await stranger.goto('/water');
  await stranger.getByRole('link', { name: /Ostle Pool/ }).click();
  await expect(stranger.getByRole('heading', { level: 1 })).toHaveText('Ostle Pool');
  const lakePath = new URL(stranger.url()).pathname;
  await expect(stranger.getByText('No chart of this lake is published yet')).toBeVisible();

  const idris = await pageOf({ who: 'idris' });
  await idris.goto('/office/charts');
  await idris.getByRole('link', { name: /First look/ }).click();
  await idris.getByRole('button', { name: 'Approve and publish' }).click();
  await expect(idris.getByRole('heading', { level: 1 })).toHaveText(/^\d{4}\.1, First look$/);
  await expect(idris.getByText('published', { exact: true })).toBeVisible();
  await expect(idris.getByText('Idris Penhale')).toBeVisible();
  await idris.getByRole('link', { name: 'Look at the chart' }).click();
  await expect(idris).toHaveURL(({ pathname }) => pathname.startsWith('/water/charts/'));
  const chartPath = new URL(idris.url()).pathname;
  await idris.goBack();

  const reader = await pageOf();
  await reader.goto('/water');
  await expect(reader.getByRole('link', { name: /Ostle Pool/ })).toContainText(/chart \d{4}\.1/);
  await reader.goto(lakePath);
  await expect(reader.getByRole('link', { name: 'The whole chart' })).toBeVisible();

  const withdraw = idris.getByRole('button', { name: 'Withdraw the chart' });
  await expect(withdraw).toBeDisabled();
  await idris.getByLabel('Why it is withdrawn').fill('The west shelf was dredged');
  await withdraw.click();
  await idris.getByRole('dialog').getByRole('button', { name: 'Withdraw the chart' }).click();
  await expect(idris.getByText('withdrawn', { exact: true })).toBeVisible();
  await expect(idris.getByRole('button', { name: 'Withdraw the chart' })).toHaveCount(0);

  const late = await pageOf();
  await late.goto(chartPath);
  await expect(late.getByText(/The west shelf was dredged/).first()).toBeVisible();
  await late.goto(lakePath);
  await expect(late.getByText('No chart of this lake is published yet')).toBeVisible();
});
