import { describe, expect, test } from 'vitest';
import { imageHeader } from './image-header';
import { photoFault } from './photo-fault';

const SOI = [0xff, 0xd8];
const segment = (marker: number, ...body: number[]) => [
  0xff,
  marker,
  (body.length + 2) >> 8,
  (body.length + 2) & 255,
  ...body,
];
const frame = (marker: number, heightPx: number, widthPx: number) =>
  segment(marker, 8, heightPx >> 8, heightPx & 255, widthPx >> 8, widthPx & 255, 1, 1, 0x11, 0);
const SCAN = [...segment(0xda, 1, 1, 0, 0, 63, 0), 1, 2, 3];
const EOI = [0xff, 0xd9];
const jpeg = (...parts: number[][]) => Buffer.from([...SOI, ...parts.flat()]);

type Wishes = { whole?: boolean; depth?: number; interlaced?: boolean };
const png = (widthPx: number, heightPx: number, wishes: Wishes = {}) => {
  const { whole = true, depth = 8, interlaced = false } = wishes;
  const out = Buffer.alloc(whole ? 45 : 33);
  out.set([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13]);
  out.write('IHDR', 12, 'latin1');
  out.writeUInt32BE(widthPx, 16);
  out.writeUInt32BE(heightPx, 20);
  out[24] = depth;
  out[28] = interlaced ? 1 : 0;
  if (whole) out.write('IEND', 37, 'latin1');
  return out;
};

describe('a JPEG’s header', () => {
  test.each([0xc0, 0xc1, 0xc2])('with frame %i gives its size', (marker) => {
    expect(imageHeader(jpeg(frame(marker, 3000, 4000), SCAN, EOI))).toEqual({
      kind: 'jpeg',
      widthPx: 4000,
      heightPx: 3000,
      whole: true,
    });
  });

  test('is read past tags that hold a thumbnail of their own, tables and fill bytes', () => {
    const thumbnail = [...SOI, ...frame(0xc0, 120, 160), ...SCAN, ...EOI];
    const bytes = jpeg(segment(0xe1, ...thumbnail), segment(0xc4, 1, 2), [0xff], frame(0xc0, 30, 40), SCAN);
    expect(imageHeader(bytes)).toEqual({ kind: 'jpeg', widthPx: 40, heightPx: 30, whole: false });
  });

  test('without a frame, or with a size of nothing, is no picture', () => {
    expect(imageHeader(jpeg(segment(0xe0, 1), SCAN, EOI)).kind).toBe('unknown');
    expect(imageHeader(jpeg(frame(0xc0, 0, 40), SCAN, EOI)).kind).toBe('unknown');
    expect(imageHeader(Buffer.from([...SOI, 0xff])).kind).toBe('unknown');
  });
});

test('a PNG’s header gives its size and whether the file is whole', () => {
  expect(imageHeader(png(300, 200))).toEqual({
    kind: 'png',
    widthPx: 300,
    heightPx: 200,
    whole: true,
    depth: 8,
    interlaced: false,
  });
  expect(imageHeader(png(300, 200, { whole: false }))).toMatchObject({ whole: false });
});

describe('what is wrong with a picture', () => {
  test.each([
    ['HEIC', Buffer.from('\0\0\0\x18ftypheic', 'latin1'), /iPhone.*Most Compatible/],
    ['AVIF', Buffer.from('\0\0\0\x18ftypavif', 'latin1'), /JPEG or PNG/],
    ['WebP', Buffer.from('RIFF\0\0\0\0WEBPVP8 ', 'latin1'), /WebP/],
    ['GIF', Buffer.from('GIF89a', 'latin1'), /GIF/],
    ['TIFF', Buffer.from('II*\0', 'latin1'), /TIFF/],
    ['a film', Buffer.from('\0\0\0\x18ftypisom', 'latin1'), /not a picture/],
    ['text', Buffer.from('lake.jpg'), /not a picture, whatever its name/],
    ['nothing', Buffer.alloc(0), /not a picture/],
    ['a bomb', png(30_000, 30_000), /30000 × 30000 pixels \(900 megapixels\); at most 24/],
    ['a PNG that unfolds beyond its header', png(30, 30, { interlaced: true }), /interlaced/],
    ['a cut PNG', png(30, 30, { whole: false }), /cut short/],
    ['a cut JPEG', jpeg(frame(0xc0, 30, 40), SCAN), /cut short/],
  ])('%s is told in words', (_, bytes, words) => {
    expect(photoFault(bytes)).toMatch(words);
  });

  test('of forty megapixels is nothing in a JPEG, of one row more is told', () => {
    expect(photoFault(jpeg(frame(0xc0, 5000, 8000), SCAN, EOI))).toBeNull();
    expect(photoFault(jpeg(frame(0xc0, 5001, 8000), SCAN, EOI))).toMatch(/41 megapixels.*at most 40/);
  });

  test('of twenty-four megapixels is nothing in a PNG, of sixteen bits half as many', () => {
    expect(photoFault(png(6000, 4000))).toBeNull();
    expect(photoFault(png(6000, 4001))).toMatch(/at most 24/);
    expect(photoFault(png(4000, 3000, { depth: 16 }))).toBeNull();
    expect(photoFault(png(4000, 3001, { depth: 16 }))).toMatch(/at most 12/);
  });
});
