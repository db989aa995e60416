import { z } from 'zod';
import { Position, Version } from '../fisheries/contract';

/** Shown where a picture is picked, before it is sent (never behind a tooltip). */
export const PICTURE_CAUTION =
  'Use only pictures you have the right to use: your own, or one whose owner lets you draw from it. It is shown to ' +
  'nobody but those who may change this lake. Where and with what it was taken is removed from it here.';

/** The longer side a picture is kept at for tracing, px: at most about ten megapixels. */
export const TRACING_PX = 3200;

const FitKind = z.enum(['similarity', 'affine']);

/** A pixel of the kept picture, right and down from its top left corner, and the known place it shows. */
export const PicturePoint = z.strictObject({
  label: z.string().trim().min(1).max(60), // "Peg FO7", "the corner of the sluice"
  xPx: z.number().min(0).max(TRACING_PX),
  yPx: z.number().min(0).max(TRACING_PX),
  position: Position,
});
export type PicturePoint = z.infer<typeof PicturePoint>;

/** How the picture lies in the lake's plane: xM = xx·xPx + xy·yPx + x0, yM = yx·xPx + yy·yPx + y0. */
export const PictureTransform = z.object({
  xx: z.number(),
  xy: z.number(),
  x0: z.number(),
  yx: z.number(),
  yy: z.number(),
  y0: z.number(),
});

export const LakePictureView = z.object({
  id: z.uuid(),
  lakeId: z.uuid(),
  state: z.enum(['waiting', 'ready', 'refused']),
  refusal: z.string().nullable(),
  caption: z.string(),
  widthPx: z.int().nullable(), // of the kept picture
  heightPx: z.int().nullable(),
  fit: FitKind,
  points: z.array(PicturePoint),
  /** Null until enough points say how it lies. */
  placed: z.object({ transform: PictureTransform, rmsM: z.number() }).nullable(),
  version: z.int(),
});
export type LakePictureView = z.infer<typeof LakePictureView>;
/** GET /api/lakes/:lakeId/pictures (who may change the lake), newest first. */
export const LakePictureList = z.object({ pictures: z.array(LakePictureView) });
export type LakePictureList = z.infer<typeof LakePictureList>;

/**
 * POST /api/lakes/:lakeId/pictures: multipart, field `picture`, with `id` and `caption`. 202 LakePictureView, `waiting`
 * until it is turned and resized. GET /api/pictures/:pictureId tells how it went; DELETE takes it away;
 * GET /api/pictures/:pictureId/large.jpg and small.jpg are the picture.
 */
export const AddLakePicture = z.strictObject({ id: z.uuid(), caption: z.string().trim().max(200) });
export type AddLakePicture = z.infer<typeof AddLakePicture>;

/** PUT /api/pictures/:pictureId/points: what is known of it, all of it anew. */
export const FixLakePicture = z.strictObject({
  fit: FitKind,
  points: z.array(PicturePoint).max(40),
  version: Version,
});
export type FixLakePicture = z.infer<typeof FixLakePicture>;
