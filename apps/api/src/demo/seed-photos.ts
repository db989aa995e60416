import { Photo } from '@mereward/db/entities/files/photo';
import { createHash } from 'node:crypto';
import type { Ctx } from '../ctx';
import { resizePicture } from '../files/resize-picture';
import { photoFile } from '../files/file-key';
import type { FileStore } from '../files/store';
import { FAR_OSTLE_LAKE, OSTLEMERE_ID } from './fishery';
import { paintView } from './paint-view';
import { JOAN } from './people';
import { demoId } from './random';

const PAINTED = new Set(['FO7', 'FO17']);

/** Two pegs' views, painted for the demo and kept as any photo is. */
export async function seedPhotos({ tx, now }: Ctx, store: FileStore): Promise<void> {
  const { Jimp } = await import('jimp'); // heavy, and wanted only here
  for (const peg of FAR_OSTLE_LAKE.pegs.filter(({ details }) => PAINTED.has(details.number))) {
    const { width, height, rgba } = paintView(FAR_OSTLE_LAKE, peg);
    const bytes = await Jimp.fromBitmap({ width, height, data: rgba }).getBuffer('image/jpeg', {
      quality: 88,
    });
    const made = await resizePicture(bytes);
    if (made.kind === 'refused') throw new Error(made.words);
    const id = demoId(`photo ${peg.details.number}`);
    await store.write(photoFile(id, 'large.jpg'), made.large);
    await store.write(photoFile(id, 'small.jpg'), made.small);
    await tx.insert(Photo, {
      id,
      fisheryId: OSTLEMERE_ID,
      pegId: peg.id,
      markId: null,
      caption: `The water from peg ${peg.details.number}, painted for the demo`,
      takenOn: now.toISOString().slice(0, 10),
      state: 'ready',
      refusal: null,
      widthPx: made.widthPx,
      heightPx: made.heightPx,
      sha256: createHash('sha256').update(bytes).digest(),
      addedBy: JOAN.id,
      addedAt: now,
    });
  }
}
