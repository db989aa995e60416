import { LakePicture } from '@mereward/db/entities/lakes/lake-picture';
import { TRACING_PX } from '@mereward/shared/lakes/picture-contract';
import { z } from 'zod';
import { pictureFile, pictureFolder, type PhotoPart } from '../files/file-key';
import { makeReady, type Outcome } from '../files/make-ready';
import { fileStoreOf } from '../files/store';
import type { Handler } from '../jobs/worker';

const Payload = z.object({ pictureId: z.uuid() });

/** Turns and resizes one picture from above to the size it is traced at. */
export const resizeLakePicture: Handler = ({ payload, attempt }, { source, config }) => {
  const { pictureId } = Payload.parse(payload);
  const row = { id: pictureId, state: 'waiting' as const };
  const waiting = {
    folder: pictureFolder(pictureId),
    fileOf: (part: PhotoPart) => pictureFile(pictureId, part),
    waits: () => source.manager.existsBy(LakePicture, row),
    settle: async (outcome: Outcome) =>
      (await source.manager.update(LakePicture, row, outcome)).affected === 1,
  };
  return makeReady(fileStoreOf(config), waiting, { attempt, largePx: TRACING_PX });
};
