import { SoundingFile } from '@mereward/db/entities/surveys/sounding-file';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { Problem } from '@mereward/shared/problems/problem';
import { USUAL_LOG_OPTIONS, type LogView } from '@mereward/shared/surveys/log-contract';
import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { promisify } from 'node:util';
import { gzip } from 'node:zlib';
import { IsNull } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import type { FileOnDisk } from '../http/upload';
import { visitToKeep } from './find-visit';
import { queueLog } from './log-queue';
import { logView } from './log-view';

/** A file as it is kept: packed, with the digest of what it was. */
export type PackedFile = { name: string; bytes: number; sha256: Buffer; packed: Buffer };

const pack = promisify(gzip);
const FASTEST = { level: 1 } as const;

/** Packs the received files one after another: one at a time is held whole. */
export async function packFiles(files: readonly FileOnDisk[]): Promise<PackedFile[]> {
  const packed: PackedFile[] = [];
  for (const { name, path } of files) {
    const bytes = await readFile(path);
    packed.push({
      name: plainName(name),
      bytes: bytes.length,
      sha256: createHash('sha256').update(bytes).digest(),
      packed: await pack(bytes, FASTEST),
    });
  }
  return packed;
}

/** The last part of a name, without letters that no line of text holds. */
function plainName(name: string): string {
  const last = name.split(/[\\/]/).at(-1) ?? '';
  return last.replace(/[\p{Cc}\p{Cs}]/gu, '').slice(-120) || 'unnamed';
}

const digestOfAll = (files: readonly PackedFile[]): Buffer => {
  const digests = files.map(({ sha256 }) => sha256).sort((a, b) => a.compare(b));
  return createHash('sha256').update(Buffer.concat(digests)).digest();
};

/**
 * Keeps the files of a log and queues the first look at them. The same files again, in whatever order and under
 * whatever names, are answered with the log they are already.
 */
export async function bringLog(
  ctx: Ctx,
  visitId: string,
  { id, files }: { id: string; files: readonly PackedFile[] },
): Promise<LogView> {
  const { tx, actor, now, jobs } = ctx;
  const found = await visitToKeep(ctx, visitId); // holds the visit: the same files twice at once are kept once
  const sha256 = digestOfAll(files);
  const known = await tx.findOneBy(SoundingImport, { id });
  if (known && !(known.visitId === visitId && known.sha256.equals(sha256) && known.undoneAt === null))
    throw new Problem('conflict', 'Other files are kept under this id already', {
      detail: 'Nothing was changed. Choose the files again.',
    });
  const same = await tx.findOneBy(SoundingImport, { visitId, sha256, undoneAt: IsNull() });
  if (same) return logView(ctx, { ...found, log: same });
  const sorted = [...files].sort((a, b) => (a.name < b.name ? -1 : 1));
  await tx.query(
    `INSERT INTO sounding_import (id, visit_id, filenames, sha256, options, goal, attempt, state, step, share, updated_at,
                                  imported_by, imported_at)
     VALUES ($1, $2, $3, $4, $5, 'look', gen_random_uuid(), 'looked', '', 0, clock_timestamp(), $6, $7)`,
    [id, visitId, sorted.map(({ name }) => name), sha256, USUAL_LOG_OPTIONS, accountOf(actor), now],
  );
  for (const [seq, { name, bytes, packed }] of sorted.entries())
    await tx.insert(SoundingFile, { importId: id, seq, name, bytes, packed });
  await queueLog(tx, jobs, { logId: id, goal: 'look', options: USUAL_LOG_OPTIONS });
  return logView(ctx, { ...found, log: await tx.findOneByOrFail(SoundingImport, { id }) });
}
