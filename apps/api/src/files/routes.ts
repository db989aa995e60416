import { PhotoView } from '@mereward/shared/files/contract';
import type { Request, Response } from 'express';
import { notFound } from '../http/deny';
import { deed, raw, read, type Route } from '../http/route';
import { serverOf } from '../http/server';
import { photoOf, removePhoto } from './service';
import { photoFile, type PhotoPart } from './file-key';
import { serveFile } from './serve-file';
import { fileStoreOf } from './store';
import { z } from 'zod';

const Id = z.uuid();

function photoId(req: Request): string {
  const id = Id.safeParse(req.params['photoId']);
  if (!id.success) throw notFound('photo');
  return id.data;
}

/** A picture never changes under its address, so it may be kept for a year without asking again. */
const serve = (part: PhotoPart) => (req: Request, res: Response) =>
  serveFile(req, res, {
    store: fileStoreOf(serverOf(req).config),
    key: photoFile(photoId(req), part),
    type: 'image/jpeg',
    what: 'photo',
    cacheControl: 'public, max-age=31536000, immutable',
  });

const picture = (part: 'small.jpg' | 'large.jpg'): Route =>
  raw(
    {
      method: 'get',
      path: `/photos/:photoId/${part}`,
      summary: `A photo, ${part === 'small.jpg' ? 400 : 1600} px on its longer side`,
      signIn: 'open',
      answerType: 'image/jpeg',
    },
    serve(part),
  );

export const fileRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/photos/:photoId',
      summary: 'How a photo stands',
      signIn: 'open',
      answer: PhotoView,
    },
    (ctx, { id }) => photoOf(ctx, id('photoId')),
  ),
  deed(
    { method: 'delete', path: '/photos/:photoId', summary: 'Take a photo away', signIn: 'needed' },
    (ctx, { id }) => removePhoto(ctx, id('photoId')),
  ),
  picture('small.jpg'),
  picture('large.jpg'),
];
