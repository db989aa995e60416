import { chooseFile } from '@/lib/pick-file.web';
import type { PickedPicture } from '@/lib/picked';

/** Lets the reader choose or take a picture; null when they think better of it. */
export async function pickPicture(): Promise<PickedPicture | null> {
  const file = await chooseFile('image/jpeg,image/png,image/*');
  return file ? { name: file.name, file } : null;
}

const LONGEST_PX = 2000;
/** A picture of fewer pixels than a square of the longest side is sent as it is. */
const mayStay = (width: number, height: number, longestPx: number): boolean =>
  width * height <= longestPx ** 2;
const QUALITY = 0.87;

const toBlob = (canvas: HTMLCanvasElement): Promise<Blob | null> =>
  new Promise((resolve) => canvas.toBlob(resolve, 'image/jpeg', QUALITY));

/**
 * A large picture made smaller before it is sent, turned as it is meant to be seen. One this browser can't open is sent
 * as it is: the server says in words what is wrong with it. `longestPx` is what its longer side becomes.
 */
export async function shrunk(picture: PickedPicture, longestPx = LONGEST_PX): Promise<PickedPicture> {
  const bitmap = await createImageBitmap(picture.file, { imageOrientation: 'from-image' }).catch(() => null);
  if (!bitmap) return picture;
  const { width, height } = bitmap;
  if (mayStay(width, height, longestPx)) {
    bitmap.close();
    return picture;
  }
  const scale = longestPx / Math.max(width, height);
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(width * scale);
  canvas.height = Math.round(height * scale);
  const pen = canvas.getContext('2d');
  pen?.drawImage(bitmap, 0, 0, canvas.width, canvas.height);
  bitmap.close();
  const small = pen ? await toBlob(canvas) : null;
  return small ? { name: picture.name.replace(/\.\w+$/, '.jpg'), file: small } : picture;
}
