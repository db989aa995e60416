import { randomUUID } from 'node:crypto';
import { mkdir, open, rename, rm } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { z } from 'zod';

export type PhotoPart = 'original' | 'small.jpg' | 'large.jpg';

/** Files on disk. A name is always made here from a row's id: nothing a client sends ever becomes a path. */
export type FileStore = {
  pathOf: (photoId: string, part: PhotoPart) => string;
  write: (photoId: string, part: PhotoPart, bytes: Uint8Array) => Promise<void>;
  remove: (photoId: string, part: PhotoPart) => Promise<void>;
  removeAll: (photoId: string) => Promise<void>;
};

const Id = z.uuid();

export function fileStore(filesDir: string): FileStore {
  const root = resolve(filesDir);
  const pathOf = (photoId: string, part: PhotoPart): string => {
    const id = Id.parse(photoId).toLowerCase();
    return join(root, 'photos', id.slice(0, 2), id, part); // a folder of a hundred thousand is slow to list
  };
  return {
    pathOf,
    async write(photoId, part, bytes) {
      const path = pathOf(photoId, part);
      await mkdir(dirname(path), { recursive: true });
      await writeWhole(path, bytes);
    },
    remove: (photoId, part) => rm(pathOf(photoId, part), { force: true }),
    removeAll: (photoId) => rm(dirname(pathOf(photoId, 'original')), { recursive: true, force: true }),
  };
}

/** Written beside and renamed: a reader sees the old file or the whole new one, also after a crash. */
async function writeWhole(path: string, bytes: Uint8Array): Promise<void> {
  const beside = `${path}.${randomUUID()}.part`;
  try {
    const file = await open(beside, 'w', 0o640);
    try {
      await file.writeFile(bytes);
      await file.sync();
    } finally {
      await file.close();
    }
    await rename(beside, path);
  } catch (error) {
    await rm(beside, { force: true });
    throw error;
  }
}
