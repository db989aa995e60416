import { pictureFolder } from '@mereward/api/files/file-key';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { LakeView } from '@mereward/shared/lakes/contract';
import {
  LakePictureList,
  LakePictureView,
  TRACING_PX,
  type FixLakePicture,
  type PicturePoint,
} from '@mereward/shared/lakes/picture-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aStranger, type Person } from '../support/people';
import { aJpeg, aPhoto, aPng, CORNERS, seenIn, segmentsOf, TELLTALE, withTags } from '../support/pictures';
import type { TestServer } from '../support/server';
import { aLake, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
});
afterAll(() => server.close());

type Sending = { id?: string; lakeId?: string; caption?: string };

const send = (who: Pick<Person, 'post'>, bytes: Buffer, { id, lakeId, caption = '' }: Sending = {}) =>
  who
    .post(`/lakes/${lakeId ?? lake.id}/pictures`)
    .field('id', id ?? randomUUID())
    .field('caption', caption)
    .attach('picture', bytes, 'from-above.jpg');
const problem = (body: unknown) => ProblemBody.parse(body);
const read = async (id: string) =>
  LakePictureView.parse((await here.people.owner.get(`/pictures/${id}`)).body);
async function kept(bytes?: Buffer): Promise<LakePictureView> {
  const sent = await send(
    here.people.owner,
    bytes ?? (await aJpeg({ widthPx: 400, heightPx: 300 }, CORNERS)),
  );
  expect(sent.status).toBe(202);
  await server.settle();
  return read(LakePictureView.parse(sent.body).id);
}

/** A point of a picture that lies north up, half a metre a pixel, its middle on the lake's origin. */
function known(label: string, [xPx, yPx]: [number, number], offM = 0): PicturePoint {
  const [lon, lat] = fromPlane(lake.origin, { xM: (xPx - 200) / 2 + offM, yM: (150 - yPx) / 2 });
  return { label, xPx, yPx, position: [lon, lat] };
}
const fix = (
  who: Pick<Person, 'put'>,
  { id, version }: Pick<LakePictureView, 'id' | 'version'>,
  wishes: Partial<FixLakePicture>,
) =>
  who
    .put(`/pictures/${id}/points`)
    .send({ fit: 'similarity', points: [known('a', [10, 10]), known('b', [390, 290])], version, ...wishes });

describe('a picture to trace over', () => {
  test('waits, is kept as large as it is traced at, and loses every tag', async () => {
    const big = withTags(await aJpeg({ widthPx: 3600, heightPx: 1800 }, CORNERS), 1);
    const answer = await send(here.people.manager, big, { caption: 'From a drone, May' });
    expect(answer.status).toBe(202);
    const waiting = LakePictureView.parse(answer.body);
    expect(waiting).toMatchObject({ state: 'waiting', points: [], placed: null, version: 1 });
    expect((await here.people.owner.get(`/pictures/${waiting.id}/large.jpg`)).status).toBe(404);
    await server.settle();
    expect(await read(waiting.id)).toMatchObject({
      state: 'ready',
      widthPx: TRACING_PX,
      heightPx: TRACING_PX / 2,
      caption: 'From a drone, May',
    });
    const large = await here.people.owner.get(`/pictures/${waiting.id}/large.jpg`).responseType('blob');
    expect(large.headers['cache-control']).toBe('private, no-cache');
    const bytes = Buffer.from(large.body);
    expect(await seenIn(bytes)).toMatchObject({ widthPx: TRACING_PX, ...CORNERS });
    expect(segmentsOf(bytes).filter((marker) => marker >= 0xe1 && marker <= 0xef)).toEqual([]);
    for (const word of Object.values(TELLTALE)) expect(bytes.includes(word)).toBe(false);
    const same = await here.people.owner
      .get(`/pictures/${waiting.id}/large.jpg`)
      .set({ 'If-None-Match': large.headers['etag'] ?? '' });
    expect(same.status).toBe(304);
    expect(readdirSync(join(server.server.config.filesDir, pictureFolder(waiting.id))).sort()).toEqual([
      'large.jpg',
      'small.jpg',
    ]);
  });

  test.each([
    ['a text', () => Buffer.from('All the lakes in one file'), /not a picture/],
    ['a bomb of 900 megapixels', () => aPng({ widthPx: 30_000, heightPx: 30_000 }), /900 megapixels/],
  ])('that is %s is refused in words', async (_, bytes, words) => {
    const answer = await send(here.people.owner, bytes());
    expect(answer.status).toBe(400);
    expect(problem(answer.body)).toMatchObject({ title: words, errors: [{ pointer: '/picture' }] });
  });

  test('that turns out damaged is refused, and can’t be given points', async () => {
    const whole = await aJpeg({ widthPx: 300, heightPx: 300 }, CORNERS);
    const cut = Buffer.concat([whole.subarray(0, Math.floor(whole.length * 0.6)), Buffer.from([0xff, 0xd9])]);
    const picture = await kept(cut);
    expect(picture).toMatchObject({ state: 'refused', refusal: /damaged/ });
    expect((await fix(here.people.owner, picture, {})).status).toBe(409);
  });

  test('sent twice at once with one id is kept once; with other bytes it is another', async () => {
    const [id, bytes] = [randomUUID(), await aPhoto(3)];
    const both = await Promise.all([1, 2].map(() => send(here.people.owner, bytes, { id })));
    expect(both.map(({ status }) => status)).toEqual([202, 202]);
    expect((await send(here.people.owner, await aPhoto(4), { id })).status).toBe(409);
    const theirs = await aLake(server, elsewhere);
    expect((await send(elsewhere.people.owner, bytes, { id, lakeId: theirs.id })).status).toBe(404);
    const { pictures } = LakePictureList.parse(
      (await here.people.owner.get(`/lakes/${lake.id}/pictures`)).body,
    );
    expect(pictures.filter((each) => each.id === id)).toHaveLength(1);
  });

  test('is taken no more than eight times of one lake', async () => {
    const full = await aLake(server, here, { name: 'Full Water' });
    const bytes = await aPhoto();
    for (let i = 0; i < 8; i += 1)
      expect((await send(here.people.owner, bytes, { lakeId: full.id })).status).toBe(202);
    expect((await send(here.people.owner, bytes, { lakeId: full.id })).status).toBe(409);
  });
});

describe('its known points', () => {
  test('say how it lies, and how far it misses them', async () => {
    const picture = await kept();
    const points = [known('a', [20, 20]), known('b', [380, 30]), known('c', [200, 280], 1.5)];
    const answer = await fix(here.people.manager, picture, { points });
    expect(answer.status).toBe(200);
    const fixed = LakePictureView.parse(answer.body);
    expect(fixed.version).toBe(2);
    expect(fixed.placed?.rmsM).toBeGreaterThan(0.1);
    expect(fixed.placed?.rmsM).toBeLessThan(1.5);
    const two = LakePictureView.parse(
      (await fix(here.people.owner, fixed, { points: points.slice(0, 2) })).body,
    );
    expect(two.placed?.rmsM).toBeLessThan(1e-6);
    const { xx, xy, yx, yy, x0, y0 } = two.placed?.transform ?? { xx: 0, xy: 0, yx: 0, yy: 0, x0: 0, y0: 0 };
    // Half a metre a pixel, north up, its middle on the origin; degrees on the way cost some nanometres.
    [xx - 0.5, xy, yx, yy + 0.5, x0 + 100, y0 - 75].forEach((off) =>
      expect(Math.abs(off)).toBeLessThan(1e-6),
    );
    const one = LakePictureView.parse(
      (await fix(here.people.owner, two, { points: points.slice(0, 1) })).body,
    );
    expect(one).toMatchObject({ placed: null, points: [{ label: 'a' }] });
  });

  test('are refused where they can’t be fitted, lie outside the picture or on another water', async () => {
    const picture = await kept();
    const a = known('a', [20, 20]);
    const together = await fix(here.people.owner, picture, { points: [a, { ...a, label: 'b' }] });
    expect(problem(together.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/points' }] });
    const outside = await fix(here.people.owner, picture, { points: [a, known('b', [900, 20])] });
    expect(problem(outside.body).errors).toMatchObject([{ pointer: '/points/1/xPx' }]);
    const far = await fix(here.people.owner, picture, { points: [{ ...a, position: [52, 1] }, a] });
    expect(problem(far.body)).toMatchObject({
      errors: [{ pointer: '/points/0/position', detail: /km from the lake/ }],
    });
    const line = [10, 130, 260, 390].map((xPx, i) => known(`p${i}`, [xPx, 100 + (i % 2)]));
    const affine = await fix(here.people.owner, picture, { fit: 'affine', points: line });
    expect(problem(affine.body).errors).toMatchObject([{ pointer: '/points', detail: /one line/ }]);
    expect((await fix(here.people.owner, picture, { points: [{ ...a, xPx: -1 }] })).status).toBe(400);
    expect(await read(picture.id)).toMatchObject({ points: [], version: 1 });
  });

  test('set by two at once are those of one of them', async () => {
    const picture = await kept();
    const both = await Promise.all([
      fix(here.people.owner, picture, {}),
      fix(here.people.manager, picture, { points: [known('other', [50, 50])] }),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await read(picture.id)).version).toBe(2);
  });
});

describe('who may', () => {
  beforeAll(async () => {
    lake = await aLake(server, here, { name: 'Another Water' }); // the first has as many as it may
  });

  test('see, add, fix or take away a picture: the owner and managers, nobody else', async () => {
    const picture = await kept();
    const bytes = await aPhoto();
    const asks = (who: Person | ReturnType<typeof aStranger>) => [
      who.get(`/lakes/${lake.id}/pictures`),
      who.get(`/pictures/${picture.id}`),
      who.get(`/pictures/${picture.id}/large.jpg`),
      who.get(`/pictures/${picture.id}/small.jpg`),
      send(who, bytes),
      fix(who, picture, {}),
      who.delete(`/pictures/${picture.id}`),
    ];
    const statuses = async (who: Person | ReturnType<typeof aStranger>) =>
      new Set((await Promise.all(asks(who))).map(({ status }) => status));
    expect(await statuses(aStranger(server))).toEqual(new Set([401]));
    for (const role of ['head_bailiff', 'bailiff', 'office', 'member', 'angler'] as const)
      expect(await statuses(here.people[role])).toEqual(new Set([403]));
    expect(await statuses(elsewhere.people.owner)).toEqual(new Set([404]));
    expect(await read(picture.id)).toMatchObject({ version: 1, state: 'ready' });
  });

  test('what everybody reads of a lake says nothing of its pictures', async () => {
    const { id } = await kept();
    const open = await aStranger(server).get(`/lakes/${lake.id}`);
    expect(LakeView.parse(open.body).id).toBe(lake.id);
    expect(JSON.stringify(open.body)).not.toContain(id);
    expect(Object.keys(open.body)).not.toContain('pictures');
  });

  test('taken away, its files are gone too', async () => {
    const { id } = await kept();
    const folder = join(server.server.config.filesDir, pictureFolder(id));
    expect(existsSync(folder)).toBe(true);
    expect((await here.people.manager.delete(`/pictures/${id}`)).status).toBe(204);
    expect((await here.people.manager.get(`/pictures/${id}`)).status).toBe(404);
    await server.settle();
    expect(existsSync(folder)).toBe(false);
    expect((await here.people.manager.delete(`/pictures/${id}`)).status).toBe(404);
  });

  test.each(['not-an-id', '..%2f..%2fetc', '%00'])('an address of %s finds nothing', async (id) => {
    expect((await here.people.owner.get(`/pictures/${id}/large.jpg`)).status).toBe(404);
  });
});
