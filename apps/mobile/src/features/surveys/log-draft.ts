import type { LogColumns, LogOptions } from '@mereward/shared/surveys/log-contract';
import { z } from 'zod';
import { typedNumber, typedNumberOrNothing } from '@/lib/typed-schemas';

const column = z.string(); // which of the file's columns, counted from 0; nothing: not in the file
const optional = <T extends string>(keys: readonly [T, ...T[]]) => z.enum(['', ...keys]);

/** How a log is to be read, as it is typed. */
export const LogDraft = z.object({
  depthFrom: z.string(),
  depthMeans: z.enum(['depth', 'bed_height']),
  waterHeight: typedNumber({ min: -500, max: 9000, unit: 'm', what: 'The height of the surface' }),
  depthUnit: optional(['m', 'ft', 'fathom']),
  lat: column,
  lon: column,
  depth: column,
  time: column,
  decimal: optional(['point', 'comma']),
  transducer: typedNumber({ min: 0, max: 5, unit: 'm', what: 'The depth of the transducer' }),
  gap: typedNumber({ min: 1, max: 60, unit: 's', what: 'The gap between fixes' }),
  depthSigma: typedNumber({ min: 0.01, max: 2, unit: 'm', what: 'The error of a depth' }),
  depthShare: typedNumber({ min: 0, max: 20, unit: '%', what: 'The share of the depth' }),
  positionSigma: typedNumberOrNothing({ min: 0.01, max: 20, unit: 'm', what: 'The error of a place' }),
  outside: typedNumber({ min: 0, max: 100, unit: 'm', what: 'The distance outside' }),
  level: z.enum(['by_hour', 'at_start']),
});
export type LogTyped = z.input<typeof LogDraft>;
export type LogRead = z.output<typeof LogDraft>;

const COLUMNS = ['lat', 'lon', 'depth', 'time'] as const;

const columnText = (at: number | undefined): string => (at === undefined ? '' : String(at));
const shareAsPercent = (share: number): string => String(Number((share * 100).toFixed(3)));

/** Options as a form begins with them. */
export function typedLog(options: LogOptions): LogTyped {
  const { columns } = options;
  return {
    depthFrom: options.depthFrom ?? '',
    depthMeans: options.depthMeans,
    waterHeight: String(options.waterHeightM),
    depthUnit: options.depthUnit ?? '',
    lat: columnText(columns?.lat),
    lon: columnText(columns?.lon),
    depth: columnText(columns?.depth),
    time: columnText(columns?.time),
    decimal: options.decimal ?? '',
    transducer: String(options.transducerM),
    gap: String(options.gapS),
    depthSigma: String(options.depthSigmaM),
    depthShare: shareAsPercent(options.depthSigmaShare),
    positionSigma: options.positionSigmaM === null ? '' : String(options.positionSigmaM),
    outside: String(options.outsideM),
    level: options.level,
  };
}

/** The options that a filled form means; nothing chosen means: guess. */
export function logOptionsOf(read: LogRead): LogOptions {
  const columns: LogColumns = {};
  for (const each of COLUMNS) if (read[each] !== '') columns[each] = Number(read[each]);
  return {
    depthFrom: read.depthFrom === '' ? null : read.depthFrom,
    depthMeans: read.depthMeans,
    waterHeightM: read.waterHeight,
    depthUnit: read.depthUnit === '' ? null : read.depthUnit,
    columns: Object.keys(columns).length > 0 ? columns : null,
    decimal: read.decimal === '' ? null : read.decimal,
    transducerM: read.transducer,
    gapS: read.gap,
    depthSigmaM: read.depthSigma,
    depthSigmaShare: read.depthShare / 100,
    positionSigmaM: read.positionSigma,
    outsideM: read.outside,
    level: read.level,
  };
}
