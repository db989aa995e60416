import { z } from 'zod';

/** Where a file lies in a store: `photos/ab/<id>/large.jpg`. Made here from a row's id, never from what a client sends. */
export type FileKey = string;

export type PhotoPart = 'original' | 'small.jpg' | 'large.jpg';

const Id = z.uuid();

/** A folder of a hundred thousand is slow to list, so they are spread by the id's first two letters. */
function folderOf(kind: string, id: string): FileKey {
  const known = Id.parse(id).toLowerCase();
  return `${kind}/${known.slice(0, 2)}/${known}`;
}

/** The folder of one photo's files. */
export const photoFolder = (photoId: string): FileKey => folderOf('photos', photoId);
export const photoFile = (photoId: string, part: PhotoPart): FileKey => `${photoFolder(photoId)}/${part}`;

/** The folder of a picture that a lake is traced over. */
export const pictureFolder = (pictureId: string): FileKey => folderOf('pictures', pictureId);
export const pictureFile = (pictureId: string, part: PhotoPart): FileKey =>
  `${pictureFolder(pictureId)}/${part}`;
