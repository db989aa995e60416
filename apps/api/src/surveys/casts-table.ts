import { Problem } from '@mereward/shared/problems/problem';
import type { CastsTable } from '@mereward/shared/surveys/casts-file';
import { readTable, TableFault, type Delimiter } from './csv-table';

export type CastsText = { delimiter: Delimiter; table: CastsTable };

/** A casts file's text as cells, or the problem that says why it can't be read. */
export function readCastsText(text: string): CastsText {
  try {
    const { delimiter, ...table } = readTable(text, 'cast');
    return { delimiter, table };
  } catch (error) {
    if (!(error instanceof TableFault)) throw error;
    const { message: detail } = error;
    throw new Problem('invalid', 'This file can’t be read as a table of casts', {
      detail,
      errors: [{ pointer: '/text', detail }],
    });
  }
}
