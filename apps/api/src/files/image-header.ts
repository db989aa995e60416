/** What the first bytes of a file say it is; sizes in pixels as stored, before any turning. */
export type ImageHeader =
  | { kind: 'jpeg'; widthPx: number; heightPx: number; whole: boolean }
  | { kind: 'png'; widthPx: number; heightPx: number; whole: boolean; depth: number; interlaced: boolean }
  | { kind: 'heic' | 'webp' | 'gif' | 'tiff' | 'unknown' };

/** Reads a picture's kind and size from its bytes without decoding any of it: a bomb is known by its header. */
export function imageHeader(bytes: Buffer): ImageHeader {
  if (starts(bytes, [0xff, 0xd8, 0xff])) return jpegHeader(bytes) ?? { kind: 'unknown' };
  if (starts(bytes, PNG_SIGNATURE)) return pngHeader(bytes) ?? { kind: 'unknown' };
  if (text(bytes, 4, 8) === 'ftyp') return { kind: isHeic(bytes) ? 'heic' : 'unknown' };
  if (text(bytes, 0, 4) === 'RIFF' && text(bytes, 8, 12) === 'WEBP') return { kind: 'webp' };
  if (text(bytes, 0, 4) === 'GIF8') return { kind: 'gif' };
  if (['II*\0', 'MM\0*'].includes(text(bytes, 0, 4))) return { kind: 'tiff' };
  return { kind: 'unknown' };
}

const PNG_SIGNATURE = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];

const starts = (bytes: Buffer, wanted: readonly number[]): boolean =>
  wanted.every((byte, i) => bytes[i] === byte);
const text = (bytes: Buffer, from: number, to: number): string => bytes.toString('latin1', from, to);

/** ISO base media brands of HEIF pictures (ISO/IEC 23008-12) and of AV1 ones. */
const isHeic = (bytes: Buffer): boolean => /^(hei[cxms]|hev[cx]|mif1|msf1|avi[fs])$/.test(text(bytes, 8, 12));

const START_OF_SCAN = 0xda;
const END_OF_IMAGE = Buffer.from([0xff, 0xd9]);

/** Frame headers SOF0–SOF15 are C0…CF without C4 (tables), C8 (reserved) and CC (conditioning): ITU-T T.81, table B.1. */
const isFrame = (marker: number): boolean =>
  marker >= 0xc0 && marker <= 0xcf && marker !== 0xc4 && marker !== 0xc8 && marker !== 0xcc;

/** Walks the marker segments up to the first scan. Thumbnails lie inside segments, so they are stepped over. */
function jpegHeader(bytes: Buffer): ImageHeader | null {
  let size: { widthPx: number; heightPx: number } | null = null;
  let at = 2;
  while (at + 4 <= bytes.length) {
    if (bytes[at] !== 0xff) return null;
    const marker = bytes[at + 1] ?? 0;
    if (marker === 0xff) {
      at += 1; // fill bytes
      continue;
    }
    if (marker === START_OF_SCAN) break;
    const length = bytes.readUInt16BE(at + 2);
    if (isFrame(marker) && at + 9 <= bytes.length)
      size = { heightPx: bytes.readUInt16BE(at + 5), widthPx: bytes.readUInt16BE(at + 7) };
    at += 2 + length;
  }
  if (!size || size.widthPx === 0 || size.heightPx === 0) return null;
  return { kind: 'jpeg', ...size, whole: bytes.indexOf(END_OF_IMAGE, at) >= 0 };
}

/** IHDR comes first and holds the size; IEND is the last chunk: PNG (third edition), sections 11.2.2 and 11.2.5. */
function pngHeader(bytes: Buffer): ImageHeader | null {
  if (bytes.length < 33 || text(bytes, 12, 16) !== 'IHDR') return null;
  const size = { widthPx: bytes.readUInt32BE(16), heightPx: bytes.readUInt32BE(20) };
  if (size.widthPx === 0 || size.heightPx === 0) return null;
  return {
    kind: 'png',
    ...size,
    whole: endsWhole(bytes),
    depth: bytes[24] ?? 8,
    interlaced: bytes[28] !== 0,
  };
}

function endsWhole(bytes: Buffer): boolean {
  let at = 8;
  while (at + 12 <= bytes.length) {
    if (text(bytes, at + 4, at + 8) === 'IEND') return true;
    at += 12 + bytes.readUInt32BE(at);
  }
  return false;
}
