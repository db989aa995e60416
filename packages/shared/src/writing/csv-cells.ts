/** A plain number as spreadsheets write one; such a cell is left alone even when it begins with a sign. */
const PLAIN_NUMBER = /^[+-]?\d+([.,]\d+)?([eE][+-]?\d+)?$/;
/** The characters with which a spreadsheet takes a cell for a formula (and Tab or CR for a way round that). */
const FORMULA_START = /^[=+\-@\t\r]/;

/** One cell as it may stand in a file that a spreadsheet opens: a formula is turned into text, numbers stay numbers. */
export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
  const harmless = FORMULA_START.test(value) && !PLAIN_NUMBER.test(value) ? `'${value}` : value;
  return /[",;\r\n\t]/.test(harmless) ? `"${harmless.replace(/"/g, '""')}"` : harmless;
}

/** Rows as RFC 4180 text: commas, CRLF, quotes doubled. The first row is the heading. */
export function csvText(rows: readonly (readonly (string | number | null)[])[]): string {
  return rows.map((row) => row.map(csvCell).join(',') + '\r\n').join('');
}
