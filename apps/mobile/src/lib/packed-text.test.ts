import { assert, asyncProperty, string } from 'fast-check';
import { expect, test } from 'vitest';
import { packedText, unpackedText } from './packed-text';

test('any text comes out of its packing as it went in, and an address may hold it', async () => {
  await assert(
    asyncProperty(string({ unit: 'grapheme' }), async (text) => {
      const packed = await packedText(text);
      expect(packed).toMatch(/^[\w-]*$/);
      expect(await unpackedText(packed, 10_000)).toBe(text);
    }),
  );
});

test('what was cut, changed or is no packing at all comes to nothing', async () => {
  const packed = await packedText('fourteen wraps over the pump-house chimney '.repeat(20));
  expect(await unpackedText(packed.slice(0, -8), 10_000)).toBeNull();
  expect(await unpackedText(`${packed.slice(0, 4)}!!`, 10_000)).toBeNull();
  expect(await unpackedText('', 10_000)).toBeNull();
});

test('a small packing of a huge text is let go of before it is unpacked', async () => {
  const packed = await packedText('0'.repeat(200_000));
  expect(packed.length).toBeLessThan(1_000);
  expect(await unpackedText(packed, 100_000)).toBeNull();
  expect(await unpackedText(packed, 200_000)).toHaveLength(200_000);
});
