import { PHOTO_MOST_PIXELS } from '@mereward/shared/files/contract';
import { imageHeader } from './image-header';

const AGAIN = 'send it as JPEG or PNG';

const OTHER_KINDS = {
  heic: `This is a HEIC or AVIF picture, which can’t be read here. On an iPhone choose Settings, Camera, Formats, “Most Compatible”, or share the picture as JPEG, and ${AGAIN}.`,
  webp: `This is a WebP picture; ${AGAIN}.`,
  gif: `This is a GIF picture; ${AGAIN}.`,
  tiff: `This is a TIFF picture; ${AGAIN}.`,
  unknown: 'This is not a picture, whatever its name says. Choose a photo (JPEG or PNG).',
};

/** A PNG is opened whole, and one of sixteen bits twice over. */
const PNG_MOST_PIXELS = 24_000_000;

/** Why these bytes can't become a photo, in words; null when nothing in their header stands against it. */
export function photoFault(bytes: Buffer): string | null {
  const header = imageHeader(bytes);
  if (header.kind !== 'jpeg' && header.kind !== 'png') return OTHER_KINDS[header.kind];
  const { widthPx, heightPx, whole } = header;
  const mostPixels =
    header.kind === 'jpeg' ? PHOTO_MOST_PIXELS : header.depth > 8 ? PNG_MOST_PIXELS / 2 : PNG_MOST_PIXELS;
  if (widthPx * heightPx > mostPixels) {
    const megapixels = Math.ceil((widthPx * heightPx) / 1e6);
    return `This picture is ${widthPx} × ${heightPx} pixels (${megapixels} megapixels); at most ${mostPixels / 1e6} megapixels are taken of its kind. Make it smaller and send it again.`;
  }
  // The lines of an interlaced one can unfold to any size: its header doesn't bound them.
  if (header.kind === 'png' && header.interlaced)
    return `This is an interlaced PNG, which is not taken; save it without interlacing, or ${AGAIN.replace(' or PNG', '')}.`;
  return whole ? null : 'This picture was cut short on its way or when it was saved. Send it again.';
}
