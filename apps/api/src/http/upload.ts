import { Problem } from '@mereward/shared/problems/problem';
import type { Request, Response } from 'express';
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import multer from 'multer';

export type Upload = { bytes: Buffer; fields: Record<string, string> };

type Wanted = { field: string; mostBytes: number };

/** Room for the other fields and the boundaries round the file. */
const SLACK_BYTES = 64 * 1024;
/** Each may hold a whole file in memory while it comes in. */
const MOST_AT_ONCE = 6;
let coming = 0;

/**
 * Receives one file of a multipart request into memory. Too large a file is refused as soon as that is known —
 * by its stated length, else by counting — and the rest of it is let run past, kept nowhere.
 */
export async function receiveFile(req: Request, res: Response, wanted: Wanted): Promise<Upload> {
  const mostBytes = wanted.mostBytes + SLACK_BYTES;
  if (Number(req.get('content-length') ?? 0) > mostBytes) throw tooLarge(wanted);
  await oneOfFew(() => received(req, res, { ...wanted, mostFiles: 1, storage: multer.memoryStorage() }));
  const [file] = filesOf(req, wanted);
  return { bytes: file.buffer, fields: { ...req.body } };
}

export type FileOnDisk = { name: string; path: string };
export type Uploads = { files: FileOnDisk[]; fields: Record<string, string> };

/**
 * Receives the files of a multipart request onto the disk, `mostBytes` counting them all, hands them to `use`, and
 * takes them off the disk again whatever comes of it.
 */
export async function receiveFiles<T>(
  { req, res, wanted }: { req: Request; res: Response; wanted: Wanted & { mostFiles: number } },
  use: (uploads: Uploads) => Promise<T>,
): Promise<T> {
  if (Number(req.get('content-length') ?? 0) > wanted.mostBytes + SLACK_BYTES) throw tooLarge(wanted);
  const folder = await mkdtemp(join(tmpdir(), 'received-'));
  try {
    const storage = multer.diskStorage({
      destination: folder,
      filename: (_req, _file, named) => named(null, randomUUID()),
    });
    await oneOfFew(() => received(req, res, { ...wanted, storage }));
    const files = filesOf(req, wanted).map(({ originalname, path }) => ({ name: originalname, path }));
    return await use({ files, fields: { ...req.body } });
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function oneOfFew(receive: () => Promise<void>): Promise<void> {
  if (coming >= MOST_AT_ONCE)
    throw new Problem('too-many', 'Several files are being received just now', {
      detail: 'Wait a moment, then send it again.',
    });
  coming += 1;
  try {
    await receive();
  } finally {
    coming -= 1;
  }
}

function filesOf({ files }: Request, { field }: Wanted): [Express.Multer.File, ...Express.Multer.File[]] {
  const [first, ...others] = Array.isArray(files) ? files : [];
  if (first) return [first, ...others];
  throw new Problem('invalid', 'There was no file in what was sent', {
    detail: 'Choose a file and send it again.',
    errors: [{ pointer: `/${field}`, detail: 'No file.' }],
  });
}

type Receiving = Wanted & { mostFiles: number; storage: multer.StorageEngine };

function received(req: Request, res: Response, wanted: Receiving): Promise<void> {
  const read = multer({
    storage: wanted.storage,
    defParamCharset: 'utf8',
    limits: {
      fileSize: wanted.mostBytes,
      files: wanted.mostFiles,
      fields: 10,
      fieldSize: 4096,
      fieldNameSize: 100,
      parts: 11 + wanted.mostFiles,
      headerPairs: 20,
    },
  }).array(wanted.field, wanted.mostFiles);
  return new Promise((resolve, reject) => {
    let bytes = 0;
    void read(req, res, (error: unknown) => (error ? reject(asProblem(error, wanted)) : resolve()));
    // multer tells of a file that is too large only when the whole of it has gone past.
    req.on('data', (chunk: Buffer) => {
      bytes += chunk.length;
      if (bytes > wanted.mostBytes + SLACK_BYTES) reject(tooLarge(wanted));
    });
    req.once('close', () => {
      if (!req.complete)
        reject(
          new Problem('invalid', 'The file did not arrive whole', {
            detail: 'Nothing was kept. Send it again.',
          }),
        );
    });
  });
}

const tooLarge = ({ mostBytes }: Wanted): Problem =>
  new Problem('too-large', `This file is larger than ${Math.floor(mostBytes / 1024 / 1024)} MB`, {
    detail: 'Nothing was kept. Make it smaller and send it again.',
  });

function asProblem(error: unknown, wanted: Receiving): Problem {
  if (error instanceof Problem) return error;
  const code = error instanceof multer.MulterError ? error.code : null;
  if (code === 'LIMIT_FILE_SIZE') return tooLarge(wanted);
  return new Problem('invalid', 'The file could not be read out of what was sent', {
    detail:
      wanted.mostFiles === 1
        ? `Send one file, in the field “${wanted.field}”, as multipart form data.`
        : `Send at most ${wanted.mostFiles} files, in the field “${wanted.field}”, as multipart form data.`,
  });
}
