export type CsvCell = string | number | null;

/** A spreadsheet runs a cell that starts so; a quote before it keeps it words. */
const RUNS = /^[=+\-@\t\r]/;

function cell(value: CsvCell): string {
  if (value === null) return '';
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
  const harmless = RUNS.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

/** Rows as CSV with a head (RFC 4180: commas, CRLF, quotes doubled), in UTF-8 with its mark so spreadsheets read it so. */
export const csvOf = (head: readonly string[], rows: readonly (readonly CsvCell[])[]): string =>
  `\uFEFF${[head, ...rows].map((row) => row.map(cell).join(',')).join('\r\n')}\r\n`;
