import { Jimp } from 'jimp';
import { crc32, deflateSync } from 'node:zlib';

export type Colour = 'red' | 'green' | 'blue' | 'white';
const RGBA: Record<Colour, number> = {
  red: 0xe02020ff,
  green: 0x20a020ff,
  blue: 0x2020e0ff,
  white: 0xffffffff,
};

type Size = { widthPx: number; heightPx: number };
type Corners = { topLeft: Colour; topRight: Colour; bottomLeft: Colour; bottomRight: Colour };

/** A JPEG of four quarters, each in its own colour. */
export async function aJpeg({ widthPx, heightPx }: Size, corners: Corners): Promise<Buffer> {
  const picture = new Jimp({ width: widthPx, height: heightPx, color: RGBA.white });
  picture.scan((x, y) => {
    const [left, right] =
      y < heightPx / 2 ? [corners.topLeft, corners.topRight] : [corners.bottomLeft, corners.bottomRight];
    picture.setPixelColor(RGBA[x < widthPx / 2 ? left : right], x, y);
  });
  return picture.getBuffer('image/jpeg', { quality: 92 });
}

export const CORNERS: Corners = {
  topLeft: 'red',
  topRight: 'green',
  bottomLeft: 'blue',
  bottomRight: 'white',
};

/** A small ordinary photo; another `seed` gives other bytes. */
export const aPhoto = (seed = 0): Promise<Buffer> => aJpeg({ widthPx: 60 + seed, heightPx: 40 }, CORNERS);

/** A picture's size and the colour nearest to what stands in each corner. */
export async function seenIn(bytes: Buffer): Promise<Size & Corners> {
  const picture = await Jimp.fromBuffer(bytes);
  const { width, height } = picture.bitmap;
  const at = (x: number, y: number): Colour =>
    nearest(picture.getPixelColor(Math.floor(x * width), Math.floor(y * height)));
  return {
    widthPx: width,
    heightPx: height,
    topLeft: at(0.2, 0.2),
    topRight: at(0.8, 0.2),
    bottomLeft: at(0.2, 0.8),
    bottomRight: at(0.8, 0.8),
  };
}

const COLOURS: readonly Colour[] = ['red', 'green', 'blue', 'white'];

function nearest(rgba: number): Colour {
  const parts = (value: number) => [24, 16, 8].map((shift) => (value >>> shift) & 255);
  const far = (colour: Colour) =>
    parts(RGBA[colour]).reduce((sum, part, i) => sum + (part - (parts(rgba)[i] ?? 0)) ** 2, 0);
  return COLOURS.reduce((best, colour) => (far(colour) < far(best) ? colour : best));
}

/** Words that a camera's tags would give away; looked for in what is served. */
export const TELLTALE = { camera: 'Telltale Camera', xmp: 'telltale-xmp', comment: 'telltale comment' };

/**
 * The JPEG with a camera's tags put in: Exif 2.32 (camera, orientation, a GPS position), XMP and a comment.
 * IFD entries are tag, type, count, value or offset; offsets count from the TIFF header.
 */
export function withTags(jpeg: Buffer, orientation: number): Buffer {
  const segment = (marker: number, body: Buffer) => {
    const head = Buffer.from([0xff, marker, 0, 0]);
    head.writeUInt16BE(body.length + 2, 2);
    return Buffer.concat([head, body]);
  };
  const exif = segment(0xe1, Buffer.concat([Buffer.from('Exif\0\0', 'latin1'), tiff(orientation)]));
  const xmp = segment(0xe1, Buffer.from(`http://ns.adobe.com/xap/1.0/\0<x>${TELLTALE.xmp}</x>`, 'latin1'));
  const comment = segment(0xfe, Buffer.from(TELLTALE.comment, 'latin1'));
  return Buffer.concat([jpeg.subarray(0, 2), exif, xmp, comment, jpeg.subarray(2)]);
}

function tiff(orientation: number): Buffer {
  const camera = Buffer.from(`${TELLTALE.camera}\0`, 'latin1');
  const cameraAt = 8 + 2 + 3 * 12 + 4;
  const gpsAt = cameraAt + camera.length + (camera.length % 2);
  const degreesAt = gpsAt + 2 + 4 * 12 + 4;
  const out = Buffer.alloc(degreesAt + 48);
  out.write('MM\0*', 0, 'latin1');
  out.writeUInt32BE(8, 4);
  camera.copy(out, cameraAt);
  ifd(out, 8, [
    [0x010f, 2, camera.length, cameraAt],
    [0x0112, 3, 1, orientation << 16], // a short stands left in its four bytes
    [0x8825, 4, 1, gpsAt],
  ]);
  ifd(out, gpsAt, [
    [1, 2, 2, 'N'.charCodeAt(0) << 24],
    [2, 5, 3, degreesAt],
    [3, 2, 2, 'E'.charCodeAt(0) << 24],
    [4, 5, 3, degreesAt + 24],
  ]);
  [53, 36, 0, 1, 37, 12].forEach((part, i) => {
    out.writeUInt32BE(part, degreesAt + i * 8);
    out.writeUInt32BE(1, degreesAt + i * 8 + 4);
  });
  return out;
}

type Entry = readonly [tag: number, type: number, count: number, value: number];

function ifd(out: Buffer, at: number, entries: readonly Entry[]): void {
  out.writeUInt16BE(entries.length, at);
  entries.forEach(([tag, type, count, value], i) => {
    const entryAt = at + 2 + i * 12;
    out.writeUInt16BE(tag, entryAt);
    out.writeUInt16BE(type, entryAt + 2);
    out.writeUInt32BE(count, entryAt + 4);
    out.writeUInt32BE(value >>> 0, entryAt + 8);
  });
}

/** The markers of a JPEG's segments before its first scan. */
export function segmentsOf(jpeg: Buffer): number[] {
  const markers: number[] = [];
  for (let at = 2; jpeg[at] === 0xff && jpeg[at + 1] !== 0xda; at += 2 + jpeg.readUInt16BE(at + 2))
    markers.push(jpeg[at + 1] ?? 0);
  return markers;
}

/** A PNG that says it is that large, with whatever pixels are given (none: a bomb in a few bytes). */
export function aPng({ widthPx, heightPx }: Size, pixels: Buffer = Buffer.alloc(0)): Buffer {
  const chunk = (type: string, body: Buffer) => {
    const named = Buffer.concat([Buffer.from(type, 'latin1'), body]);
    const out = Buffer.alloc(body.length + 12);
    out.writeUInt32BE(body.length, 0);
    named.copy(out, 4);
    out.writeUInt32BE(crc32(named), body.length + 8);
    return out;
  };
  const header = Buffer.alloc(13);
  header.writeUInt32BE(widthPx, 0);
  header.writeUInt32BE(heightPx, 4);
  header.set([8, 6, 0, 0, 0], 8); // eight bits, red green blue alpha
  return Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    chunk('IHDR', header),
    chunk('IDAT', deflateSync(pixels, { level: 9 })),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}
