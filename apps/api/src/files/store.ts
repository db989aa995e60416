import type { Readable } from 'node:stream';
import type { Config } from '../config';
import { openDiskStore } from './disk-store';
import type { FileKey } from './file-key';
import { openBucketStore } from './bucket-store';

/** A whole file's length, and a mark that changes with what is in it (RFC 9110 §8.8.3, with its quotes). */
export type FileAbout = { sizeBytes: number; etag: string };
/** A part of a file, first and last byte, both of them in it. */
export type Span = { start: number; end: number };
export type OpenedFile = FileAbout & { stream: Readable };

/**
 * Where bytes are kept: a folder on disk, or a bucket of an S3-compatible store. A file is there whole or not at
 * all. A store that can't be reached throws a Problem in words; what isn't there is null.
 */
export type FileStore = {
  write: (key: FileKey, bytes: Uint8Array) => Promise<void>;
  about: (key: FileKey) => Promise<FileAbout | null>;
  open: (key: FileKey, span?: Span) => Promise<OpenedFile | null>;
  remove: (key: FileKey) => Promise<void>;
  /** Every file whose key begins with the folder's. */
  removeFolder: (folder: FileKey) => Promise<void>;
  /** Throws when files can't be kept here. */
  check: () => Promise<void>;
};

const STORES = new WeakMap<Config, FileStore>();

/** The store the settings name: a bucket when there is one, else a folder. */
export function fileStoreOf(config: Config): FileStore {
  const known = STORES.get(config);
  if (known) return known;
  const store = config.filesBucket ? openBucketStore(config.filesBucket) : openDiskStore(config.filesDir);
  STORES.set(config, store);
  return store;
}

/** A file from its first byte to its last; null when there is none. What comes broken off is thrown. */
export async function readWhole(store: FileStore, key: FileKey): Promise<Uint8Array<ArrayBuffer> | null> {
  const opened = await store.open(key);
  if (!opened) return null;
  const bytes = new Uint8Array(opened.sizeBytes);
  let at = 0;
  for await (const chunk of opened.stream) {
    const piece = Buffer.from(chunk);
    if (at + piece.length > bytes.length) throw new Error('a file was longer than its store said');
    bytes.set(piece, at);
    at += piece.length;
  }
  if (at !== bytes.length) throw new Error(`a file broke off after ${at} of ${bytes.length} bytes`);
  return bytes;
}
