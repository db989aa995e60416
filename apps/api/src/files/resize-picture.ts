import { Jimp, ResizeStrategy } from 'jimp';
import { LARGE_PX, SMALL_PX } from './photo-sizes';

export type Resized =
  | { kind: 'done'; widthPx: number; heightPx: number; large: Uint8Array; small: Uint8Array }
  | { kind: 'refused'; words: string };

/** What the JPEG decoder may take for one picture. Forty megapixels with halved colour need about 500 MB. */
const DECODER_MB = 640;

const OPTIONS = {
  'image/jpeg': { tolerantDecoding: false, maxMemoryUsageInMB: DECODER_MB, maxResolutionInMP: 45 },
};

const UNREADABLE =
  'This picture is damaged and could not be read. Open it on the phone, save it anew and send it again.';
const TOO_HEAVY =
  'This picture needs more memory to open than there is here. Make it smaller (24 megapixels always go) and send it again.';

/**
 * Decodes a JPEG or PNG, turns it as its camera noted, and writes it anew in two sizes. A picture written anew
 * holds pixels and nothing else: no place, no camera, no thumbnail of what was cropped away.
 */
export async function resizePicture(bytes: Buffer, largePx = LARGE_PX): Promise<Resized> {
  const picture = await decode(bytes);
  if (typeof picture === 'string') return { kind: 'refused', words: picture };
  // What shows through a transparent picture becomes white, not black.
  const opaque = new Jimp({ width: picture.bitmap.width, height: picture.bitmap.height, color: 0xffffffff });
  const large = picture.hasAlpha() ? opaque.composite(picture) : picture;
  shrinkTo(large, largePx);
  const { width, height } = large.bitmap;
  const largeBytes = await large.getBuffer('image/jpeg', { quality: 82 });
  shrinkTo(large, SMALL_PX);
  const smallBytes = await large.getBuffer('image/jpeg', { quality: 78 });
  return { kind: 'done', widthPx: width, heightPx: height, large: largeBytes, small: smallBytes };
}

type Picture = Awaited<ReturnType<typeof Jimp.fromBuffer>>;

async function decode(bytes: Buffer): Promise<Picture | string> {
  try {
    return await Jimp.fromBuffer(bytes, OPTIONS);
  } catch (error) {
    const tooHeavy = error instanceof Error && /limit exceeded|enough memory/.test(error.message);
    return tooHeavy ? TOO_HEAVY : UNREADABLE;
  }
}

/** The longer side becomes `mostPx`; a smaller picture stays as it is. */
function shrinkTo(picture: Pick<Picture, 'bitmap' | 'resize'>, mostPx: number): void {
  const { width, height } = picture.bitmap;
  const share = mostPx / Math.max(width, height);
  if (share >= 1) return;
  const side = (lengthPx: number) => Math.max(1, Math.round(lengthPx * share));
  picture.resize({ w: side(width), h: side(height), mode: ResizeStrategy.BILINEAR });
}
