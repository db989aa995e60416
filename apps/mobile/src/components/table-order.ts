import type { CsvCell } from '@/lib/csv';

const inOrder = new Intl.Collator('en-GB', { numeric: true, sensitivity: 'base' });

/** Order of two cells: numbers by size, words as people order them ("Peg 9" before "Peg 10"). */
export function compareCells(one: CsvCell | undefined, other: CsvCell | undefined): number {
  if (typeof one === 'number' && typeof other === 'number') return one - other;
  return inOrder.compare(String(one ?? ''), String(other ?? ''));
}

/** Whether every word typed stands somewhere in the row. */
export function lineHolds(line: { values: readonly CsvCell[] }, typed: string): boolean {
  const text = line.values
    .map((value) => String(value ?? ''))
    .join('\n')
    .toLowerCase();
  return typed
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word));
}
