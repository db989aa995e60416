import { AddPhoto, PHOTO_MOST_BYTES, PhotoView } from '@mereward/shared/files/contract';
import type { Request, Response } from 'express';
import type { Ctx } from '../ctx';
import { allowPhotos, keepPhoto, type PhotoSubject } from '../files/service';
import { fileStoreOf } from '../files/store';
import { parse } from '../http/parse';
import { raw, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { serverOf } from '../http/server';
import { inTransaction, reading } from '../http/transaction';
import { receiveFile } from '../http/upload';
import { findMark, findPeg } from './found';

type FindSubject = (ctx: Ctx, id: string) => Promise<PhotoSubject>;

const ofPeg: FindSubject = async ({ tx }, pegId) => {
  const { lake } = await findPeg(tx, pegId);
  return { fisheryId: lake.fisheryId, pegId, markId: null };
};
const ofMark: FindSubject = async ({ tx }, markId) => {
  const { lake } = await findMark(tx, markId);
  return { fisheryId: lake.fisheryId, pegId: null, markId };
};

/** Asks who may before the file comes in, and once more when it is kept. */
const add = (find: FindSubject, name: 'peg' | 'mark') => async (req: Request, res: Response) => {
  const id = idIn(req, `${name}Id`);
  await reading(req, async (ctx) => allowPhotos(ctx, await find(ctx, id)));
  const { bytes, fields } = await receiveFile(req, res, { field: 'photo', mostBytes: PHOTO_MOST_BYTES });
  const takenOn = fields['takenOn'] || null; // a form has no null
  const input = parse(AddPhoto, { caption: '', ...fields, takenOn });
  const store = fileStoreOf(serverOf(req).config);
  const view = await inTransaction(req, async (ctx) =>
    keepPhoto(ctx, { input, bytes, subject: await find(ctx, id) }, store),
  );
  res.status(202).json(view);
};

const route = (name: 'peg' | 'mark', find: FindSubject): Route =>
  raw(
    {
      method: 'post',
      path: `/${name}s/:${name}Id/photos`,
      summary: `Add a photo of a ${name} (multipart form data: photo, id, caption, takenOn)`,
      signIn: 'needed',
      answer: PhotoView,
      status: 202,
    },
    add(find, name),
  );

export const photoRoutes: Route[] = [route('peg', ofPeg), route('mark', ofMark)];
