import type { Locator, Page } from '@playwright/test';
import { fromPlane, toPlane } from '@mereward/shared/geometry/plane';
import type { Point } from '@mereward/shared/geometry/point';
import { insideRing, ringLengthM, signedAreaM2 } from '@mereward/shared/geometry/polygon';
import { LakeView } from '@mereward/shared/lakes/contract';
import { LakePictureList } from '@mereward/shared/lakes/picture-contract';
import { Jimp } from 'jimp';
import { WATER_CENTRE } from '../support/water-details';
import { Asking, test } from './support/people';
import { expect } from './support/site';
import { aStoryWater } from './support/story-water';

/** The picture: 1600 × 1000 px, a quarter of a metre a pixel, turned by 12°, its middle 5 m east and 10 m north. */
const SIZE = { widthPx: 1600, heightPx: 1000 };
const M_PER_PX = 0.25;
const TURN = (12 * Math.PI) / 180;
const MIDDLE: Point = { xM: 5, yM: 10 };

function toPixel({ xM, yM }: Point): [number, number] {
  const [east, north] = [(xM - MIDDLE.xM) / M_PER_PX, (yM - MIDDLE.yM) / M_PER_PX];
  const right = east * Math.cos(TURN) + north * Math.sin(TURN);
  const up = north * Math.cos(TURN) - east * Math.sin(TURN);
  return [SIZE.widthPx / 2 + right, SIZE.heightPx / 2 - up];
}

const SHORE: Point[] = (
  [
    [-130, -30],
    [-60, -58],
    [70, -50],
    [125, 0],
    [60, 52],
    [-70, 45],
  ] as const
).map(([xM, yM]) => ({ xM, yM }));
const ISLAND: Point[] = (
  [
    [-20, -15],
    [25, -15],
    [0, 25],
  ] as const
).map(([xM, yM]) => ({ xM, yM }));

/** The water painted blue with its island green, and a red dot at each known place. */
async function painted(known: readonly Point[]): Promise<Buffer> {
  const [shore, island] = [SHORE, ISLAND].map((ring) =>
    ring.map((point) => {
      const [xM, yM] = toPixel(point);
      return { xM, yM };
    }),
  );
  const dots = known.map(toPixel);
  const picture = new Jimp({ width: SIZE.widthPx, height: SIZE.heightPx, color: 0x5c7a45ff });
  picture.scan((x, y) => {
    const pixel = { xM: x, yM: y };
    if (dots.some(([dotX, dotY]) => Math.hypot(dotX - x, dotY - y) < 6))
      picture.setPixelColor(0xd02020ff, x, y);
    else if (insideRing(shore ?? [], pixel) && !insideRing(island ?? [], pixel))
      picture.setPixelColor(0x2c5a78ff, x, y);
  });
  return picture.getBuffer('image/jpeg', { quality: 85 });
}

/** Taps the canvas where it shows these pixels of the picture under it. */
async function tapPixels(page: Page, canvas: Locator, pixels: readonly (readonly [number, number])[]) {
  const picture = canvas.locator('img');
  await expect(picture).toBeVisible();
  await canvas.scrollIntoViewIfNeeded();
  const byTouch = await page.evaluate(() => navigator.maxTouchPoints > 0);
  for (const pixel of pixels) {
    const [x, y] = await picture.evaluate((image, [px, py]) => {
      const { x: right, y: down } = new DOMMatrix(getComputedStyle(image).transform).transformPoint({
        x: px,
        y: py,
      });
      const box = (image.parentElement ?? image).getBoundingClientRect();
      return [box.left + right, box.top + down] as const;
    }, pixel);
    if (byTouch) await page.touchscreen.tap(x, y);
    else await page.mouse.click(x, y);
  }
}

test('an owner lays a picture by three known points and traces the shore and an island over it', async ({
  pageOf,
  site,
}) => {
  test.setTimeout(120_000);
  const marian = await Asking.as('marian', site);
  const { lakeId } = await aStoryWater(marian);
  const before = await marian.get(`/lakes/${lakeId}`, LakeView);
  const plane = (position: readonly [number, number]) => toPlane(WATER_CENTRE, position);
  const boathouse = { xM: -140, yM: 60 };
  const known = [
    plane(before.pegs[0]?.position ?? [0, 0]),
    plane(before.marks[0]?.details.position ?? [0, 0]),
    boathouse,
  ];
  const page = await pageOf({ who: 'marian' });
  await page.goto(`/office/lakes/${lakeId}/outline`);
  await page.getByRole('link', { name: 'Trace it over a picture' }).click();
  await expect(page.getByText(/only pictures you have the right to use/)).toBeVisible();
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: 'Choose a picture' }).click();
  const file = { name: 'drone.jpg', mimeType: 'image/jpeg', buffer: await painted(known) };
  await (await chooser).setFiles(file);
  await page.getByLabel('What it is').fill('Painted for the journey');
  await page.getByRole('button', { name: 'Send the picture' }).click();
  await expect(page.getByText('not placed yet: set its known points')).toBeVisible({ timeout: 30_000 });
  await page.getByRole('link', { name: 'Known points' }).click();

  const picture = page.getByLabel('The picture: tap a place you know');
  const [peg, mark, corner] = known.map(toPixel);
  if (!peg || !mark || !corner) throw new Error('Three places are known');
  await tapPixels(page, picture, [peg]);
  await page.getByLabel('Point 1: what is it?').selectOption({ label: 'Peg FO7, at the water’s edge' });
  await tapPixels(page, picture, [mark]);
  await page.getByLabel('Point 2: what is it?').selectOption({ label: 'Mark M3, pump-house chimney' });
  await expect(page.getByText('Nothing checks these points')).toBeVisible();
  await tapPixels(page, picture, [corner]);
  await page.getByLabel('Point 3: what is it?').selectOption('other');
  await page.getByLabel('Point 3: its name').fill('Corner of the boathouse');
  const [wrongLon, wrongLat] = fromPlane(WATER_CENTRE, { xM: boathouse.xM - 30, yM: boathouse.yM });
  const place = page.getByLabel('Point 3: latitude, longitude');
  await place.fill(`${wrongLat.toFixed(7)}, ${wrongLon.toFixed(7)}`);
  await expect(page.getByText(/The points are missed by .* more than 2\sm/)).toBeVisible();
  const [lon, lat] = fromPlane(WATER_CENTRE, boathouse);
  await place.fill(`${lat.toFixed(7)}, ${lon.toFixed(7)}`);
  await expect(page.getByText(/The points are missed by/)).toHaveCount(0);
  await page.reload();
  await expect(page.getByText('What you typed earlier is here again.')).toBeVisible();
  await expect(page.getByText(/^3\. Corner of the boathouse/)).toBeVisible();
  await page.getByRole('button', { name: 'Keep the points' }).click();

  const sheet = page.getByLabel('Outline of the lake, to draw on');
  await expect(sheet.locator('img')).toBeVisible();
  await page.getByRole('button', { name: 'Draw the shore anew' }).click();
  await tapPixels(page, sheet, SHORE.map(toPixel));
  await expect(page.getByText('6 points of the shore')).toBeVisible();
  await page.getByRole('button', { name: 'Close the ring', exact: true }).click();
  await page.getByRole('button', { name: 'Add an island' }).click();
  await tapPixels(page, sheet, ISLAND.map(toPixel));
  await page.getByRole('button', { name: 'Close the ring', exact: true }).click();
  const mPerScreenPx = await sheet.locator('img').evaluate((image) => {
    const { a, b } = new DOMMatrix(getComputedStyle(image).transform);
    return 1 / Math.hypot(a, b);
  });
  await page.getByRole('button', { name: 'Keep the outline' }).click();
  await expect(page).toHaveURL(({ pathname }) => pathname === `/office/lakes/${lakeId}`);

  const { pictures } = await marian.get(`/lakes/${lakeId}/pictures`, LakePictureList);
  const rmsM = pictures[0]?.placed?.rmsM ?? Infinity;
  expect(rmsM).toBeLessThan(2);
  const { areaM2, details } = await marian.get(`/lakes/${lakeId}`, LakeView);
  expect(details.outline.coordinates).toHaveLength(2);
  const trueM2 = signedAreaM2(SHORE) - signedAreaM2(ISLAND);
  // Every side may lie off by the picture's own miss and by one pixel of the screen that was tapped.
  const slackM = rmsM + mPerScreenPx * M_PER_PX;
  expect(Math.abs(areaM2 - trueM2)).toBeLessThan((ringLengthM(SHORE) + ringLengthM(ISLAND)) * slackM);

  const stranger = await pageOf();
  const answer = await stranger.request.get(`/api/pictures/${pictures[0]?.id ?? ''}/large.jpg`);
  expect(answer.status()).toBe(401);
});
