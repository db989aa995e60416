import { createElement, isValidElement, type ReactNode } from 'react';
import type { Href } from 'expo-router';
import { Text } from '@/components/text';
import type { TableProps } from '@/components/table-props';
import type { SizeName } from '@/constants/type';
import type { CsvCell } from '@/lib/csv';
import { figure } from '@/lib/format';

export type TableHead = { key: string; head: string; figures: boolean };

/** A row as a table shows it: values to sort, filter and export by, and what stands in each cell. */
export type TableLine = {
  key: string;
  href: Href | null;
  values: readonly CsvCell[];
  shown: readonly ReactNode[];
};

export type TableLook = {
  caption: string;
  heads: readonly TableHead[];
  lines: readonly TableLine[];
  csvName: string | undefined;
  filter: boolean;
};

const MANY_ROWS = 10; // fewer can be read faster than a filter can be typed

/** Decimals that a column's numbers need, two at most, so that they line up. */
function decimalsOf(values: readonly CsvCell[]): number {
  const places = values.map((value) =>
    typeof value === 'number' ? (figure(value, 2).replace(/0+$/, '').split('.')[1] ?? '').length : 0,
  );
  return Math.max(0, ...places);
}

type Manner = { size: SizeName; decimals: number; names: boolean; leads: boolean };

function content(shown: ReactNode, { size, decimals, names, leads }: Manner): ReactNode {
  if (isValidElement(shown)) return shown;
  const words = typeof shown === 'number' ? figure(shown, decimals) : shown;
  return createElement(
    Text,
    { size, weight: names ? 'semibold' : 'regular', tone: leads ? 'water' : 'ink' },
    words,
  );
}

/** What a table shows, freed from what its rows are. */
export function tableLook<Row>(props: TableProps<Row>, size: SizeName): TableLook {
  const { caption, columns, rows, rowKey, href, csvName, filter } = props;
  const decimals = columns.map((column) => decimalsOf(rows.map((row) => column.value(row))));
  const manner = (at: number): Manner => ({
    size,
    decimals: decimals[at] ?? 0,
    names: at === 0,
    leads: at === 0 && href !== undefined,
  });
  return {
    caption,
    csvName,
    filter: filter ?? rows.length >= MANY_ROWS,
    heads: columns.map(({ key, head, figures = false }) => ({ key, head, figures })),
    lines: rows.map((row) => ({
      key: rowKey(row),
      href: href ? href(row) : null,
      values: columns.map((column) => column.value(row)),
      shown: columns.map((column, at) =>
        content(column.show ? column.show(row) : column.value(row), manner(at)),
      ),
    })),
  };
}
