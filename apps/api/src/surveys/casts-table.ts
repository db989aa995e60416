import { Problem } from '@mereward/shared/problems/problem';
import type { CastsTable } from '@mereward/shared/surveys/casts-file';
import { CsvError, parse } from 'csv-parse/sync';

export type CastsText = { delimiter: ',' | ';' | '\t'; table: CastsTable };

const DELIMITERS = [';', ',', '\t'] as const;
const LOST_LETTER = '\uFFFD'; // what a reader puts where bytes were no letter

/**
 * A casts file's text as cells: delimiter guessed, quotes and line ends of any kind, blank lines passed over. A quote
 * in the middle of a cell is taken for the text it is.
 */
export function readCastsText(text: string): CastsText {
  const plain = text.replace(/^\uFEFF/, '');
  if (plain.includes(LOST_LETTER) || plain.includes('\0'))
    throw unreadable(
      'Some letters of the file are lost: it was not saved as UTF-8. Save it as “CSV UTF-8” and bring it again.',
    );
  if (plain.trim() === '') throw unreadable('The file is empty. It needs a heading and a row for each cast.');
  const delimiter = guessDelimiter(plain);
  const lines = cellsOf(plain, delimiter);
  const [heading = [], ...rows] = lines;
  return {
    delimiter,
    table: {
      heading: heading.map((cell) => cell.trim()),
      rows: rows.flatMap((cells, i) =>
        cells.every((cell) => cell.trim() === '') ? [] : [{ row: i + 2, cells }],
      ),
    },
  };
}

/** The mark that parts the heading into the most cells, quoted ones left whole; a comma when there is but one column. */
function guessDelimiter(text: string): CastsText['delimiter'] {
  const heading = (text.split(/\r?\n/).find((line) => line.trim() !== '') ?? '').replace(
    /"(?:[^"]|"")*"/g,
    'x',
  );
  let best: CastsText['delimiter'] = ',';
  for (const each of DELIMITERS) if (heading.split(each).length > heading.split(best).length) best = each;
  return best;
}

function cellsOf(text: string, delimiter: string): string[][] {
  try {
    return parse(text, { delimiter, relax_column_count: true, relax_quotes: true });
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    throw unreadable(faultWords(error));
  }
}

function faultWords({ code, ['lines']: line }: CsvError): string {
  const where = typeof line === 'number' ? ` near line ${line}` : '';
  if (code === 'CSV_QUOTE_NOT_CLOSED')
    return `A cell that begins with a quote${where} is never closed. Put the second quote in.`;
  return `The file can’t be read as a table${where}. Save it as CSV again.`;
}

function unreadable(detail: string): Problem {
  return new Problem('invalid', 'This file can’t be read as a table of casts', {
    detail,
    errors: [{ pointer: '/text', detail }],
  });
}
