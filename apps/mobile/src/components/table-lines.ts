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

function content(shown: ReactNode, size: SizeName): ReactNode {
  if (isValidElement(shown)) return shown;
  const words = typeof shown === 'number' ? figure(shown, Number.isInteger(shown) ? 0 : 2) : shown;
  return createElement(Text, { size }, words);
}

/** What a table shows, freed from what its rows are. */
export function tableLook<Row>(props: TableProps<Row>, size: SizeName): TableLook {
  const { caption, columns, rows, rowKey, href, csvName, filter } = props;
  return {
    caption,
    csvName,
    filter: filter ?? rows.length >= MANY_ROWS,
    heads: columns.map(({ key, head, figures = false }) => ({ key, head, figures })),
    lines: rows.map((row) => ({
      key: rowKey(row),
      href: href ? href(row) : null,
      values: columns.map((column) => column.value(row)),
      shown: columns.map((column) => content(column.show ? column.show(row) : column.value(row), size)),
    })),
  };
}
