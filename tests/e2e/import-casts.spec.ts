import type { Page } from '@playwright/test';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { readFile } from 'node:fs/promises';
import { Asking, test } from './support/people';
import { expect } from './support/site';
import { anOpenVisit, aStoryWater } from './support/story-water';

const NOW = '2027-04-03T08:30:00Z';
test.use({ now: NOW });

const HEADING = 'peg,mark,turns of line,wraps_remainder_mm,drop,drag,returned,pulls';
const GOOD = ['FO7,M3,10,0,sharp_crack,fine_rattle,none,7', 'FO7,M3,14,0,sharp_crack,fine_rattle,none,8'];
const WRONG = 'FO99,M3,many,0,sharp_crack,fine_rattle,none,8';

async function choose(page: Page, button: string, name: string, rows: readonly string[]): Promise<void> {
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: button, exact: true }).click();
  const buffer = Buffer.from([HEADING, ...rows].join('\r\n'));
  await (await chooser).setFiles({ name, mimeType: 'text/csv', buffer });
}

test('casts come in from a table: columns mapped, faults named and taken away, whole or not at all, and once', async ({
  pageOf,
  site,
}) => {
  const water = await aStoryWater(await Asking.as('marian', site));
  const joan = await Asking.as('joan', site);
  const visitId = await anOpenVisit(joan, water);
  const casts = async () => (await joan.get(`/visits/${visitId}`, VisitWithCasts)).casts;
  const page = await pageOf({ who: 'joan', now: NOW });
  await page.goto(`/bank/surveys/${visitId}`);
  await page.getByRole('link', { name: 'Bring casts from a file' }).click();
  const wraps = page.getByRole('combobox', { name: 'Whole wraps' });

  await choose(page, 'Choose a file', 'notebook.csv', [...GOOD, WRONG]);
  await expect(page.getByText(/so nothing can be taken/)).toBeVisible();
  await expect(wraps).toHaveValue('none');
  await wraps.selectOption('turns of line');
  const faults = page.getByRole('list', { name: 'Faults' });
  await expect(faults).toContainText('FO99');
  await expect(faults).toContainText('“many”');
  await expect(faults).toContainText('Row 4');
  await expect(page.getByRole('button', { name: /^Bring in/ })).toHaveCount(0);
  const saving = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Faults as CSV' }).click();
  const saved = await readFile(await (await saving).path(), 'utf8');
  expect(saved).toMatch(/^\W*row,column,value/);
  expect(saved).toContain('many');
  expect(await casts()).toHaveLength(0);

  await choose(page, 'Another file', 'notebook.csv', GOOD);
  await wraps.selectOption('turns of line');
  await expect(page.getByText(/2 rows, every one can be read/)).toBeVisible();
  const read = page.getByRole('list', { name: 'Rows' });
  await expect(read).toContainText('peg FO7, over pump-house chimney, 14 wraps');
  await expect(read).toContainText('8 pulls');
  await page.getByRole('button', { name: 'Bring in 2 casts' }).click();
  await expect(page.getByText('2 casts were added and reduced')).toBeVisible();
  expect((await casts()).map(({ reduced }) => reduced.ok)).toEqual([true, true]);

  await choose(page, 'Another file', 'the same again.csv', GOOD);
  await wraps.selectOption('turns of line');
  await expect(page.getByText('the same again.csv is in this visit already')).toBeVisible();
  await expect(page.getByRole('button', { name: /^Bring in/ })).toHaveCount(0);
  expect(await casts()).toHaveLength(2);
});
