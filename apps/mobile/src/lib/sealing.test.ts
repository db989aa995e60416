import { expect, test } from 'vitest';
import { seal, sealingKey, unseal } from './sealing';

const JOANS = sealingKey('AAECAwQFBgcICQoLDA0ODxAREhMUFRYXGBkaGxwdHh8');
const TOMS = sealingKey('HwEeAh0DHAQbBRoGGQcYCBcJFgoVCxQMEw0SDhEPEA8');
const CAST = { wraps: 14, note: 'knocked twice, gravel' };

test('what is sealed opens again with the same key', async () => {
  expect(await unseal(await JOANS, await seal(await JOANS, CAST, 'one'), 'one')).toEqual(CAST);
});

test('another person’s key opens nothing', async () => {
  expect(await unseal(await TOMS, await seal(await JOANS, CAST, 'one'), 'one')).toBeNull();
});

test('a seal moved to another place does not open there', async () => {
  expect(await unseal(await JOANS, await seal(await JOANS, CAST, 'one'), 'another')).toBeNull();
});

test('a changed byte is noticed', async () => {
  const sealed = await seal(await JOANS, CAST, 'one');
  const bytes = new Uint8Array(sealed.bytes);
  bytes[3] = (bytes[3] ?? 0) ^ 1;
  expect(await unseal(await JOANS, { ...sealed, bytes: bytes.buffer }, 'one')).toBeNull();
});

test('nothing of the content can be read in what is kept, and twice the same is sealed twice otherwise', async () => {
  const [one, two] = [await seal(await JOANS, CAST, 'one'), await seal(await JOANS, CAST, 'one')];
  const letters = (bytes: ArrayBuffer) => String.fromCharCode(...new Uint8Array(bytes));
  expect(letters(one.bytes)).not.toContain('gravel');
  expect(letters(one.bytes)).not.toBe(letters(two.bytes));
});

test('the key can’t be taken out of the browser again', async () => {
  await expect(crypto.subtle.exportKey('raw', await JOANS)).rejects.toThrow();
});
