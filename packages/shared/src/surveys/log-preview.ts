import type { LogPointView, LogPreview, LogReport } from './log-contract';
import { LeftOutReason, LOG_MOST_SOUNDINGS } from './log-contract';
import { logGrade, logGradeWords } from './log-grade';
import { whereWords, type LogFaults, type LogPoint, type LogRead, UNIT_OF } from './log-point';
import { leftOutWords, sieveLog, type LogGround } from './log-sieve';

const FIRST = 8;
const MOST_SAMPLE = 1500;
const SHOWN_FAULTS = 200;

/** A log read and sieved: what may be taken in, and the words for it. */
export type LogSifted = { kept: LogPoint[]; preview: LogPreview };

export type LogFiles = readonly { name: string; bytes: number }[];

/** Leaves out what can't be used, counts why, and says what the rest is. */
export function siftLog(
  read: LogRead,
  ground: LogGround,
  { files, faults }: { files: LogFiles; faults: LogFaults },
): LogSifted {
  const { points, guessed } = read;
  const reasons = sieveLog(points, guessed, ground);
  const kept = points.filter((_, i) => reasons[i] === null);
  const counts = new Map<LeftOutReason, number>([['no_fix', read.withoutPlace]]);
  for (const reason of reasons) if (reason) counts.set(reason, (counts.get(reason) ?? 0) + 1);
  const positionSigmaM = guessed.positionSigmaM ?? 3;
  const [shallowestM, deepestM] = rangeOf(kept.map(({ depthM }) => depthM));
  const [fromMs, toMs] = rangeOf(kept.flatMap(({ atMs }) => (atMs === null ? [] : [atMs])));
  const meanM = kept.reduce((sum, { depthM }) => sum + depthM, 0) / Math.max(1, kept.length);
  const depthSigmaM = Math.hypot(guessed.depthSigmaM, guessed.depthSigmaShare * meanM);
  const grade = logGrade({ positionM: positionSigmaM, depthM: depthSigmaM, levelKnown: true });
  const report: LogReport = {
    format: read.format,
    files: files.map(({ name, bytes }, i) => ({ name, bytes, words: read.fileWords[i] ?? '' })),
    joined: read.joined,
    found: points.length + read.withoutPlace,
    kept: kept.length,
    leftOut: LeftOutReason.options.flatMap((reason) => {
      const count = counts.get(reason) ?? 0;
      return count === 0 ? [] : [{ reason, count, words: leftOutWords(reason, count, guessed) }];
    }),
    faultCount: faults.count,
    faults: faults.list.slice(0, SHOWN_FAULTS),
    cautions: [...read.cautions, ...cautionsOf(read, kept.length)],
    grade,
    gradeWords: logGradeWords(grade, positionSigmaM),
    from: fromMs === null ? null : new Date(fromMs).toISOString(),
    to: toMs === null ? null : new Date(toMs).toISOString(),
    shallowestM,
    deepestM,
  };
  const views = { points, reasons, files, unit: UNIT_OF[read.format] };
  return {
    kept,
    preview: {
      ...report,
      asks: [...read.asks, ...tooMany(kept.length)],
      depthChoices: read.depthChoices,
      heading: read.heading,
      guessed,
      first: firstOf(views),
      box: boxOf(kept),
      sample: sampleOf(points, reasons),
    },
  };
}

/** The report alone, of what was taken in. */
export function reportOf(preview: LogPreview): LogReport {
  const { asks, depthChoices, heading, guessed, first, box, sample, ...report } = preview;
  void [asks, depthChoices, heading, guessed, first, box, sample];
  return report;
}

function tooMany(kept: number): LogPreview['asks'] {
  if (kept <= LOG_MOST_SOUNDINGS) return [];
  const words = `The log holds ${kept} soundings; at most ${LOG_MOST_SOUNDINGS} can be taken in at once. Bring its files in parts.`;
  return [{ option: 'files', words }];
}

function cautionsOf({ points, guessed, format }: LogRead, kept: number): string[] {
  const cautions: string[] = [];
  const untimed = points.filter(({ atMs }) => atMs === null).length;
  if (untimed > 0 && guessed.level === 'by_hour')
    cautions.push(
      `${untimed} soundings state no time; the middle of the visit’s water levels is taken for them.`,
    );
  if (format === 'nmea' && guessed.transducerM === 0)
    cautions.push(
      'Depths that count from the transducer are taken as they are. Say how deep it lay, if it did.',
    );
  if (kept === 0) cautions.push('Nothing is left to take in.');
  return cautions;
}

/** Least and greatest; null of nothing. */
function rangeOf(values: readonly number[]): [number | null, number | null] {
  let [least, most] = [Infinity, -Infinity];
  for (const value of values) {
    if (value < least) least = value;
    if (value > most) most = value;
  }
  return values.length === 0 ? [null, null] : [least, most];
}

type Views = {
  points: readonly LogPoint[];
  reasons: readonly (LeftOutReason | null)[];
  files: LogFiles;
  unit: 'line' | 'row' | 'feature';
};

function firstOf({ points, reasons, files, unit }: Views): LogPointView[] {
  return points.slice(0, FIRST).map(({ lon, lat, depthM, atMs, file, at }, i) => ({
    position: [lon, lat],
    depthM,
    at: atMs === null ? null : new Date(atMs).toISOString(),
    where: whereWords({ file: files[file]?.name ?? '', unit, at }),
    taken: reasons[i] === null,
  }));
}

function boxOf(kept: readonly LogPoint[]): LogPreview['box'] {
  const [west, east] = rangeOf(kept.map(({ lon }) => lon));
  const [south, north] = rangeOf(kept.map(({ lat }) => lat));
  return west === null || south === null || east === null || north === null
    ? null
    : [west, south, east, north];
}

/** Every so manieth point, so that at most fifteen hundred are drawn. */
function sampleOf(
  points: readonly LogPoint[],
  reasons: readonly (LeftOutReason | null)[],
): LogPreview['sample'] {
  const step = Math.max(1, Math.ceil(points.length / MOST_SAMPLE));
  const sample: LogPreview['sample'] = [];
  for (let i = 0; i < points.length; i += step) {
    const point = points[i];
    if (point) sample.push([point.lon, point.lat, reasons[i] === null]);
  }
  return sample;
}
