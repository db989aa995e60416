import fc from 'fast-check';
import { expect, test } from 'vitest';
import { readFileText } from './file-text';

const bytes = (...values: number[]) => Uint8Array.from(values);

test('any text comes back as it was written, in UTF-8 and in UTF-16 either way round', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'grapheme' }), (text) => {
      expect(readFileText(new TextEncoder().encode(text))).toEqual({
        ok: true,
        text: text.replace(/^\uFEFF/, ''),
      });
      const units = Array.from({ length: text.length }, (_, i) => text.charCodeAt(i));
      const low = units.flatMap((unit) => [unit & 255, unit >> 8]);
      const high = units.flatMap((unit) => [unit >> 8, unit & 255]);
      expect(readFileText(bytes(0xff, 0xfe, ...low))).toEqual({ ok: true, text });
      expect(readFileText(bytes(0xfe, 0xff, ...high))).toEqual({ ok: true, text });
    }),
  );
});

test.each([
  ['a letter of Windows-1252', bytes(0x63, 0xf4, 0x74)],
  ['a letter cut short', bytes(0x63, 0xc3)],
  ['a letter written longer than it is', bytes(0xc0, 0x80)],
  ['half of a pair', bytes(0xed, 0xa0, 0x80)],
  ['a code past the last', bytes(0xf4, 0x90, 0x80, 0x80)],
])('%s is refused rather than guessed at', (_, file) => {
  expect(readFileText(file)).toMatchObject({ ok: false, reason: expect.stringContaining('UTF-8') });
});

test('UTF-16 that ends in the middle of a letter is refused', () => {
  expect(readFileText(bytes(0xff, 0xfe, 0x41))).toMatchObject({ ok: false });
});
