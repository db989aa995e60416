import { expect, test } from 'vitest';
import { CODE_HOLDS, qrDrawing } from './qr-drawing';

/** The dark modules as text, row by row, without the bare margin of four. */
function rowsOf(svg: string): string[] {
  const side = Number(/viewBox="0 0 (\d+)/.exec(svg)?.[1]) - 8;
  const dark = new Set(
    [...svg.matchAll(/M(\d+) (\d+)h1v1h-1z/g)].map(([, x, y]) => `${String(x)} ${String(y)}`),
  );
  return Array.from({ length: side }, (_row, y) =>
    Array.from({ length: side }, (_column, x) =>
      dark.has(`${String(x + 4)} ${String(y + 4)}`) ? '#' : '.',
    ).join(''),
  );
}

// ISO/IEC 18004, finder pattern: 7 × 7 modules, at every corner but the lower right
const FINDER = ['#######', '#.....#', '#.###.#', '#.###.#', '#.###.#', '#.....#', '#######'];
const corner = (rows: readonly string[], x: number, y: number): string[] =>
  rows.slice(y, y + 7).map((row) => row.slice(x, x + 7));

test('a code stands upright, with its three marks where a reader looks for them', () => {
  const rows = rowsOf(qrDrawing('https://fishery.example/waiting#in=abc', 340) ?? '');
  const far = rows.length - 7;
  expect(corner(rows, 0, 0)).toEqual(FINDER);
  expect(corner(rows, far, 0)).toEqual(FINDER);
  expect(corner(rows, 0, far)).toEqual(FINDER);
  expect(corner(rows, far, far)).not.toEqual(FINDER);
});

test('a code of the most it may hold is of version 30, and one letter more is none', () => {
  expect(rowsOf(qrDrawing('a'.repeat(CODE_HOLDS), 340) ?? '')).toHaveLength(17 + 4 * 30);
  expect(qrDrawing('a'.repeat(CODE_HOLDS + 1), 340)).toBeNull();
});
