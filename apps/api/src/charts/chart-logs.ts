import type { ChartInput } from '@mereward/shared/charts/build-chart';
import {
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
import type { BuiltLog } from './built';
import type { SourceLog } from './source-logs';

type Soundings = ChartInput['soundings'];

export type ReducedLogs = { built: BuiltLog[]; soundings: Soundings; days: string[] };

type Reduced = {
  log: SourceLog;
  soundings: LogSounding[];
  outside: number;
  levelKnown: boolean;
  days: string[];
};

/** The soundings of every log at datum and in the plane, merged by cells: what the chart is made from, and what to say. */
export function reducedLogs({ visits, zone }: BuildSource): ReducedLogs {
  const reduced = visits.flatMap((visit) => visit.logs.map((log) => reduceLog(visit, log, zone)));
  const corners = [...(visits[0]?.site.outline.shore ?? [])];
  if (reduced.length === 0) return { built: [], soundings: [], days: [] };
  const cellM = thinningCellM(
    reduced.map(({ soundings }) => soundings),
    chooseCellM(corners),
    MOST_LOG_SOUNDINGS,
  );
  const built: BuiltLog[] = [];
  const merged: Soundings = [];
  for (const { log, soundings, outside, levelKnown } of reduced) {
    const positionM = log.options.positionSigmaM ?? 3;
    const thinned = thinLog(soundings, cellM, { positionM, levelKnown });
    built.push(builtLog({ log, outside, cellM }, thinned));
    for (const [i, { xM, yM, depthM, sigmaM, grade }] of thinned.entries())
      if (grade !== 'D')
        merged.push({ id: idOf(log.id, i), xM, yM, depthM, sigmaM, grade, substrate: null, cover: null });
  }
  return { built, soundings: merged, days: reduced.flatMap(({ days }) => days) };
}

/** A merged sounding's name: of its log, and which of it. */
export const idOf = (logId: string, at: number): string => `${logId}:${String(at).padStart(5, '0')}`;

function reduceLog({ site, day }: SourceVisit, log: SourceLog, zone: string): Reduced {
  const { options, soundings: columns } = log;
  if (!columns) throw new Error(`The soundings of the log ${log.id} were not loaded`);
  const level = levels(site.gauge, options.level);
  const out: Reduced = { log, soundings: [], outside: 0, levelKnown: true, days: [] };
  let [firstMs, lastMs] = [Infinity, -Infinity];
  for (let i = 0; i < columns.depthM.length; i++) {
    const place = toPlane(site.origin, [columns.lon[i] ?? 0, columns.lat[i] ?? 0]);
    if (!insideOutline(site.outline, place)) {
      out.outside += 1;
      continue;
    }
    const asReadM = columns.depthM[i] ?? 0;
    const atMs = columns.atMs[i] ?? Number.NaN;
    const { aboveDatumM, sigmaM, known } = level(atMs);
    if (!known) out.levelKnown = false;
    if (atMs < firstMs) firstMs = atMs;
    if (atMs > lastMs) lastMs = atMs;
    out.soundings.push({
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

type Of = { log: SourceLog; outside: number; cellM: number };

function builtLog({ log, outside, cellM }: Of, thinned: readonly ThinnedSounding[]): BuiltLog {
  const { id, visitId, filenames, found, kept } = log;
  return {
    ...{ id, visitId, filenames, found, kept, outside, cellM },
    points: thinned.flatMap(({ xM, yM, depthM, sigmaM }) => [
      to(xM, 2),
      to(yM, 2),
      to(depthM, 3),
      to(sigmaM, 3),
    ]),
    grades: thinned.map(({ grade }) => grade).join(''),
  };
}
