import { chartCaution } from '@mereward/shared/charts/cautions';
import type { AgeNow } from '@mereward/shared/charts/chart-age';
import type { LeadCalibration } from '@mereward/db/entities/surveys/lead-calibration';
import type { LeftOutView } from '@mereward/shared/charts/left-out-contract';
import type { ArcCoverage } from '@mereward/shared/surveys/contract';
import { outlineSourceWords } from '@mereward/shared/lakes/outline-source';
import { dayWords } from '@mereward/shared/time/civil-day';
import { dayAndClock, dayRange } from '@mereward/shared/time/day-names';
import { figure, percent } from '@mereward/shared/units/length-words';
import type { Built } from '../built';
import { surveyedBy } from '../built-logs';
import type { CastsTable, ChartCasts } from '../chart-casts';
import type { PaperBlock, PaperDocument } from '../../pdf/paper-pages';
import {
  agreementFacts,
  changeFacts,
  coverageTable,
  leftOutBlocks,
  qualityFacts,
  usedFacts,
} from './report-quality';
import { castsBlocks } from './report-casts';
import { logsBlocks, type LogBrought } from './report-logs';
import { photosBlocks, type ReportPhotos } from './report-photos';
import { acceptedBlocks, eventsBlocks, type ToldEvent, type ToldReport } from './report-since';
import { visitBlocks } from './report-visits';

/** The chart published before, as far as a report holds the new one against it. */
export type EarlierChart = {
  version: string | null;
  surveyedFrom: string | null;
  surveyedTo: string | null;
  visitIds: string[];
  datumM: number;
  figures: Built['figures'];
  casts: number; // soundings of casts
  merged: number; // merged soundings of logs
};

export type SurveyReport = ChartCasts & {
  fisheryName: string;
  people: ReadonlyMap<string, string>;
  readings: { at: Date; levelM: number; board: string }[]; // as the board reads
  coverage: ArcCoverage[][]; // by visit, in their order
  earlier: EarlierChart | null;
  logs: ReadonlyMap<string, LogBrought>; // by the log's id
  leads: ReadonlyMap<string, LeadCalibration>; // by its id
  events: ToldEvent[]; // of the lake, oldest first
  ageNow: AgeNow | null;
  accepted: ToldReport[];
  photos: ReportPhotos;
  leftOut: LeftOutView[]; // by a person
  table: CastsTable;
  soundingsTable: CastsTable;
  writtenAt: Date;
  writtenOn: string;
};

const heading = (words: string): PaperBlock => ({ kind: 'heading', words });
const words = (text: string, bold = false): PaperBlock => ({ kind: 'words', words: text, bold });

/** The report in its order: the chart, how it was surveyed, how good it is, what changed, every cast, the digest. */
export function reportDocument(report: SurveyReport): PaperDocument {
  const { chart, lake, fisheryName, writtenOn } = report;
  const version = chart.version === null ? 'draft' : `chart ${chart.version}`;
  return {
    title: `Survey report: ${lake.name}, ${version}`,
    author: fisheryName,
    over: fisheryName,
    foot: `${lake.name}, ${version}. Survey report, for the fishery’s staff. Written ${dayWords(writtenOn)}.`,
    writtenAt: report.writtenAt,
    blocks: [
      { kind: 'facts', facts: chartFacts(report) },
      words(cautionOf(report), true),
      heading('How it was surveyed'),
      ...METHOD[surveyedBy(report.built)].map((text) => words(text)),
      ...visitBlocks(report),
      ...(report.built.logs.length > 0 ? [heading('Logs of soundings'), ...logsBlocks(report)] : []),
      heading('Water level'),
      ...levelBlocks(report),
      ...(surveyedBy(report.built) === 'logs' ? [] : castingBlocks(report)),
      heading('How good the chart is'),
      { kind: 'facts', facts: qualityFacts(report) },
      heading('What was left out'),
      { kind: 'facts', facts: usedFacts(report) },
      ...leftOutBlocks(report),
      heading('Reports accepted'),
      ...acceptedBlocks(report),
      heading('What dates it'),
      ...eventsBlocks(report),
      heading('Against the version before'),
      { kind: 'facts', facts: changeFacts(report) },
      heading('The data'),
      ...digestBlocks(report),
      heading('Photos'),
      ...photosBlocks(report.photos),
      ...castsBlocks(report),
    ],
  };
}

const BY_CASTS =
  'Casts from the bank: a lead is thrown to a counted length of line over a far-bank mark or along a compass bearing, the depth is read by letting a marker float up in counted pulls, and the bottom is called from how the lead landed and dragged and what came back. A depth is (pulls − ½) × one pull + the float’s own length, then brought to datum by the level of its hour. Each cast is kept as it was observed and reduced to a place, a depth and a bottom, each with its error.';
const BY_LOGS =
  'Logs of soundings from a boat: places and depths as the instruments wrote them, brought to datum by the level of the day. Soundings in one cell are merged, weighed by their error; what scatters beyond it widens the error of the merged one, and what all of a log share (level, speed of sound) is added whole. A log tells nothing of the bottom’s kind.';
const METHOD = { casts: [BY_CASTS], logs: [BY_LOGS], both: [BY_CASTS, BY_LOGS] } as const;

const castingBlocks = (report: SurveyReport): PaperBlock[] => [
  heading('How much was covered'),
  words(
    'Of each peg’s arc, sectors of ten degrees by rings of two wraps: the share that a cast came down in, and the share of casts thrown again at a place another had reached.',
  ),
  { kind: 'table', table: coverageTable(report) },
  heading('Repeats and agreement'),
  { kind: 'facts', facts: agreementFacts(report) },
];

function chartFacts({ chart, built, people, lake, zone }: SurveyReport): [string, string][] {
  const { figures } = built;
  const approver = chart.approvedBy === null ? null : people.get(chart.approvedBy);
  const submitter = chart.submittedBy === null ? null : people.get(chart.submittedBy);
  return [
    ['Lake', lake.name],
    ['Title', chart.title],
    ['Version', chart.version ?? 'none yet: a draft'],
    [
      'Surveyed',
      chart.surveyedFrom && chart.surveyedTo ? dayRange(chart.surveyedFrom, chart.surveyedTo) : '–',
    ],
    ['Submitted by', submitter ?? 'not submitted'],
    ['Approved by', approver ?? 'nobody yet'],
    ['Published', chart.publishedAt ? dayAndClock(chart.publishedAt.toISOString(), zone) : 'not yet'],
    ['Chart datum', `${chart.datumM.toFixed(2)} m on the lake’s datum board; every depth here is below it`],
    ['Water surveyed', `${percent(figures.surveyedShare)} of ${figure(figures.areaM2)} m²`],
    ['Volume of that', `${figure(figures.volumeM3)} m³ at datum`],
    [
      'Mean and greatest depth',
      `${figures.meanDepthM.toFixed(2)} m and ${figures.greatestDepthM.toFixed(2)} m`,
    ],
    ['Outline', outlineSourceWords(built.outlineFrom) ?? 'how it was found is not on record'],
    ['Isobaths', `every ${Number(chart.contourStepM.toFixed(4))} m`],
  ];
}

const cautionOf = ({ chart, built }: SurveyReport): string =>
  chart.surveyedFrom && chart.surveyedTo
    ? chartCaution({
        surveyedFrom: chart.surveyedFrom,
        surveyedTo: chart.surveyedTo,
        datumM: chart.datumM,
        surveyedBy: surveyedBy(built),
      })
    : 'Not for boating, wading, swimming or diving.';

function levelBlocks({ visits, readings, zone }: SurveyReport): PaperBlock[] {
  const cell = (levelM: number | null): string => (levelM === null ? 'not read' : levelM.toFixed(3));
  const rows = visits.map(({ visit: { startedAt, endedAt, gaugeStartM, gaugeEndM, title } }) => [
    title,
    `${dayAndClock(startedAt.toISOString(), zone)}: ${cell(gaugeStartM)} m`,
    endedAt ? `${dayAndClock(endedAt.toISOString(), zone)}: ${cell(gaugeEndM)} m` : cell(gaugeEndM),
    gaugeEndM === null ? '–' : `${((gaugeEndM - gaugeStartM) * 100).toFixed(1)} cm`,
  ]);
  const kept = readings.map(({ at, levelM, board }) => [
    dayAndClock(at.toISOString(), zone),
    board,
    `${levelM.toFixed(3)} m`,
  ]);
  return [
    words(
      'As read on the board, at the first and the last cast of each visit; between them the level is taken to have moved evenly.',
    ),
    {
      kind: 'table',
      table: {
        heading: ['Visit', 'At the start', 'At the end', 'Moved'],
        shares: [0.3, 0.3, 0.3, 0.1],
        rows,
      },
    },
    ...(kept.length === 0
      ? [words('No other reading of the datum board is kept from these days.')]
      : [
          words('Other readings of the datum board from these days:'),
          {
            kind: 'table' as const,
            table: { heading: ['Read', 'Board', 'Level'], shares: [0.5, 0.25, 0.25], rows: kept },
          },
        ]),
  ];
}

function digestBlocks({ table, soundingsTable, built, chart, visits }: SurveyReport): PaperBlock[] {
  const count = visits.reduce((sum, { casts }) => sum + casts.length, 0);
  return [
    words(
      `Every cast stands in the table below and in the file ${table.filename}: ${count} rows under one heading, as observed, and as this chart was made of them (place, depth at datum, error, bottom, grade). SHA-256 of that file, every byte of it from the mark of UTF-8 at its beginning to the last line’s end:`,
    ),
    words(table.sha256, true),
    words(
      `Whoever has the file can work the figure out again (sha256sum ${table.filename}), and the file ${table.filename}.sha256 holds it too. Observations and soundings of a published chart do not change; the file does when a peg’s number, a mark’s code or a person’s name is changed, and then so does the figure.`,
    ),
    ...(built.logs.length === 0
      ? []
      : [
          words(
            `Every merged sounding of its logs stands in the file ${soundingsTable.filename}. SHA-256 of that file, every byte of it:`,
          ),
          words(soundingsTable.sha256, true),
        ]),
    words(
      chart.inputSha256
        ? `The program’s own digest of what this chart was built from, which also takes in the outline, the kit, the stances and the marks: ${chart.inputSha256.toString('hex')}.`
        : 'The chart is not built yet.',
    ),
  ];
}
