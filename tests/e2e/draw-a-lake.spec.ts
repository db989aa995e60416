import type { Locator, Page } from '@playwright/test';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { LakeView } from '@mereward/shared/lakes/contract';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { aPhoto } from '../support/pictures';
import { Asking, test } from './support/people';
import { expect } from './support/site';

const FILES = fileURLToPath(new URL('../reference/fixtures/09_formats/geojson', import.meta.url));

async function choose(page: Page, button: string, file: Parameters<Locator['setInputFiles']>[0]) {
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: button }).click();
  await (await chooser).setFiles(file);
}

type Place = readonly [across: number, down: number];

/** Taps the canvas at shares of its width and height. */
async function tap(page: Page, canvas: Locator, places: readonly Place[]): Promise<void> {
  await canvas.scrollIntoViewIfNeeded();
  const box = await canvas.boundingBox();
  if (!box) throw new Error('The canvas is not on the screen');
  const byTouch = await page.evaluate(() => navigator.maxTouchPoints > 0);
  for (const [across, down] of places) {
    const [x, y] = [box.x + across * box.width, box.y + down * box.height];
    if (byTouch) await page.touchscreen.tap(x, y);
    else await page.mouse.click(x, y);
  }
}

async function lakeAt(owner: Asking, page: Page): Promise<LakeView> {
  const id = /office\/lakes\/([0-9a-f-]{36})/.exec(page.url())?.[1] ?? '';
  return owner.get(`/lakes/${id}`, LakeView);
}

test('somebody with a water makes their fishery and is its owner at once', async ({ pageOf }) => {
  const page = await pageOf({ who: 'colin' });
  await page.goto('/me');
  await expect(page.getByRole('navigation').getByRole('link', { name: 'Office' })).toHaveCount(0);
  await page.goto('/me/fishery');
  await page.getByLabel('Name of the fishery').fill('Frayne’s Ponds');
  await page.getByRole('button', { name: 'Make the fishery' }).click();
  await expect(page.getByLabel('Latitude, longitude')).toBeFocused();
  await page.reload();
  await expect(page.getByLabel('Name of the fishery')).toHaveValue('Frayne’s Ponds');
  await page.getByLabel('Latitude, longitude').fill('53.6001, 1.6202');
  await page.getByRole('button', { name: 'Make the fishery' }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === '/office');
  await expect(page.getByRole('navigation').getByRole('link', { name: 'Office' })).toBeVisible();
  await page.goto('/office/lakes');
  await expect(page.getByText('Frayne’s Ponds').first()).toBeVisible();
  await expect(page.getByRole('link', { name: 'Draw a lake' })).toBeVisible();
});

test('a shore is read from a file: a fault is refused with its place, a wrong order is mended', async ({
  pageOf,
  site,
}) => {
  const page = await pageOf({ who: 'marian' });
  await page.goto('/office/lakes/new');
  await choose(page, 'Read it from a file', join(FILES, 'bowtie.geojson'));
  await expect(page.getByText('bowtie.geojson can’t be used as it is')).toBeVisible();
  await expect(page.getByRole('list', { name: 'Found in the file' })).toContainText(
    'crosses or touches itself',
  );
  await expect(page.getByText('Tap along the shore')).toBeVisible();

  await choose(page, 'Read it from a file', join(FILES, 'outer_cw.geojson'));
  await expect(page.getByText('outer_cw.geojson is read: 8 points')).toBeVisible();
  await expect(page.getByRole('list', { name: 'Found in the file' }).getByText('mended')).toHaveCount(2);
  await expect(page.getByRole('status').filter({ hasText: 'Water:' })).toContainText(/2\.9\sha/);

  await page.getByLabel('Name', { exact: true }).fill('Filed Water');
  await page.getByLabel('Chart datum, metres').fill('0.5');
  await page.getByRole('button', { name: 'Keep the lake' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Filed Water');
  const { areaM2, details } = await lakeAt(await Asking.as('marian', site), page);
  expect(Math.abs(areaM2 - 29105.7)).toBeLessThan(1);
  expect(details.outline.coordinates).toHaveLength(2);
});

test('an owner draws a lake by tapping and gives it a mark, a board, a reading and a peg with a photo', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(120_000);
  const marian = await Asking.as('marian', site);
  const page = await pageOf({ who: 'marian' });
  await page.goto('/office/lakes');
  await page.getByRole('link', { name: 'Draw a lake' }).click();
  const sheet = page.getByLabel('Outline of the lake, to draw on');
  await tap(page, sheet, [
    [0.15, 0.3],
    [0.4, 0.15],
    [0.75, 0.35],
  ]);
  await expect(page.getByText('3 points of the shore')).toBeVisible();
  await tap(page, sheet, [[0.2, 0.1]]);
  await expect(page.getByText(/crosses or touches itself/).first()).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(page.getByText(/crosses or touches itself/)).toHaveCount(0);
  await page.getByLabel('Name', { exact: true }).fill('Tapped Water');
  await page.reload();
  await expect(page.getByText('What you typed earlier is here again.')).toBeVisible();
  await expect(page.getByText('3 points of the shore')).toBeVisible();
  await expect(page.getByLabel('Name', { exact: true })).toHaveValue('Tapped Water');

  await page.getByRole('button', { name: 'Keep the lake' }).click();
  await expect(page.getByText('Close the shore first').first()).toBeVisible();
  await page.getByRole('button', { name: 'Close the ring' }).click();
  await expect(page.getByText('Drag a point to move it')).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await page.getByRole('button', { name: 'Close the ring' }).click();
  await expect(page.getByRole('status').filter({ hasText: 'Water:' })).not.toContainText('if it were closed');
  await page.getByLabel('Chart datum, metres').fill('0.62');
  await page.getByRole('button', { name: 'Keep the lake' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Tapped Water');
  const lake = await lakeAt(marian, page);
  expect(lake.details.outline.coordinates[0]).toHaveLength(4);
  const office = `/office/lakes/${lake.id}`;

  await page.getByRole('link', { name: 'Add a mark' }).click();
  await page.getByLabel('Code').fill('M1');
  await page.getByLabel('What it is').fill('red barn');
  await tap(
    page,
    page
      .getByRole('main')
      .getByLabel(/Tapped Water|M1/)
      .first(),
    [[0.3, 0.6]],
  );
  await expect(page.getByLabel('Latitude, longitude')).not.toHaveValue('');
  await page.getByRole('button', { name: 'Keep the mark' }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === office);
  await expect(page.getByText('red barn').first()).toBeVisible();

  await page.getByRole('link', { name: 'Add a board' }).click();
  await page.getByLabel('Code').fill('TW-G1');
  const [lon, lat] = lake.details.outline.coordinates[0]?.[0] ?? [0, 0];
  await page.getByLabel('Latitude, longitude').fill(`${String(lat)}, ${String(lon)}`);
  await page.getByRole('button', { name: 'Keep the board' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Gauge board TW-G1');
  await page.getByLabel('The board reads, metres').fill('0.58');
  await page.getByRole('button', { name: 'Keep the reading' }).click();
  await expect(page.getByText(/0\.58\sm is kept/)).toBeVisible();

  await page.goto(`${office}/pegs/new`);
  await page.getByLabel('Number').fill('TW1');
  const places = page.getByLabel('Tapped Water: the peg’s place and its water');
  await tap(page, places, [[0.35, 0.3]]);
  const edge = page.getByLabel('Water’s edge: latitude, longitude');
  await expect(edge).not.toHaveValue('');
  const { bearingDeg } = geodesicBetween([lon, lat], lake.origin);
  const at = `${String(lat)}, ${String(lon)}`;
  await edge.fill(at);
  await page.getByLabel('Origin mark: latitude, longitude').fill(at);
  await page.getByLabel('Left limit, degrees').fill(String(Math.round(bearingDeg + 330) % 360));
  await page.getByLabel('Right limit, degrees').fill(String(Math.round(bearingDeg + 30) % 360));
  await page.getByRole('button', { name: 'Keep the peg' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Peg TW1');
  const photo = { name: 'from-the-dot.jpg', mimeType: 'image/jpeg', buffer: await aPhoto() };
  await choose(page, 'Choose a photo', photo);
  await page.getByLabel('Caption').fill('From the dot towards M1');
  await page.getByRole('button', { name: 'Send the photo' }).click();
  await expect(page.getByRole('img', { name: 'From the dot towards M1' }).first()).toBeVisible({
    timeout: 30_000,
  });
  await choose(page, 'Choose a photo', { ...photo, buffer: Buffer.from('no picture at all') });
  await page.getByRole('button', { name: 'Send the photo' }).click();
  await expect(page.getByRole('form', { name: 'Add a photo' }).getByRole('alert')).toContainText(
    /picture|photo/i,
  );

  const stranger = await pageOf();
  const { fisheries } = await marian.get('/fisheries', FisheryList);
  const lakes = fisheries.flatMap((each) => each.lakes);
  expect(lakes.find(({ name }) => name === 'Tapped Water')).toMatchObject({ pegs: 1 });
  await stranger.goto(`/water/lakes/${lake.id}`);
  await expect(stranger.getByText('TW1').first()).toBeVisible();
  await expect(stranger.getByText(/TW-G1 reads 0\.58/)).toBeVisible();
});
