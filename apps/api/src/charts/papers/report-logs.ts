import { shownOf } from '@mereward/shared/charts/log-thinning';
import type { DepthUnit, LogFormat, LogOptions, LogReport } from '@mereward/shared/surveys/log-contract';
import { dayAndClock } from '@mereward/shared/time/day-names';
import { figure } from '@mereward/shared/units/length-words';
import type { BuiltLog } from '../built';
import { mergedSoundings, type MergedSounding } from '../chart-soundings';
import type { PaperBlock } from '../../pdf/paper-pages';
import type { SurveyReport } from './report-document';

/** What is kept beside a chart's log: how it was read, and by whom. */
export type LogBrought = { options: LogOptions; report: LogReport | null; by: string; at: Date };

/** So many merged soundings of a log are printed; the file of all of them holds the rest. */
export const MOST_PRINTED = 120;

/** Each log of the survey: its files, how they were read, what was left out and why, and what it measured. */
export function logsBlocks({ built, logs, zone, soundingsTable }: SurveyReport): PaperBlock[] {
  return built.logs.flatMap((log, i): PaperBlock[] => {
    const all = mergedSoundings(built.origin, log);
    const brought = logs.get(log.id);
    return [
      { kind: 'words', words: `Log ${i + 1}: ${log.filenames.join(', ')}`, bold: true },
      {
        kind: 'facts',
        facts: [
          ...(brought ? readingFacts(brought, zone) : []),
          ...countFacts(log, brought?.report ?? null),
          ...measuredFacts(log, all),
        ],
      },
      printedTable(all, { number: i + 1, filename: soundingsTable.filename }),
    ];
  });
}

type Facts = [string, string][];

const FORMAT: Readonly<Record<LogFormat, string>> = {
  nmea: 'NMEA 0183 sentences',
  gpx: 'GPX 1.1',
  geojson: 'GeoJSON',
  csv: 'a table',
};
const UNIT: Readonly<Record<DepthUnit, string>> = { m: 'metres', ft: 'feet', fathom: 'fathoms' };

function readingFacts({ options, report, by, at }: LogBrought, zone: string): Facts {
  const clock = (instant: string): string => dayAndClock(instant, zone);
  const unit = options.depthUnit === null ? 'metres' : UNIT[options.depthUnit];
  const means =
    options.depthMeans === 'depth'
      ? `depths below the transducer or surface, in ${unit}`
      : `heights of the bed, in ${unit}, under water at ${options.waterHeightM} m`;
  return [
    ['Brought by', `${by}, ${clock(at.toISOString())}`],
    [
      'Recorded',
      report?.from && report.to ? `${clock(report.from)} to ${clock(report.to)}` : 'the files state no time',
    ],
    [
      'Instrument',
      report
        ? `${FORMAT[report.format]}: ${report.files.map(({ name, words }) => `${name}, ${words}`).join('; ')}`
        : 'not known',
    ],
    ['Joined', report?.joined || 'not known'],
    ['Depths read as', means],
    [
      'Offset',
      options.transducerM === 0
        ? 'none added by hand; what a sentence states itself is added when it is read'
        : `transducer ${options.transducerM.toFixed(2)} m below the surface, added to depths read from it`,
    ],
    [
      'Speed of sound',
      `not recorded in such a log: the instrument’s own setting was taken. ± ${(options.depthSigmaShare * 100).toFixed(1)} % of each depth is allowed for it`,
    ],
    [
      'Errors taken (one σ)',
      `each depth ± ${options.depthSigmaM.toFixed(2)} m; each place ${options.positionSigmaM === null ? '± 3 m, as the log states no kind of fix' : `± ${options.positionSigmaM} m`}`,
    ],
    [
      'Brought to datum',
      options.level === 'by_hour'
        ? 'by the level of each sounding’s hour'
        : 'by the level at the visit’s start, for all',
    ],
  ];
}

function countFacts(log: BuiltLog, report: LogReport | null): Facts {
  const why = (report?.leftOut ?? []).map(({ words }) => words);
  if (report && report.faultCount > 0)
    why.push(`${figure(report.faultCount)} lines, rows or features could not be read.`);
  if (log.outside > 0) why.push(`Of those taken in, ${figure(log.outside)} lie off the chart’s outline.`);
  return [
    ['Soundings', `${figure(log.found)} found, ${figure(log.kept)} taken in`],
    ['Left out', why.length === 0 ? 'none' : why.join(' ')],
    [
      'Merged',
      `into ${figure(log.grades.length)} by cells of ${log.cellM.toFixed(2)} m: of grade ${gradeCounts(log.grades)}. Contours are drawn from A and B, C are points, D are for staff`,
    ],
  ];
}

const gradeCounts = (grades: string): string =>
  ['A', 'B', 'C', 'D'].map((letter) => `${letter} ${figure(grades.split(letter).length - 1)}`).join(', ');

function measuredFacts(log: BuiltLog, all: readonly MergedSounding[]): Facts {
  if (all.length === 0) return [['Measured', 'nothing on this water']];
  const depths = all.map(({ depthM }) => depthM).sort((a, b) => a - b);
  const sigmas = all.map(({ sigmaM }) => sigmaM).sort((a, b) => a - b);
  const at = (sorted: readonly number[], share: number): string =>
    (sorted[Math.round(share * (sorted.length - 1))] ?? 0).toFixed(2);
  const span = (of: (each: MergedSounding) => number): number => {
    const [least, most] = all.reduce(
      ([low, high], each) => [Math.min(low, of(each)), Math.max(high, of(each))],
      [Infinity, -Infinity],
    );
    return most - least;
  };
  return [
    [
      'Extent',
      `${figure(span(({ xM }) => xM))} m from west to east, ${figure(span(({ yM }) => yM))} m from south to north; ${figure(all.length * log.cellM ** 2)} m² of cells sounded`,
    ],
    [
      'Depths at datum',
      `${at(depths, 0)} to ${at(depths, 1)} m; half lie between ${at(depths, 0.25)} and ${at(depths, 0.75)} m`,
    ],
    [
      'Spread (one σ)',
      `${at(sigmas, 0.5)} m in the middle, ${at(sigmas, 0)} to ${at(sigmas, 1)} m: the soundings’ own noise, their scatter within a cell, and what all of a log share`,
    ],
  ];
}

function printedTable(
  all: readonly MergedSounding[],
  { number, filename }: { number: number; filename: string },
): PaperBlock {
  const printed = shownOf(all, MOST_PRINTED);
  const share =
    printed.length === all.length
      ? `all ${figure(all.length)}`
      : `${figure(printed.length)} of ${figure(all.length)}, spread over the water; all of them are in ${filename}`;
  return {
    kind: 'table',
    table: {
      title: `Merged soundings of log ${number}: ${share}`,
      heading: ['No', 'Latitude', 'Longitude', 'East m', 'North m', 'At datum m', '± m', 'Grade'],
      shares: [0.09, 0.17, 0.17, 0.13, 0.13, 0.13, 0.09, 0.09],
      rows: printed.map(({ number: no, position: [lon, lat], xM, yM, depthM, sigmaM, grade }) => [
        ...[String(no), lat.toFixed(7), lon.toFixed(7), xM.toFixed(1), yM.toFixed(1)],
        ...[depthM.toFixed(2), sigmaM.toFixed(2), grade],
      ]),
    },
  };
}
