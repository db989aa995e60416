import { resizePicture } from '@mereward/api/files/resize-picture';
import { photoFolder } from '@mereward/api/files/file-key';
import { PHOTO_MOST_BYTES, PhotoView } from '@mereward/shared/files/contract';
import { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { existsSync, readdirSync } from 'node:fs';
import { createServer, request, type IncomingMessage } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { signAccessToken } from '@mereward/api/http/session';
import { aLakeGround } from '../support/grounds';
import { aStranger, type Person } from '../support/people';
import { aJpeg, aPhoto, aPng, CORNERS, seenIn, segmentsOf, TELLTALE, withTags } from '../support/pictures';
import type { TestServer } from '../support/server';
import { aLake, aMark, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let peg: TestPeg;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
  peg = await aPeg(server, lake, { number: 'P1' });
});
afterAll(() => server.close());

type Sending = { id?: string; path?: string; caption?: string };

const send = (who: Pick<Person, 'post'>, bytes: Buffer, { id, path, caption = '' }: Sending = {}) =>
  who
    .post(path ?? `/pegs/${peg.id}/photos`)
    .field('id', id ?? randomUUID())
    .field('caption', caption)
    .field('takenOn', '2027-04-02')
    .attach('photo', bytes, 'lake.jpg');

const problem = (body: unknown) => ProblemBody.parse(body);
const kept = async (bytes: Buffer): Promise<PhotoView> => {
  const sent = PhotoView.parse((await send(here.people.manager, bytes)).body);
  await server.settle();
  return PhotoView.parse((await here.people.manager.get(`/photos/${sent.id}`)).body);
};
const fetched = async (url: string | null): Promise<Buffer> => {
  const answer = await aStranger(server)
    .get((url ?? '').replace('/api', ''))
    .responseType('blob');
  expect(answer.status).toBe(200);
  expect(answer.headers['content-type']).toBe('image/jpeg');
  return Buffer.from(answer.body);
};

describe('a photo of a peg', () => {
  test('waits, is made ready in two sizes, and is then there for everybody', async () => {
    const big = await aJpeg({ widthPx: 2000, heightPx: 1200 }, CORNERS);
    const answer = await send(here.people.head_bailiff, big, { caption: 'from the dot' });
    expect(answer.status).toBe(202);
    const waiting = PhotoView.parse(answer.body);
    expect(waiting).toMatchObject({ state: 'waiting', smallUrl: null, takenOn: '2027-04-02' });
    expect((await aStranger(server).get(`/photos/${waiting.id}`)).status).toBe(404);
    expect((await aStranger(server).get(`/photos/${waiting.id}/large.jpg`)).status).toBe(404);
    await server.settle();
    const { photos } = PegView.parse((await aStranger(server).get(`/pegs/${peg.id}/details`)).body);
    const ready = photos.find(({ id }) => id === waiting.id);
    expect(ready).toMatchObject({ state: 'ready', widthPx: 1600, heightPx: 960, caption: 'from the dot' });
    expect(await seenIn(await fetched(ready?.largeUrl ?? null))).toEqual({
      widthPx: 1600,
      heightPx: 960,
      ...CORNERS,
    });
    expect(await seenIn(await fetched(ready?.smallUrl ?? null))).toMatchObject({
      widthPx: 400,
      heightPx: 240,
    });
    const served = await aStranger(server).get(`/photos/${waiting.id}/small.jpg`);
    expect(served.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    const folder = join(server.server.config.filesDir, photoFolder(waiting.id));
    expect(readdirSync(folder).sort()).toEqual(['large.jpg', 'small.jpg']); // what was sent is forgotten
  });

  test.each([
    [1, 'topLeft', 'topRight'],
    [2, 'topRight', 'topLeft'],
    [3, 'bottomRight', 'bottomLeft'],
    [4, 'bottomLeft', 'bottomRight'],
    [5, 'topLeft', 'bottomLeft'],
    [6, 'topRight', 'bottomRight'],
    [7, 'bottomRight', 'topRight'],
    [8, 'bottomLeft', 'topLeft'],
  ] as const)(
    'taken with orientation %i is turned: its first corner is seen at %s',
    async (orientation, first, second) => {
      // Exif 2.32, tag 274: where the stored picture's first row and first column are to be seen.
      const stored = withTags(await aPhoto(), orientation);
      const answer = await resizePicture(stored);
      if (answer.kind !== 'done') throw new Error(answer.words);
      const seen = await seenIn(Buffer.from(answer.large));
      expect([seen[first], seen[second]]).toEqual(['red', 'green']);
      expect([seen.widthPx, seen.heightPx]).toEqual(orientation < 5 ? [60, 40] : [40, 60]);
    },
  );

  test('loses every tag on its way: place, camera, comment', async () => {
    const stored = withTags(await aPhoto(1), 6);
    expect(stored.includes(TELLTALE.camera)).toBe(true);
    const photo = await kept(stored);
    expect(photo).toMatchObject({ state: 'ready', widthPx: 40, heightPx: 61 });
    for (const url of [photo.largeUrl, photo.smallUrl]) {
      const bytes = await fetched(url);
      const segments = segmentsOf(bytes);
      expect(segments.filter((marker) => marker >= 0xe1 && marker <= 0xef)).toEqual([]); // APP1…APP15
      expect(segments).not.toContain(0xfe); // comments
      for (const word of [...Object.values(TELLTALE), 'Exif', 'GPS'])
        expect(bytes.includes(word)).toBe(false);
    }
  });

  test('of a mark is kept with the mark', async () => {
    const mark = await aMark(server, lake, { code: 'MP' });
    const answer = await send(here.people.owner, await aPhoto(2), { path: `/marks/${mark.id}/photos` });
    expect(answer.status).toBe(202);
    const waiting = async (who: Pick<Person, 'get'>) => {
      const view = LakeView.parse((await who.get(`/lakes/${lake.id}`)).body);
      return view.marks.find(({ id }) => id === mark.id)?.photos.length;
    };
    expect(await waiting(here.people.owner)).toBe(1);
    expect(await waiting(aStranger(server))).toBe(0);
    await server.settle();
    expect(await waiting(aStranger(server))).toBe(1);
  });

  test('sent twice with one id is kept once; with other bytes it is another', async () => {
    const id = randomUUID();
    const bytes = await aPhoto(3);
    const both = await Promise.all([
      send(here.people.manager, bytes, { id }),
      send(here.people.manager, bytes, { id }),
    ]);
    expect(both.map(({ status }) => status)).toEqual([202, 202]);
    expect((await send(here.people.manager, await aPhoto(4), { id })).status).toBe(409);
    expect((await send(here.people.owner, bytes, { id })).status).toBe(409);
    await server.settle();
    const again = await send(here.people.manager, bytes, { id });
    expect(PhotoView.parse(again.body).state).toBe('ready');
    const theirLake = await aLake(server, elsewhere);
    const theirs = await aPeg(server, theirLake);
    const stolen = await send(elsewhere.people.owner, bytes, { id, path: `/pegs/${theirs.id}/photos` });
    expect(stolen.status).toBe(404);
  });

  test('is taken no more than twenty-four times', async () => {
    const full = await aPeg(server, lake, { number: 'FULL' });
    const path = `/pegs/${full.id}/photos`;
    for (let i = 0; i < 24; i += 1)
      expect((await send(here.people.manager, await aPhoto(i), { path })).status).toBe(202);
    const last = await send(here.people.manager, await aPhoto(25), { path });
    expect(problem(last.body)).toMatchObject({ kind: 'conflict' });
    await server.server.source.query('DELETE FROM photo WHERE peg_id = $1', [full.id]);
    await server.settle(); // jobs of photos that are gone leave nothing behind
  });
});

describe('who may', () => {
  test('add: neither strangers, bailiffs, members nor another fishery', async () => {
    const bytes = await aPhoto();
    expect((await send(aStranger(server), bytes)).status).toBe(401);
    expect((await send(here.people.bailiff, bytes)).status).toBe(403);
    expect((await send(here.people.member, bytes)).status).toBe(403);
    expect((await send(elsewhere.people.owner, bytes)).status).toBe(404);
    expect((await send(here.people.owner, bytes, { path: `/pegs/${randomUUID()}/photos` })).status).toBe(404);
    expect((await send(here.people.owner, bytes, { path: '/pegs/..%2f..%2fx/photos' })).status).toBe(404);
  });

  test('take away: those who may add, and then its files are gone', async () => {
    const photo = await kept(await aPhoto(5));
    const path = `/photos/${photo.id}`;
    expect((await aStranger(server).delete(path)).status).toBe(401);
    expect((await here.people.office.delete(path)).status).toBe(403);
    expect((await elsewhere.people.manager.delete(path)).status).toBe(404);
    expect((await here.people.manager.delete(path)).status).toBe(204);
    await server.settle();
    expect((await aStranger(server).get(`${path}/large.jpg`)).status).toBe(404);
    expect((await here.people.manager.delete(path)).status).toBe(404);
    const folder = join(server.server.config.filesDir, photoFolder(photo.id));
    expect(existsSync(folder)).toBe(false);
  });

  test.each(['not-an-id', '..%2f..%2fetc', '%00'])('a picture’s address of %s finds nothing', async (id) => {
    expect((await aStranger(server).get(`/photos/${id}/large.jpg`)).status).toBe(404);
  });
});

describe('what is no photo', () => {
  test.each([
    ['a text named .jpg', () => Buffer.from('All the lakes in one file'), /not a picture, whatever its name/],
    ['HEIC', () => Buffer.from('\0\0\0\x18ftypheic\0\0\0\0', 'latin1'), /Most Compatible/],
    ['a bomb of 900 megapixels', () => aPng({ widthPx: 30_000, heightPx: 30_000 }), /900 megapixels/],
    ['an empty file', () => Buffer.alloc(0), /not a picture|no file/],
  ])('%s is refused in words, and nothing is kept', async (_, bytes, words) => {
    const answer = await send(here.people.manager, bytes());
    expect(answer.status).toBe(400);
    expect(problem(answer.body).title).toMatch(words);
  });

  test('a JPEG cut short is refused, also when its end was put back on', async () => {
    const whole = await aJpeg({ widthPx: 300, heightPx: 300 }, CORNERS);
    const cut = whole.subarray(0, Math.floor(whole.length * 0.6));
    expect(problem((await send(here.people.manager, cut)).body).title).toMatch(/cut short/);
    const photo = await kept(Buffer.concat([cut, Buffer.from([0xff, 0xd9])]));
    expect(photo).toMatchObject({ state: 'refused', largeUrl: null });
    expect(photo.refusal).toMatch(/damaged/);
  });

  test('a PNG whose pixels are far more than its header says is refused', async () => {
    const photo = await kept(aPng({ widthPx: 10, heightPx: 10 }, Buffer.alloc(100_000_000)));
    expect(photo).toMatchObject({ state: 'refused', largeUrl: null });
  });

  test('a PNG is taken, white where it shows through', async () => {
    const rows = Buffer.concat(Array.from({ length: 20 }, () => Buffer.alloc(1 + 20 * 4))); // all clear
    const photo = await kept(aPng({ widthPx: 20, heightPx: 20 }, rows));
    expect(photo).toMatchObject({ state: 'ready', widthPx: 20, heightPx: 20 });
    expect(await seenIn(await fetched(photo.largeUrl))).toMatchObject({
      topLeft: 'white',
      bottomRight: 'white',
    });
  });

  test('no file, another field and no multipart are each refused', async () => {
    const post = () => here.people.manager.post(`/pegs/${peg.id}/photos`);
    const without = await post().field('id', randomUUID());
    expect(problem(without.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/photo' }] });
    const other = await post()
      .field('id', randomUUID())
      .attach('picture', await aPhoto(), 'a.jpg');
    expect(problem(other.body)).toMatchObject({ kind: 'invalid' });
    expect((await post().send({ id: randomUUID() })).status).toBe(400);
    const nameless = await post().attach('photo', await aPhoto(), 'a.jpg');
    expect(problem(nameless.body).errors?.[0]?.pointer).toBe('/id');
  });
});

describe('a file that is too large', () => {
  const start = async (): Promise<{ port: number; stop: () => Promise<void> }> => {
    const http = createServer(server.app).listen(0, '127.0.0.1');
    await new Promise((ready) => http.once('listening', ready));
    const { port } = http.address() as AddressInfo;
    return {
      port,
      stop: () => {
        http.closeAllConnections();
        return new Promise((done) => http.close(() => done()));
      },
    };
  };

  /** Begins an upload that never ends by itself; answers what the server says and how much was sent by then. */
  async function upload(port: number, headers: Record<string, string>) {
    const { config, clock } = server.server;
    const token = signAccessToken(config, here.people.manager.id, clock());
    const sending = request({
      port,
      method: 'POST',
      path: `/api/pegs/${peg.id}/photos`,
      headers: {
        authorization: `Bearer ${token}`,
        'content-type': 'multipart/form-data; boundary=edge',
        ...headers,
      },
    });
    let answered = false;
    const answer = new Promise<IncomingMessage>((resolve, reject) => {
      sending.once('response', (response) => {
        answered = true;
        resolve(response);
      });
      sending.once('error', reject);
    });
    let sentBytes = 0;
    const put = (chunk: Buffer) =>
      new Promise<void>((done) => {
        sentBytes += chunk.length;
        sending.write(chunk, () => done());
      });
    await put(
      Buffer.from('--edge\r\ncontent-disposition: form-data; name="photo"; filename="a.jpg"\r\n\r\n'),
    );
    const piece = Buffer.alloc(256 * 1024, 1);
    while (!answered && sentBytes < 100 * 1024 * 1024) {
      await put(piece);
      await new Promise(setImmediate);
    }
    const response = await answer;
    const chunks: Buffer[] = [];
    for await (const chunk of response) chunks.push(Buffer.from(chunk));
    sending.destroy();
    return { status: response.statusCode, body: JSON.parse(Buffer.concat(chunks).toString()), sentBytes };
  }

  test('is refused by the length it states, before it comes', async () => {
    const { port, stop } = await start();
    const { status, body, sentBytes } = await upload(port, { 'content-length': String(100 * 1024 * 1024) });
    await stop();
    expect(status).toBe(413);
    expect(problem(body)).toMatchObject({ kind: 'too-large', title: 'This file is larger than 15 MB' });
    expect(sentBytes).toBeLessThan(PHOTO_MOST_BYTES);
  });

  test('is refused while it comes when it states none', async () => {
    const { port, stop } = await start();
    const { status, body, sentBytes } = await upload(port, { 'transfer-encoding': 'chunked' });
    await stop();
    expect(status).toBe(413);
    expect(problem(body)).toMatchObject({ kind: 'too-large' });
    expect(sentBytes).toBeGreaterThan(PHOTO_MOST_BYTES);
    expect(sentBytes).toBeLessThan(40 * 1024 * 1024); // far from its hundred: the answer came on the way
  });
});

describe('while a photo is resized', () => {
  test('the server answers other requests', async () => {
    const photo = await aJpeg({ widthPx: 3000, heightPx: 2000 }, CORNERS);
    expect((await send(here.people.manager, photo)).status).toBe(202);
    let resizing = true;
    const resized = server.settle().finally(() => (resizing = false));
    let answered = 0;
    while (resizing && answered < 50) {
      expect((await aStranger(server).get('/health')).status).toBe(200);
      if (resizing) answered += 1;
    }
    await resized;
    expect(answered).toBe(50); // resized on this thread, two or three would slip in between its steps
  });
});
