import { DeviceKeyView } from '@mereward/shared/accounts/contract';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aPerson, aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
beforeAll(async () => {
  here = await aServer();
});
afterAll(() => here.close());

const PATH = '/accounts/me/device-key';
const keyOf = async (who: Asker): Promise<string> => {
  const answer = await who.post(PATH);
  expect(answer.status).toBe(200);
  return DeviceKeyView.parse(answer.body).key;
};

test('an account has one key for its phones: 32 bytes, the same at every asking', async () => {
  const joan = await aPerson(here, { name: 'Joan' });
  const key = await keyOf(joan);
  expect(Buffer.from(key, 'base64url')).toHaveLength(32);
  here.pass(90 * 86_400);
  expect(await keyOf(joan)).toBe(key);
});

test('no two accounts have the same key', async () => {
  const [one, other] = [await aPerson(here), await aPerson(here)];
  expect(await keyOf(one)).not.toBe(await keyOf(other));
});

test('asked for the first time by several phones at once, all get the same key', async () => {
  const joan = await aPerson(here);
  const keys = await Promise.all([keyOf(joan), keyOf(joan), keyOf(joan), keyOf(joan)]);
  expect(new Set(keys).size).toBe(1);
});

test('a stranger gets no key', async () => {
  const answer = await aStranger(here).post(PATH);
  expect(answer.status).toBe(401);
  expect(answer.body).not.toHaveProperty('key');
});

test('the key goes with its account', async () => {
  const joan = await aPerson(here);
  await keyOf(joan);
  await here.server.source.query('DELETE FROM account WHERE id = $1', [joan.id]);
  const rows = await here.server.source.query('SELECT 1 FROM device_key WHERE account_id = $1', [joan.id]);
  expect(rows).toEqual([]);
});
