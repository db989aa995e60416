import type { ImportRowError } from './contract';
import { csvText } from '../writing/csv-cells';

/** The faults of a casts file as a file of their own, to put right beside the spreadsheet. */
export function importErrorsCsv(errors: readonly ImportRowError[]): string {
  const heading = ['row', 'column', 'value', 'what to put right'];
  return csvText([heading, ...errors.map(({ row, column, value, detail }) => [row, column, value, detail])]);
}
