import { LogRefusal, type LogPoint } from '@mereward/shared/surveys/log-point';
import type { LogPreview } from '@mereward/shared/surveys/log-contract';
import { parentPort, workerData } from 'node:worker_threads';
import { gunzipSync } from 'node:zlib';
import { stepAside } from '../jobs/step-aside';
import { readLog, type LogSource } from './read-log';

/** A stretch of soundings, each column as PostgreSQL writes an array. */
export type SoundingRows = { count: number; lon: string; lat: string; depthM: string; atS: string };

export type LogWord =
  | { kind: 'progress'; step: string; share: number }
  | { kind: 'read'; preview: LogPreview; rows: SoundingRows[] }
  | { kind: 'refused'; words: string };

/** What the thread is given: the files packed, and whether their soundings are wanted. */
export type LogWork = Omit<LogSource, 'files'> & {
  packed: { name: string; bytes: Uint8Array }[];
  keep: boolean;
};

const ROWS_AT_ONCE = 5000;

function say(word: LogWord): void {
  parentPort?.postMessage(word);
}

function rowsOf(points: readonly LogPoint[]): SoundingRows[] {
  const rows: SoundingRows[] = [];
  for (let from = 0; from < points.length; from += ROWS_AT_ONCE) {
    const part = points.slice(from, from + ROWS_AT_ONCE);
    const column = (of: (point: LogPoint) => number | null): string =>
      `{${part.map((point) => of(point) ?? 'NULL').join(',')}}`;
    rows.push({
      count: part.length,
      lon: column(({ lon }) => lon),
      lat: column(({ lat }) => lat),
      depthM: column(({ depthM }) => depthM),
      atS: column(({ atMs }) => (atMs === null ? null : atMs / 1000)),
    });
  }
  return rows;
}

stepAside();
const { packed, keep, ...work } = workerData as LogWork; // the only thing that opens this thread is log-jobs
try {
  const files = packed.map(({ name, bytes }) => ({ name, bytes: gunzipSync(bytes) }));
  const { kept, preview } = readLog({ ...work, files }, (step, share) =>
    say({ kind: 'progress', step, share }),
  );
  say({ kind: 'read', preview, rows: keep ? rowsOf(kept) : [] });
} catch (error) {
  if (!(error instanceof LogRefusal)) throw error;
  say({ kind: 'refused', words: error.message });
}
