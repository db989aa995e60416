import { z } from 'zod';

/** The largest file taken. A phone's picture is 3–6 MB; clients shrink before sending. */
export const PHOTO_MOST_BYTES = 15 * 1024 * 1024;
/** The most pixels of a JPEG taken (a PNG: 24 million). Clients shrink to 2,000 px before sending. */
export const PHOTO_MOST_PIXELS = 40_000_000;

/** Shown where a photo is picked, before it is sent (never behind a tooltip). */
export const PHOTO_CAUTION =
  'Before you send it: no faces of children, no house keys, no number plates. ' +
  'Where and with what it was taken is removed from the picture here, but what can be seen in it stays.';

export const PhotoView = z.object({
  id: z.uuid(),
  state: z.enum(['waiting', 'ready', 'refused']),
  caption: z.string(),
  takenOn: z.iso.date().nullable(),
  smallUrl: z.string().nullable(),
  largeUrl: z.string().nullable(),
  widthPx: z.int().nullable(), // of the large size
  heightPx: z.int().nullable(),
  refusal: z.string().nullable(),
});
export type PhotoView = z.infer<typeof PhotoView>;

/**
 * POST /api/pegs/:pegId/photos and /api/marks/:markId/photos: multipart, field `photo`, with `id`, `caption`,
 * `takenOn` (empty or absent: not known). 202 PhotoView, `waiting` until it is turned and resized.
 * GET /api/photos/:photoId tells how it went; DELETE takes it away.
 */
export const AddPhoto = z.strictObject({
  id: z.uuid(),
  caption: z.string().trim().max(200),
  takenOn: z.iso.date().nullable(),
});
export type AddPhoto = z.infer<typeof AddPhoto>;
