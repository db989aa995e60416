import { openBucketStore } from '@mereward/api/files/bucket-store';
import { openDiskStore } from '@mereward/api/files/disk-store';
import { photoFile, photoFolder } from '@mereward/api/files/file-key';
import { readWhole, type FileStore } from '@mereward/api/files/store';
import { PhotoView } from '@mereward/shared/files/contract';
import { Problem, ProblemBody } from '@mereward/shared/problems/problem';
import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { aBucket, type TestBucket } from '../support/bucket';
import { aStranger } from '../support/people';
import { aJpeg, CORNERS, seenIn } from '../support/pictures';
import { aServer, type TestServer } from '../support/server';
import { aFishery, aLake, aPeg, type TestFishery, type TestPeg } from '../support/waters';

const folder = mkdtempSync(join(tmpdir(), 'mereward-store-'));
let bucket: TestBucket;
const ANSWER_WITHIN_MS = 400;
const inBucket = (): FileStore =>
  openBucketStore({ name: bucket.name, endpoint: bucket.endpoint, region: 'eu-west-2' }, ANSWER_WITHIN_MS);

beforeAll(async () => {
  bucket = await aBucket();
});
afterEach(() => bucket.go({ kind: 'open' }));
afterAll(async () => {
  await bucket.close();
  rmSync(folder, { recursive: true, force: true });
});

const KINDS: [string, () => FileStore][] = [
  ['a folder', () => openDiskStore(folder)],
  ['a bucket', inBucket],
];

const textOf = async (store: FileStore, key: string) => {
  const bytes = await readWhole(store, key);
  return bytes && Buffer.from(bytes).toString();
};

describe.each(KINDS)('%s', (_, open) => {
  test('gives back what was written, byte for byte, also three megabytes of it', async () => {
    const store = open();
    const key = photoFile(randomUUID(), 'large.jpg');
    const bytes = randomBytes(3_000_001);
    await store.write(key, bytes);
    const read = await readWhole(store, key);
    expect(
      createHash('sha256')
        .update(read ?? '')
        .digest('hex'),
    ).toBe(createHash('sha256').update(bytes).digest('hex'));
    expect((await store.about(key))?.sizeBytes).toBe(3_000_001);
  });

  test('gives a part of a file, and says how long the whole is', async () => {
    const store = open();
    const key = photoFile(randomUUID(), 'original');
    await store.write(key, Buffer.from('tench and crucians'));
    const opened = await store.open(key, { start: 6, end: 8 });
    const parts: Buffer[] = [];
    for await (const chunk of opened?.stream ?? []) parts.push(Buffer.from(chunk));
    expect(Buffer.concat(parts).toString()).toBe('and');
    expect(opened?.sizeBytes).toBe(18);
    expect(opened?.etag).toBe((await store.about(key))?.etag);
    expect(opened?.etag).toMatch(/^"[^"]+"$/);
  });

  test('holds nothing where nothing was written', async () => {
    const store = open();
    const key = photoFile(randomUUID(), 'small.jpg');
    expect(await store.about(key)).toBeNull();
    expect(await store.open(key)).toBeNull();
    expect(await readWhole(store, key)).toBeNull();
    await store.remove(key);
    await store.removeFolder(photoFolder(randomUUID()));
  });

  test('writes over what was there, and marks it anew', async () => {
    const store = open();
    const key = photoFile(randomUUID(), 'original');
    await store.write(key, Buffer.from('first'));
    const before = await store.about(key);
    await store.write(key, Buffer.from('second one'));
    expect(await textOf(store, key)).toBe('second one');
    expect((await store.about(key))?.etag).not.toBe(before?.etag);
  });

  test('of two writes at once keeps one whole', async () => {
    const store = open();
    const key = photoFile(randomUUID(), 'original');
    const both = ['a', 'b'].map((letter) => letter.repeat(400_000));
    await Promise.all(both.map((text) => store.write(key, Buffer.from(text))));
    expect(both).toContain(await textOf(store, key));
  });

  test('takes away one file, or a folder and nothing beside it', async () => {
    const store = open();
    const [id, other] = [randomUUID(), randomUUID()];
    for (const part of ['original', 'small.jpg', 'large.jpg'] as const)
      await store.write(photoFile(id, part), Buffer.from(part));
    await store.write(photoFile(other, 'large.jpg'), Buffer.from('stays'));
    await store.remove(photoFile(id, 'original'));
    expect(await store.about(photoFile(id, 'original'))).toBeNull();
    expect(await textOf(store, photoFile(id, 'small.jpg'))).toBe('small.jpg');
    await store.removeFolder(photoFolder(id));
    expect(await store.about(photoFile(id, 'large.jpg'))).toBeNull();
    expect(await textOf(store, photoFile(other, 'large.jpg'))).toBe('stays');
  });

  test('can be used', async () => {
    await open().check();
  });
});

const away = async (deed: Promise<unknown>): Promise<Problem> => {
  const error = await deed.then(
    () => null,
    (reason: unknown) => reason,
  );
  if (!(error instanceof Problem)) throw new Error(`no Problem but ${String(error)}`);
  expect(error).toMatchObject({ kind: 'internal', title: /store of pictures can’t be reached/ });
  return error;
};

describe('a folder that can’t be used', () => {
  test('is told in words, leaving nothing half written', async () => {
    const inTheWay = join(folder, 'in-the-way');
    writeFileSync(inTheWay, 'a file where the folder should be');
    const store = openDiskStore(inTheWay);
    await away(store.write(photoFile(randomUUID(), 'original'), Buffer.from('x')));
    await away(store.check());
  });

  test('leaves no part of a write that failed beside the file', async () => {
    const store = openDiskStore(folder);
    const id = randomUUID();
    await store.write(photoFile(id, 'original'), Buffer.from('x'));
    const at = join(folder, photoFolder(id));
    rmSync(join(at, 'original'));
    // A folder stands where the file should go, so the last step, the renaming, fails.
    await store.write(`${photoFolder(id)}/original/inner`, Buffer.from('y'));
    await away(store.write(photoFile(id, 'original'), Buffer.from('z')));
    expect(readdirSync(at).filter((name) => name.endsWith('.part'))).toEqual([]);
  });
});

describe('a bucket', () => {
  test('that is away is told in words; nothing kept before is lost', async () => {
    const store = inBucket();
    const key = photoFile(randomUUID(), 'original');
    await store.write(key, Buffer.from('kept before'));
    bucket.go({ kind: 'away' });
    await away(store.write(key, Buffer.from('never comes')));
    await away(store.about(key));
    await away(store.open(key));
    await away(store.remove(key));
    await away(store.check());
    bucket.go({ kind: 'open' });
    expect(await textOf(store, key)).toBe('kept before');
  });

  test('that never answers is given up', async () => {
    const store = inBucket();
    const key = photoFile(randomUUID(), 'original');
    bucket.go({ kind: 'silent' });
    await away(store.open(key));
    await away(store.write(key, Buffer.from('never comes')));
  });

  test('tells of a write that broke off, and takes it whole when it is sent again', async () => {
    const store = inBucket();
    const key = photoFile(randomUUID(), 'original');
    const bytes = randomBytes(2_000_000);
    bucket.go({ kind: 'cut', going: 'to', afterBytes: 200_000 });
    await away(store.write(key, bytes)); // the test's own store keeps half of it, which S3 forbids
    bucket.go({ kind: 'open' });
    await store.write(key, bytes);
    expect(Buffer.from((await readWhole(store, key)) ?? []).equals(bytes)).toBe(true);
  });

  test('that breaks off while it gives a file is noticed, never taken for the whole', async () => {
    const store = inBucket();
    const key = photoFile(randomUUID(), 'large.jpg');
    await store.write(key, randomBytes(2_000_000));
    bucket.go({ kind: 'cut', going: 'from', afterBytes: 300_000 });
    await expect(readWhole(store, key)).rejects.toThrow();
  });

  test('of another name is a fault, not a missing file', async () => {
    const store = openBucketStore({ name: 'no-such-bucket', endpoint: bucket.endpoint, region: 'eu-west-2' });
    await away(store.open(photoFile(randomUUID(), 'original')));
    await away(store.check());
  });
});

describe.each(['a folder', 'a bucket'] as const)('photos kept in %s', (kind) => {
  const env = (): NodeJS.ProcessEnv => (kind === 'a bucket' ? bucket.env : {});
  let server: TestServer;
  let here: TestFishery;
  let peg: TestPeg;
  beforeAll(async () => {
    server = await aServer({ env: env() });
    here = await aFishery(server);
    peg = await aPeg(server, await aLake(server, here), { number: 'P1' });
  });
  afterAll(() => server.close());

  const send = (bytes: Buffer, id: string = randomUUID()) =>
    here.people.manager
      .post(`/pegs/${peg.id}/photos`)
      .field('id', id)
      .field('caption', '')
      .attach('photo', bytes, 'lake.jpg');
  const stateOf = async (id: string) =>
    PhotoView.parse((await here.people.manager.get(`/photos/${id}`)).body);

  test('are resized, served whole, in part and not again, and taken away', async () => {
    const id = randomUUID();
    expect((await send(await aJpeg({ widthPx: 900, heightPx: 600 }, CORNERS), id)).status).toBe(202);
    await server.settle();
    expect(await stateOf(id)).toMatchObject({ state: 'ready', widthPx: 900, heightPx: 600 });
    const path = `/photos/${id}/large.jpg`;
    const ask = (heads: Record<string, string>) =>
      aStranger(server).get(path).set(heads).responseType('blob');
    const whole = await ask({});
    expect(whole.status).toBe(200);
    expect(whole.headers).toMatchObject({
      'content-type': 'image/jpeg',
      'accept-ranges': 'bytes',
      'cache-control': 'public, max-age=31536000, immutable',
      'content-length': String(whole.body.length),
    });
    const bytes = Buffer.from(whole.body);
    expect(await seenIn(bytes)).toMatchObject({ widthPx: 900, ...CORNERS });
    const part = await ask({ Range: 'bytes=100-199' });
    expect(part.status).toBe(206);
    expect(part.headers['content-range']).toBe(`bytes 100-199/${bytes.length}`);
    expect(Buffer.from(part.body).equals(bytes.subarray(100, 200))).toBe(true);
    const end = await ask({ Range: 'bytes=-50' });
    expect(Buffer.from(end.body).equals(bytes.subarray(-50))).toBe(true);
    const beyond = await ask({ Range: `bytes=${bytes.length}-` });
    expect([beyond.status, beyond.headers['content-range']]).toEqual([416, `bytes */${bytes.length}`]);
    const other = await ask({ Range: 'bytes=0-9', 'If-Range': '"of another file"' });
    expect([other.status, other.body.length]).toEqual([200, bytes.length]);
    const same = await ask({ 'If-None-Match': whole.headers['etag'] ?? '' });
    expect(same.status).toBe(304);
    expect((await here.people.manager.delete(`/photos/${id}`)).status).toBe(204);
    await server.settle();
    expect((await ask({})).status).toBe(404);
    expect((await ask({ Range: 'bytes=0-9' })).status).toBe(404);
  });

  test('whose file is lost in the store before they are ready say so', async () => {
    const id = randomUUID();
    await send(await aJpeg({ widthPx: 90, heightPx: 60 }, CORNERS), id);
    const store = kind === 'a bucket' ? inBucket() : openDiskStore(server.server.config.filesDir);
    await store.remove(photoFile(id, 'original'));
    await server.settle();
    expect(await stateOf(id)).toMatchObject({ state: 'refused', refusal: /lost here before it was ready/ });
  });

  if (kind === 'a bucket')
    test('wait while the bucket is away: a sender is told, a job comes round again', async () => {
      const [id, other] = [randomUUID(), randomUUID()];
      const photo = await aJpeg({ widthPx: 90, heightPx: 60 }, CORNERS);
      await send(photo, id);
      bucket.go({ kind: 'away' });
      const refused = await send(photo, other);
      expect(refused.status).toBe(500);
      expect(ProblemBody.parse(refused.body)).toMatchObject({
        title: 'The store of pictures can’t be reached just now',
        detail: /Nothing was kept\. Try again/,
      });
      expect((await here.people.manager.get(`/photos/${other}`)).status).toBe(404);
      for (let attempt = 1; attempt <= 4; attempt += 1)
        await expect(server.settle()).rejects.toThrow(/can’t be reached/);
      expect((await stateOf(id)).state).toBe('waiting'); // and what was sent is still there
      bucket.go({ kind: 'open' });
      await server.settle();
      expect((await stateOf(id)).state).toBe('ready');
      expect((await send(photo, other)).status).toBe(202); // sent again with the same id
      await server.settle();
      bucket.go({ kind: 'away' });
      expect((await here.people.manager.delete(`/photos/${other}`)).status).toBe(204);
      await expect(server.settle()).rejects.toThrow(/can’t be reached/);
      bucket.go({ kind: 'open' });
      expect(await inBucket().about(photoFile(other, 'large.jpg'))).not.toBeNull();
      await server.settle(); // what was to be taken away then is taken away now
      expect(await inBucket().about(photoFile(other, 'large.jpg'))).toBeNull();
    });
});
