import { randomUUID } from 'node:crypto';
import { constants } from 'node:fs';
import { access, mkdir, open, rename, rm, stat } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import type { Stats } from 'node:fs';
import { storeAway } from './store-away';
import type { FileAbout, FileStore } from './store';

/** Files in a folder of this machine. */
export function openDiskStore(filesDir: string): FileStore {
  const root = resolve(filesDir);
  const pathOf = (key: string): string => join(root, ...key.split('/'));
  return {
    async write(key, bytes) {
      const path = pathOf(key);
      await orAway(async () => {
        await mkdir(dirname(path), { recursive: true });
        await writeWhole(path, bytes);
      });
    },
    about: (key) => orNone(async () => aboutOf(await stat(pathOf(key)))),
    open: (key, span) =>
      orNone(async () => {
        const file = await open(pathOf(key), 'r');
        try {
          const about = aboutOf(await file.stat());
          return { ...about, stream: file.createReadStream(span ?? {}) };
        } catch (error) {
          await file.close();
          throw error;
        }
      }),
    remove: (key) => orAway(() => rm(pathOf(key), { force: true })),
    removeFolder: (folder) => orAway(() => rm(pathOf(folder), { recursive: true, force: true })),
    check: () =>
      orAway(async () => {
        await mkdir(root, { recursive: true });
        await access(root, constants.R_OK | constants.W_OK);
      }),
  };
}

const aboutOf = ({ size, mtimeMs }: Stats): FileAbout => ({
  sizeBytes: size,
  etag: `"${size.toString(16)}-${Math.round(mtimeMs).toString(16)}"`,
});

const isMissing = (error: unknown): boolean =>
  error instanceof Error && 'code' in error && (error.code === 'ENOENT' || error.code === 'ENOTDIR');

async function orNone<T>(read: () => Promise<T>): Promise<T | null> {
  try {
    return await read();
  } catch (error) {
    if (isMissing(error)) return null;
    throw storeAway(error);
  }
}

async function orAway<T>(deed: () => Promise<T>): Promise<T> {
  try {
    return await deed();
  } catch (error) {
    throw storeAway(error);
  }
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
