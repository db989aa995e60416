import { LogList } from '@mereward/shared/surveys/log-contract';
import { aBoatTrack, nmeaLog } from '../support/sounding-log';
import { Asking, test } from './support/people';
import { expect } from './support/site';
import { anOpenVisit, aStoryWater } from './support/story-water';

const NOW = '2027-04-03T11:00:00Z';
test.use({ now: NOW });

test('a boat’s log is seen on the lake, taken in with progress, seen in the visit and made into a draft', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(150_000);
  const water = await aStoryWater(await Asking.as('marian', site));
  const joan = await Asking.as('joan', site);
  const visitId = await anOpenVisit(joan, water, { title: 'By boat' });
  const track = aBoatTrack({ linesM: 30 });
  const logText = `${nmeaLog(track)}noise on the wire\r\n`;
  const count = track.length.toLocaleString('en-GB');

  const page = await pageOf({ who: 'joan', now: NOW });
  await page.goto(`/bank/surveys/${visitId}`);
  await page.getByRole('link', { name: 'Bring in a log' }).click();
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: 'Choose files' }).click();
  await (await chooser).setFiles({ name: 'boat.log', mimeType: 'text/plain', buffer: Buffer.from(logText) });

  await expect(page.getByText(`${count} soundings can be taken in`)).toBeVisible({ timeout: 30_000 });
  await expect(page.getByLabel(/^Where the soundings fall on/)).toBeVisible();
  await expect(page.getByRole('list', { name: 'Faults' })).toContainText('noise on the wire');
  await page.reload(); // it can be left and come back to
  await page.getByLabel('Transducer below the surface, m').fill('0.2');
  const lookedAgain = page.waitForResponse((answer) => answer.url().endsWith('/look'));
  await page.getByRole('button', { name: 'Read it again' }).click();
  await lookedAgain;
  await expect(page.getByText(`${count} soundings can be taken in`)).toBeVisible({ timeout: 30_000 });
  await page.getByRole('button', { name: `Take in ${count} soundings` }).click();
  await expect(page.getByText(`${count} soundings taken in`)).toBeVisible({ timeout: 30_000 });
  const { logs } = await joan.get(`/visits/${visitId}/logs`, LogList);
  expect(logs).toMatchObject([{ state: 'done', kept: track.length, options: { transducerM: 0.2 } }]);

  await page.goto(`/bank/surveys/${visitId}`);
  await expect(page.getByRole('list', { name: 'Logs' })).toContainText(`${count} soundings`);

  await page.goto(`/office/charts/new?lakeId=${water.lakeId}`);
  await page.getByLabel('Title').fill('By boat');
  await page.getByRole('button', { name: 'Build the draft' }).click();
  await expect(page.getByText(`${count} found in boat.log`)).toBeVisible({ timeout: 90_000 });
});
