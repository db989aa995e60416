import { chooseFile } from '@/lib/pick-file.web';
import type { PickedPicture } from '@/lib/picked';

/** Lets the reader choose or take a picture; null when they think better of it. */
export async function pickPicture(): Promise<PickedPicture | null> {
  const file = await chooseFile('image/jpeg,image/png,image/*');
  return file ? { name: file.name, file } : null;
}

const SHRINK_FROM_PIXELS = 4_000_000;
const LONGEST_PX = 2000;
const QUALITY = 0.87;

const toBlob = (canvas: HTMLCanvasElement): Promise<Blob | null> =>
  new Promise((resolve) => canvas.toBlob(resolve, 'image/jpeg', QUALITY));

/**
 * A large picture made smaller before it is sent, turned as it is meant to be seen. One this browser can't open is sent
 * as it is: the server says in words what is wrong with it.
 */
export async function shrunk(picture: PickedPicture): Promise<PickedPicture> {
  const bitmap = await createImageBitmap(picture.file, { imageOrientation: 'from-image' }).catch(() => null);
  if (!bitmap) return picture;
  const { width, height } = bitmap;
  if (width * height <= SHRINK_FROM_PIXELS) {
    bitmap.close();
    return picture;
  }
  const scale = LONGEST_PX / Math.max(width, height);
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(width * scale);
  canvas.height = Math.round(height * scale);
  const pen = canvas.getContext('2d');
  pen?.drawImage(bitmap, 0, 0, canvas.width, canvas.height);
  bitmap.close();
  const small = pen ? await toBlob(canvas) : null;
  return small ? { name: picture.name.replace(/\.\w+$/, '.jpg'), file: small } : picture;
}
