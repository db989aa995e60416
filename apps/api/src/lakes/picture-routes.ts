import { PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import {
  AddLakePicture,
  FixLakePicture,
  LakePictureList,
  LakePictureView,
} from '@mereward/shared/lakes/picture-contract';
import type { Request, Response } from 'express';
import { pictureFile } from '../files/file-key';
import { serveFile } from '../files/serve-file';
import { fileStoreOf } from '../files/store';
import { parse } from '../http/parse';
import { deed, raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { serverOf } from '../http/server';
import { inTransaction, reading } from '../http/transaction';
import { receiveFile } from '../http/upload';
import { fixPicture, keepPicture, lakeForPictures, pictureOf, picturesOf, removePicture } from './pictures';

const signIn = 'needed';

/** Asks who may before the file comes in, and once more when it is kept. */
async function add(req: Request, res: Response): Promise<void> {
  const lakeId = idIn(req, 'lakeId');
  await reading(req, (ctx) => lakeForPictures(ctx, lakeId));
  const { bytes, fields } = await receiveFile(req, res, { field: 'picture', mostBytes: PHOTO_MOST_BYTES });
  const input = parse(AddLakePicture, { caption: '', ...fields });
  const store = fileStoreOf(serverOf(req).config);
  res.status(202).json(await inTransaction(req, (ctx) => keepPicture(ctx, { lakeId, input, bytes }, store)));
}

/** The picture itself, to those alone who may change the lake: asked at every reading of it. */
const picture = (part: 'small.jpg' | 'large.jpg'): Route =>
  raw(
    {
      method: 'get',
      path: `/pictures/:pictureId/${part}`,
      summary: `A picture to trace over, ${part === 'small.jpg' ? 'small' : 'as large as it is kept'}`,
      signIn,
      answerType: 'image/jpeg',
    },
    async (req, res) => {
      const id = idIn(req, 'pictureId');
      await reading(req, (ctx) => pictureOf(ctx, id));
      await serveFile(req, res, {
        store: fileStoreOf(serverOf(req).config),
        key: pictureFile(id, part),
        type: 'image/jpeg',
        what: 'picture',
        cacheControl: 'private, no-cache', // whose role ends sees it no more
      });
    },
  );

export const pictureRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/pictures',
      summary: 'Pictures to trace a lake over, newest first',
      signIn,
      answer: LakePictureList,
    },
    (ctx, { id }) => picturesOf(ctx, id('lakeId')),
  ),
  raw(
    {
      method: 'post',
      path: '/lakes/:lakeId/pictures',
      summary: 'Add a picture to trace a lake over (multipart form data: picture, id, caption)',
      signIn,
      answer: LakePictureView,
      status: 202,
    },
    add,
  ),
  read(
    {
      method: 'get',
      path: '/pictures/:pictureId',
      summary: 'How a picture stands and lies',
      signIn,
      answer: LakePictureView,
    },
    (ctx, { id }) => pictureOf(ctx, id('pictureId')),
  ),
  deed(
    {
      method: 'put',
      path: '/pictures/:pictureId/points',
      summary: 'Set the known points of a picture',
      signIn,
      body: FixLakePicture,
      answer: LakePictureView,
    },
    (ctx, { id, body }) => fixPicture(ctx, id('pictureId'), body),
  ),
  deed(
    { method: 'delete', path: '/pictures/:pictureId', summary: 'Take a picture away', signIn },
    (ctx, { id }) => removePicture(ctx, id('pictureId')),
  ),
  picture('small.jpg'),
  picture('large.jpg'),
];
