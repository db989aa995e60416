import { Photo } from '@mereward/db/entities/files/photo';
import { z } from 'zod';
import type { Handler } from '../jobs/worker';
import { photoFile, photoFolder, type PhotoPart } from './file-key';
import { makeReady, type Outcome } from './make-ready';
import { LARGE_PX } from './photo-sizes';
import { fileStoreOf } from './store';

const Payload = z.object({ photoId: z.uuid() });

/** Turns and resizes one photo. */
export const resizePhoto: Handler = ({ payload, attempt }, { source, config }) => {
  const { photoId } = Payload.parse(payload);
  const row = { id: photoId, state: 'waiting' as const };
  const waiting = {
    folder: photoFolder(photoId),
    fileOf: (part: PhotoPart) => photoFile(photoId, part),
    waits: () => source.manager.existsBy(Photo, row),
    settle: async (outcome: Outcome) => (await source.manager.update(Photo, row, outcome)).affected === 1,
  };
  return makeReady(fileStoreOf(config), waiting, { attempt, largePx: LARGE_PX });
};

const Folder = z.object({ folder: z.string().regex(/^(photos|pictures)\/[0-9a-f]{2}\/[0-9a-f-]{36}$/) });

/** Takes away the files of something whose row is gone. Done twice it changes nothing. */
export const removeFiles: Handler = ({ payload }, { config }) =>
  fileStoreOf(config).removeFolder(Folder.parse(payload).folder);
