import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import type { LogOptions } from '@mereward/shared/surveys/log-contract';
import { In, IsNull, type EntityManager } from 'typeorm';

/** Soundings as they were read: columns of one length. `atMs` is Unix time, NaN where none was stated. */
export type SoundingColumns = {
  lon: Float64Array;
  lat: Float64Array;
  depthM: Float64Array;
  atMs: Float64Array;
};

/** A log of soundings that a chart is made from. What it holds never changes, so its id decides it. */
export type SourceLog = {
  id: string;
  visitId: string;
  filenames: string[];
  options: LogOptions;
  found: number;
  kept: number;
  soundings: SoundingColumns | null; // null until they are wanted
};

/** The logs taken in at some visits, by their ids, without their soundings. */
export async function logsOf(tx: EntityManager, visitIds: readonly string[]): Promise<SourceLog[]> {
  const logs = await tx.find(SoundingImport, {
    where: { visitId: In(visitIds), state: 'done', undoneAt: IsNull() },
    order: { id: 'ASC' },
  });
  return logs.map(({ id, visitId, filenames, options, report }) => ({
    id,
    visitId,
    filenames,
    options,
    found: report?.found ?? 0,
    kept: report?.kept ?? 0,
    soundings: null,
  }));
}

type Row = { lon: number; lat: number; depthM: number; atMs: number | null };

const ROWS_AT_ONCE = 5000; // the server answers others in between

/** The soundings of a log in the order they were read. */
export async function soundingsOf(tx: EntityManager, { id, kept }: SourceLog): Promise<SoundingColumns> {
  const column = () => new Float64Array(kept);
  const columns = { lon: column(), lat: column(), depthM: column(), atMs: column() };
  let at = 0;
  for (let from = 1; from <= kept; from += ROWS_AT_ONCE) {
    const rows = await tx.query<Row[]>(
      `SELECT lon, lat, depth_as_read_m AS "depthM", extract(epoch FROM observed_at)::float8 * 1000 AS "atMs"
         FROM sounding WHERE import_id = $1 AND seq >= $2 AND seq < $3 ORDER BY seq`,
      [id, from, from + ROWS_AT_ONCE],
    );
    for (const { lon, lat, depthM, atMs } of rows) {
      columns.lon[at] = lon;
      columns.lat[at] = lat;
      columns.depthM[at] = depthM;
      columns.atMs[at++] = atMs ?? Number.NaN;
    }
  }
  if (at !== kept) throw new Error(`The log ${id} holds ${at} soundings and its report says ${kept}`);
  return columns;
}
