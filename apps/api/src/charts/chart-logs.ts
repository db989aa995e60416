import type { ChartInput } from '@mereward/shared/charts/build-chart';
import {
  cellCorner,
  MOST_LOG_SOUNDINGS,
  thinLog,
  thinningCellM,
  type LogSounding,
  type ThinnedSounding,
} from '@mereward/shared/charts/log-thinning';
import { chooseCellM } from '@mereward/shared/charts/grid';
import { toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { levelAt } from '@mereward/shared/surveys/water-level';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { BuildSource, SourceVisit } from './build-source';
import type { BuiltLog, MergedPlace } from './built';
import { isLeftOut } from './source-left-out';
import type { SourceLog } from './source-logs';

type Soundings = ChartInput['soundings'];

type Numbered = LogSounding & { seq: number }; // of its log, from 1

export type ReducedLogs = {
  built: BuiltLog[];
  soundings: Soundings;
  days: string[];
  read: ReadonlyMap<string, readonly Numbered[]>; // what was merged, by log
  cellM: number;
};

type Reduced = {
  log: SourceLog;
  soundings: Numbered[];
  outside: number;
  leftOut: number;
  levelKnown: boolean;
  days: string[];
};

/** The soundings of every log at datum and in the plane, merged by cells: what the chart is made from, and what to say. */
export function reducedLogs(source: BuildSource): ReducedLogs {
  const { visits } = source;
  const reduced = visits.flatMap((visit) => visit.logs.map((log) => reduceLog(visit, log, source)));
  const corners = [...(visits[0]?.site.outline.shore ?? [])];
  if (reduced.length === 0) return { built: [], soundings: [], days: [], read: new Map(), cellM: 0 };
  const cellM = thinningCellM(
    reduced.map(({ soundings }) => soundings),
    chooseCellM(corners),
    MOST_LOG_SOUNDINGS,
  );
  const built: BuiltLog[] = [];
  const merged: Soundings = [];
  for (const { log, soundings, outside, leftOut, levelKnown } of reduced) {
    const positionM = log.options.positionSigmaM ?? 3;
    const thinned = thinLog(soundings, cellM, { positionM, levelKnown });
    built.push(builtLog({ log, outside, leftOut, cellM }, thinned));
    for (const [i, { xM, yM, depthM, sigmaM, grade }] of thinned.entries())
      if (grade !== 'D')
        merged.push({ id: idOf(log.id, i), xM, yM, depthM, sigmaM, grade, substrate: null, cover: null });
  }
  return {
    built,
    soundings: merged,
    days: reduced.flatMap(({ days }) => days),
    read: new Map(reduced.map(({ log, soundings }) => [log.id, soundings])),
    cellM,
  };
}

/** Cell and run of each of these merged soundings; ids of casts among them are passed over. */
export function mergedPlaces({ soundings, read, cellM }: ReducedLogs, ids: readonly string[]): MergedPlace[] {
  const wanted = new Set(ids);
  return soundings
    .filter(({ id }) => wanted.has(id))
    .map(({ id, ...place }) => {
      const corner = cellCorner(place, cellM);
      const inside = (read.get(id.split(':')[0] ?? '') ?? []).filter((each) => {
        const { xM, yM } = cellCorner(each, cellM);
        return xM === corner.xM && yM === corner.yM;
      });
      const seqs = inside.map(({ seq }) => seq);
      const [fromSeq, toSeq] = [Math.min(...seqs), Math.max(...seqs)];
      return { id, ...corner, fromSeq, toSeq, count: inside.length };
    });
}

/** A merged sounding's name: of its log, and which of it. */
export const idOf = (logId: string, at: number): string => `${logId}:${String(at).padStart(5, '0')}`;

function reduceLog({ site, day }: SourceVisit, log: SourceLog, { zone, leftOut }: BuildSource): Reduced {
  const { options, soundings: columns } = log;
  if (!columns) throw new Error(`The soundings of the log ${log.id} were not loaded`);
  const level = levels(site.gauge, options.level);
  const isOut = isLeftOut(log, leftOut);
  const out: Reduced = { log, soundings: [], outside: 0, leftOut: 0, levelKnown: true, days: [] };
  let [firstMs, lastMs] = [Infinity, -Infinity];
  for (let i = 0; i < columns.depthM.length; i++) {
    const place = toPlane(site.origin, [columns.lon[i] ?? 0, columns.lat[i] ?? 0]);
    if (!insideOutline(site.outline, place)) {
      out.outside += 1;
      continue;
    }
    const seq = i + 1;
    if (isOut({ seq, ...place })) {
      out.leftOut += 1;
      continue;
    }
    const asReadM = columns.depthM[i] ?? 0;
    const atMs = columns.atMs[i] ?? Number.NaN;
    const { aboveDatumM, sigmaM, known } = level(atMs);
    if (!known) out.levelKnown = false;
    if (atMs < firstMs) firstMs = atMs;
    if (atMs > lastMs) lastMs = atMs;
    out.soundings.push({
      seq,
      ...place,
      depthM: asReadM - aboveDatumM,
      noiseM: options.depthSigmaM,
      sharedM: Math.hypot(options.depthSigmaShare * asReadM, sigmaM),
    });
  }
  const timed = options.level === 'by_hour' && Number.isFinite(firstMs);
  out.days = timed ? [firstMs, lastMs].map((ms) => civilDay(new Date(ms), zone)) : [day];
  return out;
}

type Level = { aboveDatumM: number; sigmaM: number; known: boolean };

/** The level at an instant. Without one the middle of the visit's two is taken, unsure by their difference. */
function levels(gauge: SourceVisit['site']['gauge'], rule: 'by_hour' | 'at_start'): (atMs: number) => Level {
  const start = levelAt(gauge, gauge.startAt);
  if (rule === 'at_start') return () => start;
  const end = gauge.endAt === null ? start : levelAt(gauge, gauge.endAt);
  const apartM = Math.abs(end.aboveDatumM - start.aboveDatumM);
  const middle: Level = {
    aboveDatumM: (start.aboveDatumM + end.aboveDatumM) / 2,
    sigmaM: Math.hypot(start.sigmaM, apartM / Math.sqrt(12)),
    known: true,
  };
  return (atMs) => (Number.isNaN(atMs) ? middle : levelAt(gauge, new Date(atMs).toISOString()));
}

const to = (value: number, digits: number): number => Number(value.toFixed(digits));

type Of = { log: SourceLog; outside: number; leftOut: number; cellM: number };

function builtLog({ log, outside, leftOut, cellM }: Of, thinned: readonly ThinnedSounding[]): BuiltLog {
  const { id, visitId, filenames, found, kept } = log;
  return {
    ...{ id, visitId, filenames, found, kept, outside, leftOut, cellM },
    points: thinned.flatMap(({ xM, yM, depthM, sigmaM }) => [
      to(xM, 2),
      to(yM, 2),
      to(depthM, 3),
      to(sigmaM, 3),
    ]),
    grades: thinned.map(({ grade }) => grade).join(''),
  };
}
