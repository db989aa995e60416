import { Photo } from '@mereward/db/entities/files/photo';
import type { PhotoView } from '@mereward/shared/files/contract';
import { In, type EntityManager } from 'typeorm';

export const photoUrl = (photoId: string, size: 'small' | 'large'): string =>
  `/api/photos/${photoId}/${size}.jpg`;

/** A photo as its reader sees it: addresses only once there is a picture behind them. */
export function photoView(photo: Photo): PhotoView {
  const ready = photo.state === 'ready';
  return {
    id: photo.id,
    state: photo.state,
    caption: photo.caption,
    takenOn: photo.takenOn,
    smallUrl: ready ? photoUrl(photo.id, 'small') : null,
    largeUrl: ready ? photoUrl(photo.id, 'large') : null,
    widthPx: photo.widthPx,
    heightPx: photo.heightPx,
    refusal: photo.refusal,
  };
}

type Subject = { kind: 'peg' | 'mark'; ids: readonly string[]; staff: boolean };

/**
 * Photos of pegs or marks by their id, newest first. Who is not staff sees only what is ready: a waiting or
 * refused picture is between the fishery and whoever sent it.
 */
export async function photosOf(tx: EntityManager, subject: Subject): Promise<Map<string, PhotoView[]>> {
  const bySubject = new Map<string, PhotoView[]>();
  if (subject.ids.length === 0) return bySubject;
  const column = subject.kind === 'peg' ? 'pegId' : 'markId';
  const photos = await tx.find(Photo, {
    where: { [column]: In([...subject.ids]), ...(subject.staff ? {} : { state: 'ready' as const }) },
    order: { addedAt: 'DESC', id: 'ASC' },
  });
  for (const photo of photos) {
    const subjectId = photo[column];
    if (subjectId) bySubject.set(subjectId, [...(bySubject.get(subjectId) ?? []), photoView(photo)]);
  }
  return bySubject;
}
