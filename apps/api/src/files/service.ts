import { Photo } from '@mereward/db/entities/files/photo';
import type { AddPhoto, PhotoView } from '@mereward/shared/files/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { createHash } from 'node:crypto';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat } from '../repeat';
import { photoFault } from './photo-fault';
import { PHOTO_KEEPERS, PHOTO_STAFF } from './policy';
import { photoView } from './queries';
import { photoFile, photoFolder } from './file-key';
import type { FileStore } from './store';

/** What a photo is of: a peg or a far-bank mark of a fishery. */
export type PhotoSubject = { fisheryId: string; pegId: string | null; markId: string | null };

const MOST_OF_ONE = 24;

/** Refuses those who may not add photos here; asked before a file is received, and again when it is kept. */
export function allowPhotos({ actor }: Ctx, { fisheryId, pegId }: PhotoSubject): void {
  allowOnly(actor, { fisheryId, what: pegId === null ? 'mark' : 'peg' }, PHOTO_KEEPERS);
}

type Sent = { input: AddPhoto; bytes: Buffer; subject: PhotoSubject };

/** Keeps a photo as it was sent until a thread has turned it, resized it and taken its tags off. */
export async function keepPhoto(ctx: Ctx, sent: Sent, store: FileStore): Promise<PhotoView> {
  const { tx, actor, now, jobs } = ctx;
  const { input, bytes, subject } = sent;
  allowPhotos(ctx, subject);
  const fault = photoFault(bytes);
  if (fault !== null) throw new Problem('invalid', fault, { errors: [{ pointer: '/photo', detail: fault }] });
  refuseWrongDay(input, now);
  const addedBy = accountOf(actor);
  const sha256 = createHash('sha256').update(bytes).digest();
  const known = await tx.findOneBy(Photo, { id: input.id });
  if (known) return repeated({ ...sent, sha256 }, addedBy, known);
  await refuseTooMany(ctx, subject);
  const row = { ...input, ...subject, state: 'waiting' as const, sha256, addedBy, addedAt: now };
  if (!(await insertOnce(tx, Photo, row))) {
    const kept = await tx.findOneByOrFail(Photo, { id: input.id });
    return repeated({ ...sent, sha256 }, addedBy, kept);
  }
  await store.write(photoFile(input.id, 'original'), bytes);
  await jobs.send(tx, 'photo.resize', { photoId: input.id });
  return photoView(await tx.findOneByOrFail(Photo, { id: input.id }));
}

function repeated(sent: Sent & { sha256: Buffer }, by: string, kept: Photo): PhotoView {
  if (kept.fisheryId !== sent.subject.fisheryId) throw notFound('photo');
  const content = (photo: Pick<Photo, 'pegId' | 'markId' | 'caption' | 'takenOn' | 'sha256'>) => ({
    pegId: photo.pegId,
    markId: photo.markId,
    caption: photo.caption,
    takenOn: photo.takenOn,
    sha256: photo.sha256.toString('hex'),
  });
  const asked = { ...sent.subject, ...sent.input, sha256: sent.sha256 };
  mustRepeat({ by, content: content(asked) }, { by: kept.addedBy, content: content(kept) });
  return photoView(kept);
}

const EARLIEST_DAY = '1900-01-01';
const DAY_MS = 86_400_000; // the day may have begun already where the picture was taken

function refuseWrongDay({ takenOn }: AddPhoto, now: Date): void {
  const latestDay = new Date(now.getTime() + DAY_MS).toISOString().slice(0, 10);
  if (takenOn === null || (takenOn >= EARLIEST_DAY && takenOn <= latestDay)) return;
  const detail = takenOn < EARLIEST_DAY ? 'This day lies before 1900.' : 'This day lies in the future.';
  throw new Problem('invalid', 'The photo can’t have been taken on that day', {
    detail: 'Put the day right, or leave it out, and send the photo again.',
    errors: [{ pointer: '/takenOn', detail }],
  });
}

async function refuseTooMany({ tx }: Ctx, { pegId, markId }: PhotoSubject): Promise<void> {
  const count = await tx.countBy(Photo, pegId === null ? { markId: markId ?? '' } : { pegId });
  if (count < MOST_OF_ONE) return;
  throw new Problem('conflict', `There are ${count} photos here already`, {
    detail: 'Take an old one away first.',
  });
}

/** One photo: to everybody when it is ready, before that to the fishery's staff. */
export async function photoOf({ tx, actor }: Ctx, photoId: string): Promise<PhotoView> {
  const photo = await tx.findOneBy(Photo, { id: photoId });
  if (!photo) throw notFound('photo');
  if (photo.state !== 'ready' && !holdsAny(actor, photo.fisheryId, PHOTO_STAFF)) throw notFound('photo');
  return photoView(photo);
}

/** Takes a photo away, and its files once this is committed. */
export async function removePhoto({ tx, actor, jobs }: Ctx, photoId: string): Promise<void> {
  const photo = await tx.findOneBy(Photo, { id: photoId });
  if (!photo) throw notFound('photo');
  allowOnly(actor, { fisheryId: photo.fisheryId, what: 'photo' }, PHOTO_KEEPERS);
  await tx.delete(Photo, { id: photoId });
  await jobs.send(tx, 'files.remove', { folder: photoFolder(photoId) });
}
