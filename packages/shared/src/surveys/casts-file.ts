import { guessMapping, repeatedHeadings } from './casts-mapping';
import { readObservation, type RowReader } from './casts-row';
import type { CastColumn, CastObservation, ColumnMapping, ImportRowError, Kit } from './contract';

/** A casts file as cells. `row` is the line of the table as a spreadsheet numbers it: the heading is 1. */
export type CastsTable = { heading: string[]; rows: { row: number; cells: string[] }[] };

/** What the file's words are looked up in. */
export type CastsGround = {
  pegs: readonly { id: string; number: string }[];
  marks: readonly { id: string; code: string; name: string }[];
  kit: Kit;
  startedAt: string; // of the visit: taken for a cast whose row states no time
};

export type CastRow = { row: number; pegId: string; observedAt: string; observation: CastObservation };
export type CastsRead = { mapping: ColumnMapping; casts: CastRow[]; errors: ImportRowError[] };

export const MOST_ROWS = 5000;

/**
 * Reads a table of casts by a mapping (guessed from its heading when null). Every fault of every row is told; the
 * casts are only of use when there is none, since a file is taken whole or not at all.
 */
export function readCasts(table: CastsTable, asked: ColumnMapping | null, ground: CastsGround): CastsRead {
  const mapping = asked ?? guessMapping(table.heading);
  const errors = headingErrors(table, mapping);
  if (errors.length > 0) return { mapping, casts: [], errors };
  const casts: CastRow[] = [];
  for (const { row, cells } of table.rows) {
    if (cells.length !== table.heading.length) {
      const detail = `This row has ${cells.length} cells and the heading ${table.heading.length}: a delimiter or a quote is missing or too many.`;
      errors.push({ row, column: '', value: cells.join(' | ').slice(0, 200), detail });
      continue;
    }
    const reader = readerOf(row, cells, mapping);
    const cast = readObservation(reader, ground);
    if (cast && reader.errors.length === 0) casts.push({ row, ...cast });
    errors.push(...reader.errors);
  }
  return { mapping, casts, errors };
}

function readerOf(row: number, cells: readonly string[], mapping: ColumnMapping): RowReader {
  const errors: ImportRowError[] = [];
  const text = (column: CastColumn): string => {
    const index = mapping[column];
    return index === undefined ? '' : (cells[index] ?? '').trim();
  };
  const fault = (column: CastColumn, detail: string): null => {
    errors.push({ row, column, value: text(column), detail });
    return null;
  };
  return { text, fault, errors };
}

function headingErrors(table: CastsTable, mapping: ColumnMapping): ImportRowError[] {
  const fault = (column: string, value: string, detail: string): ImportRowError => ({
    row: 1,
    column,
    value,
    detail,
  });
  const errors = repeatedHeadings(table.heading).map((name) =>
    fault('', name, 'Two columns have this heading. Rename one, so that it is clear which is meant.'),
  );
  for (const column of ['peg', 'wraps_whole'] as const)
    if (mapping[column] === undefined)
      errors.push(
        fault(column, '', `No column of the file is given for “${column}”. Choose which one it is.`),
      );
  if (mapping.mark === undefined && mapping.bearing_deg_magnetic === undefined)
    errors.push(
      fault(
        'mark',
        '',
        'Neither a far-bank mark nor a compass bearing is in the file. Choose a column for one.',
      ),
    );
  for (const [column, index] of Object.entries(mapping))
    if (index >= table.heading.length)
      errors.push(fault(column, String(index), 'The file has no such column. Choose the columns again.'));
  if (table.rows.length === 0) errors.push(fault('', '', 'There are no rows under the heading.'));
  if (table.rows.length > MOST_ROWS)
    errors.push(
      fault('', String(table.rows.length), `A file may hold ${MOST_ROWS} rows. Bring it in parts.`),
    );
  return errors;
}
