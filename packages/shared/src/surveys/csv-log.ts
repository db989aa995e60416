import { LOG_COLUMNS, type LogColumn, type LogColumns, type LogOptions } from './log-contract';
import { depthMeant } from './log-depth';
import {
  angleIn,
  decimalMarksOf,
  instantIn,
  numberWith,
  unitInName,
  unitNamed,
  type DecimalMark,
  type MarksFound,
} from './log-numbers';
import { refuseFile, type LogFaults, type LogPoint, type LogRead } from './log-point';

/** A table of soundings as cells. `row` is counted as a spreadsheet does: the heading is 1. */
export type LogTable = { name: string; heading: string[]; rows: { row: number; cells: string[] }[] };

/** Headings that people give these columns. Written without case, spaces, units or signs. */
const CALLED: Readonly<Record<LogColumn, readonly string[]>> = {
  lat: ['lat', 'latitude', 'lat_deg', 'latitude_deg', 'gps_lat', 'gps_latitude', 'lat_wgs84'],
  lon: [
    'lon',
    'long',
    'lng',
    'longitude',
    'lon_deg',
    'longitude_deg',
    'gps_lon',
    'gps_longitude',
    'lon_wgs84',
  ],
  depth: ['depth', 'water_depth', 'sounding', 'depth_below_surface', 'sonar_depth'],
  time: ['time', 'at', 'at_utc', 'time_utc', 'utc', 'timestamp', 'datetime', 'date_time', 'observed_at'],
};

const UNITS = new Set(['m', 'metres', 'meters', 'metre', 'ft', 'feet', 'foot', 'fathom', 'fathoms', 'fm']);

function plain(heading: string): string {
  const words = heading
    .toLowerCase()
    .split(/[^a-z0-9]+/)
    .filter((word) => word !== '');
  while (words.length > 1 && UNITS.has(words.at(-1) ?? '')) words.pop();
  return words.join('_');
}

/** Which column is which, guessed from the heading; a name that stands twice is not guessed at. */
export function guessLogColumns(heading: readonly string[]): LogColumns {
  const names = heading.map(plain);
  const columns: LogColumns = {};
  for (const column of LOG_COLUMNS) {
    const found = CALLED[column].flatMap((name) => names.flatMap((each, i) => (each === name ? [i] : [])));
    if (found.length === 1 && found[0] !== undefined) columns[column] = found[0];
  }
  return columns;
}

/** Soundings from tables; all of one log have the same heading. */
export function readCsvLog(tables: readonly LogTable[], options: LogOptions, faults: LogFaults): LogRead {
  const heading = sameHeading(tables);
  const columns = options.columns ?? guessLogColumns(heading);
  const asks = columnAsks(columns, heading);
  const marks = marksOf(tables, columns, options);
  const depthMark = marks.depths;
  if (depthMark === null) asks.push({ option: 'decimal', words: doubtWords(marks.doubt) });
  const unit = options.depthUnit ?? unitInName(heading[columns.depth ?? -1] ?? '') ?? 'm';
  const guessed: LogOptions = { ...options, columns, decimal: depthMark, depthUnit: unit };
  const read: LogRead = {
    format: 'csv',
    points: [],
    withoutPlace: 0,
    fileWords: tables.map(({ rows }) => `A table of ${rows.length} rows, depths in ${unitNamed(unit)}`),
    joined: 'Each row is one sounding.',
    cautions: [],
    asks,
    depthChoices: [],
    heading: [...heading],
    guessed: { ...guessed, positionSigmaM: options.positionSigmaM ?? 3 },
  };
  if (asks.length > 0 || depthMark === null) return read;
  const mark = { places: marks.places, depths: depthMark };
  const rows = new RowsOfLog({ columns, mark, options: { ...options, depthUnit: unit }, heading, faults });
  tables.forEach((table, file) => rows.take(table, file, read.points));
  if (rows.unzoned > 0) read.cautions.push('The times state no zone; they were taken as UTC.');
  return read;
}

function sameHeading(tables: readonly LogTable[]): readonly string[] {
  const [first, ...others] = tables;
  const heading = first?.heading ?? [];
  for (const { name, heading: other } of others)
    if (other.join('\t') !== heading.join('\t'))
      refuseFile(
        name,
        `Its heading is not that of ${first?.name ?? 'the first'}. Bring tables of one kind together.`,
      );
  const numbers = heading.filter((cell) => /^[+-]?\d+([.,]\d+)?$/.test(cell)).length;
  if (numbers > 1)
    refuseFile(
      first?.name ?? '',
      'Its first row holds numbers. Put a row above that names the columns: lat, lon, depth.',
    );
  return heading;
}

const COLUMN_NAMES: Readonly<Record<LogColumn, string>> = {
  lat: 'latitude',
  lon: 'longitude',
  depth: 'depth',
  time: 'time',
};

function columnAsks(columns: LogColumns, heading: readonly string[]): LogRead['asks'] {
  return LOG_COLUMNS.flatMap((column) => {
    const at = columns[column];
    if (at !== undefined && at >= heading.length)
      return [
        {
          option: `columns.${column}`,
          words: `The file has no column ${at + 1}. Choose the ${COLUMN_NAMES[column]} again.`,
        },
      ];
    if (at !== undefined || column === 'time') return [];
    return [{ option: `columns.${column}`, words: `Which column is the ${COLUMN_NAMES[column]}?` }];
  });
}

const doubtWords = (doubt: string): string =>
  `“${doubt}” may be ${doubt.replace(',', '.')} or ${doubt.replace(',', '')}. Say whether the comma stands before decimals or between thousands.`;

function marksOf(tables: readonly LogTable[], columns: LogColumns, { decimal }: LogOptions): MarksFound {
  const found = decimalMarksOf(cellsIn(tables, [columns.lat, columns.lon]), cellsIn(tables, [columns.depth]));
  return decimal ? { ...found, depths: decimal } : found;
}

function* cellsIn(tables: readonly LogTable[], at: readonly (number | undefined)[]): Generator<string> {
  for (const { rows } of tables)
    for (const { cells } of rows)
      for (const index of at) if (index !== undefined) yield (cells[index] ?? '').trim();
}

type Ground = {
  columns: LogColumns;
  mark: { places: DecimalMark; depths: DecimalMark };
  options: LogOptions;
  heading: readonly string[];
  faults: LogFaults;
};

class RowsOfLog {
  unzoned = 0;
  constructor(private readonly ground: Ground) {}

  take({ name, rows }: LogTable, file: number, points: LogPoint[]): void {
    const { heading, faults } = this.ground;
    for (const { row, cells } of rows) {
      const answer =
        cells.length === heading.length
          ? this.pointIn(cells)
          : {
              value: cells.join(' | '),
              detail: `This row has ${cells.length} cells and the heading ${heading.length}: a delimiter or a quote is missing or too many. It was left out.`,
            };
      if ('detail' in answer) faults.add({ file: name, unit: 'row', at: row, ...answer });
      else points.push({ ...answer, file, at: row });
    }
  }

  private pointIn(
    cells: readonly string[],
  ): Omit<LogPoint, 'file' | 'at'> | { value: string; detail: string } {
    const { columns, mark, options } = this.ground;
    const cell = (column: LogColumn): string => (cells[columns[column] ?? -1] ?? '').trim();
    const lat = angleIn(cell('lat'), { axis: 'lat', mark: mark.places });
    if (lat === null) return { value: cell('lat'), detail: placeFault('latitude', mark.places) };
    const lon = angleIn(cell('lon'), { axis: 'lon', mark: mark.places });
    if (lon === null) return { value: cell('lon'), detail: placeFault('longitude', mark.places) };
    const depth = numberWith(cell('depth'), mark.depths);
    if (depth === null) return { value: cell('depth'), detail: depthFault(cell('depth'), mark.depths) };
    const time = cell('time');
    const at = time === '' ? null : instantIn(time);
    if (time !== '' && at === null)
      return { value: time, detail: 'This is not a time like 2027-04-03T09:40:00Z. The row was left out.' };
    if (at && !at.zoned) this.unzoned += 1;
    return { lon, lat, depthM: depthMeant(depth, options.depthUnit ?? 'm', options), atMs: at?.ms ?? null };
  }
}

const markWords = (mark: DecimalMark): string => (mark === 'point' ? 'a decimal point' : 'a decimal comma');

const placeFault = (what: string, mark: DecimalMark): string =>
  `This is no ${what} in degrees, degrees and minutes, or degrees, minutes and seconds with ${markWords(mark)}. The row was left out.`;

function depthFault(text: string, mark: DecimalMark): string {
  if (text === '') return 'There is no depth in this row. It was left out.';
  return `This is not a number with ${markWords(mark)} and no marks between thousands. The row was left out.`;
}
