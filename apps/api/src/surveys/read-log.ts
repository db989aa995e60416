import type { Outline } from '@mereward/shared/geometry/polygon';
import { readCsvLog } from '@mereward/shared/surveys/csv-log';
import { readFileText } from '@mereward/shared/surveys/file-text';
import { readGeojsonLog } from '@mereward/shared/surveys/geojson-log';
import { readGpxLog } from '@mereward/shared/surveys/gpx-log';
import type { LogFormat, LogOptions } from '@mereward/shared/surveys/log-contract';
import { LogFaults, refuseFile, type LogRead } from '@mereward/shared/surveys/log-point';
import { siftLog, type LogSifted } from '@mereward/shared/surveys/log-preview';
import type { LogGround } from '@mereward/shared/surveys/log-sieve';
import { readNmeaLog } from '@mereward/shared/surveys/nmea-log';
import { readTable, TableFault } from './csv-table';
import { gpxPoints } from './gpx-points';

export type LogFile = { name: string; bytes: Uint8Array };
export type Tell = (step: string, share: number) => void;
export type LogSource = {
  files: readonly LogFile[];
  options: LogOptions;
  ground: LogGround & { outline: Outline; visitDayMs: number };
};

/**
 * Reads the files of one log together, whatever open kind they are of, and leaves out what can't be used. Throws
 * LogRefusal, with words for whoever brought them, when nothing can be read at all.
 */
export function readLog({ files, options, ground }: LogSource, tell: Tell): LogSifted {
  const faults = new LogFaults();
  const read = readFiles({ files, options, ground }, { faults, tell });
  tell('Comparing with the lake', 0.8);
  const sizes = files.map(({ name, bytes }) => ({ name, bytes: bytes.length }));
  const sifted = siftLog(read, ground, { files: sizes, faults });
  tell('Comparing with the lake', 1);
  return sifted;
}

type Work = { faults: LogFaults; tell: Tell };

function readFiles({ files, options, ground }: LogSource, { faults, tell }: Work): LogRead {
  const format = sameFormat(files);
  const reading = (i: number) => (share: number) =>
    tell(`Reading ${files[i]?.name ?? ''}`, (0.8 * (i + share)) / files.length);
  const texts = files.map((file, i) => {
    reading(i)(0);
    return { name: file.name, text: textOf(file, format) };
  });
  switch (format) {
    case 'nmea':
      return readNmeaLog(texts, options, {
        faults,
        visitDayMs: ground.visitDayMs,
        tell: (i, share) => reading(i)(share),
      });
    case 'geojson':
      return readGeojsonLog(texts, options, faults);
    case 'gpx':
      return readGpxLog(
        texts.map(({ name, text }, i) => gpxPoints(name, text, reading(i))),
        options,
        faults,
      );
    case 'csv':
      return readCsvLog(
        texts.map(({ name, text }) => ({ name, ...tableOf(name, text) })),
        options,
        faults,
      );
  }
}

function tableOf(name: string, text: string) {
  try {
    return readTable(text, 'sounding');
  } catch (error) {
    if (!(error instanceof TableFault)) throw error;
    return refuseFile(name, error.message);
  }
}

function sameFormat(files: readonly LogFile[]): LogFormat {
  const [first, ...others] = files.map((file) => ({ name: file.name, format: formatOf(file) }));
  if (!first) return refuseFile('The log', 'There is no file in it.');
  for (const { name, format } of others)
    if (format !== first.format)
      refuseFile(
        name,
        `It is ${KIND_WORDS[format]} and ${first.name} is ${KIND_WORDS[first.format]}. Bring one kind at a time.`,
      );
  return first.format;
}

const KIND_WORDS: Readonly<Record<LogFormat, string>> = {
  nmea: 'NMEA 0183',
  gpx: 'GPX',
  geojson: 'GeoJSON',
  csv: 'a table',
};

const HEAD = 64 * 1024;

/** The kind of a file, by what it holds; its name is not asked. */
export function formatOf({ name, bytes }: LogFile): LogFormat {
  if (bytes.length === 0) refuseFile(name, 'The file is empty: there is nothing in it to read.');
  const head = latin(bytes.subarray(0, HEAD)).replace(/\0/g, '');
  if (/^[$!][A-Z]{2}[A-Z0-9]{3},/m.test(head)) return 'nmea';
  const start = head.replace(/^(\u00EF\u00BB\u00BF|\u00FF\u00FE|\u00FE\u00FF)/, '').trimStart();
  if (start.startsWith('<')) return 'gpx';
  if (start.startsWith('{') || start.startsWith('[')) return 'geojson';
  return 'csv';
}

const latin = (bytes: Uint8Array): string =>
  Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength).toString('latin1');

/** NMEA is ASCII, and a damaged line of it must not spoil the others: any byte is read. The rest must be UTF-8. */
function textOf({ name, bytes }: LogFile, format: LogFormat): string {
  if (format === 'nmea') return latin(bytes);
  const read = readFileText(bytes);
  if (!read.ok) refuseFile(name, read.reason);
  return read.text.replace(/^\uFEFF/, '');
}
