import { Problem } from '@mereward/shared/problems/problem';
import type { Request, Response } from 'express';
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
  if (coming >= MOST_AT_ONCE)
    throw new Problem('too-many', 'Several files are being received just now', {
      detail: 'Wait a moment, then send it again.',
    });
  coming += 1;
  try {
    await received(req, res, wanted);
  } finally {
    coming -= 1;
  }
  if (!req.file)
    throw new Problem('invalid', 'There was no file in what was sent', {
      detail: 'Choose a file and send it again.',
      errors: [{ pointer: `/${wanted.field}`, detail: 'No file.' }],
    });
  return { bytes: req.file.buffer, fields: { ...req.body } };
}

function received(req: Request, res: Response, wanted: Wanted): Promise<void> {
  const read = multer({
    storage: multer.memoryStorage(),
    limits: {
      fileSize: wanted.mostBytes,
      files: 1,
      fields: 10,
      fieldSize: 4096,
      fieldNameSize: 100,
      parts: 12,
      headerPairs: 20,
    },
  }).single(wanted.field);
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

function asProblem(error: unknown, wanted: Wanted): Problem {
  if (error instanceof Problem) return error;
  const code = error instanceof multer.MulterError ? error.code : null;
  if (code === 'LIMIT_FILE_SIZE') return tooLarge(wanted);
  return new Problem('invalid', 'The file could not be read out of what was sent', {
    detail: `Send one file, in the field “${wanted.field}”, as multipart form data.`,
  });
}
