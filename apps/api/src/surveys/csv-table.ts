import { CsvError, parse } from 'csv-parse/sync';

export type Delimiter = ',' | ';' | '\t';
/** A table as cells. `row` is counted as a spreadsheet does: the heading is 1. Blank rows are passed over. */
export type CsvTable = { delimiter: Delimiter; heading: string[]; rows: { row: number; cells: string[] }[] };

/** Why a text can't be read as a table, and what to do about it. */
export class TableFault extends Error {
  override readonly name = 'TableFault';
}

const DELIMITERS = [';', ',', '\t'] as const;
const LOST_LETTER = '\uFFFD'; // what a reader puts where bytes were no letter

/**
 * A text as cells: delimiter guessed, quotes and line ends of any kind. A quote in the middle of a cell is taken for the
 * text it is. Throws TableFault; `rowsAre` says in it what the rows should be.
 */
export function readTable(text: string, rowsAre: string): CsvTable {
  const plain = text.replace(/^\uFEFF/, '');
  if (plain.includes(LOST_LETTER) || plain.includes('\0'))
    throw new TableFault(
      'Some letters of the file are lost: it was not saved as UTF-8. Save it as “CSV UTF-8” and bring it again.',
    );
  if (plain.trim() === '')
    throw new TableFault(`The file is empty. It needs a heading and a row for each ${rowsAre}.`);
  const delimiter = guessDelimiter(plain);
  const [heading = [], ...rows] = cellsOf(plain, delimiter);
  return {
    delimiter,
    heading: heading.map((cell) => cell.trim()),
    rows: rows.flatMap((cells, i) =>
      cells.every((cell) => cell.trim() === '') ? [] : [{ row: i + 2, cells }],
    ),
  };
}

/** The mark that parts the heading into the most cells, quoted ones left whole; a comma when there is but one column. */
function guessDelimiter(text: string): Delimiter {
  const heading = (text.split(/\r?\n/).find((line) => line.trim() !== '') ?? '').replace(
    /"(?:[^"]|"")*"/g,
    'x',
  );
  let best: Delimiter = ',';
  for (const each of DELIMITERS) if (heading.split(each).length > heading.split(best).length) best = each;
  return best;
}

function cellsOf(text: string, delimiter: string): string[][] {
  try {
    return parse(text, { delimiter, relax_column_count: true, relax_quotes: true });
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    throw new TableFault(faultWords(error));
  }
}

function faultWords({ code, ['lines']: line }: CsvError): string {
  const where = typeof line === 'number' ? ` near line ${line}` : '';
  if (code === 'CSV_QUOTE_NOT_CLOSED')
    return `A cell that begins with a quote${where} is never closed. Put the second quote in.`;
  return `The file can’t be read as a table${where}. Save it as CSV again.`;
}
