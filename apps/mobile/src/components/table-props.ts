import type { ReactNode } from 'react';
import type { Href } from 'expo-router';
import type { CsvCell } from '@/lib/csv';

export type TableColumn<Row> = {
  key: string;
  head: string;
  /** What it sorts, filters and exports by. Numbers sort as numbers; null sorts last. */
  value: (row: Row) => CsvCell;
  /** What is shown in place of the value: a figure with its unit, a `StatusShape`. */
  show?: ((row: Row) => ReactNode) | undefined;
  /** Stands at the right, as figures do. */
  figures?: boolean | undefined;
};

export type TableProps<Row> = {
  /** Names the table to a screen reader, and the CSV. */
  caption: string;
  rows: readonly Row[];
  /** The first column names the row: it is the card's title on a phone and carries the link. */
  columns: readonly TableColumn<Row>[];
  rowKey: (row: Row) => string;
  href?: ((row: Row) => Href) | undefined;
  /** The file's name without its ending; without it there is no CSV. */
  csvName?: string | undefined;
  /** Hidden where there are few rows. On from ten rows unless told. */
  filter?: boolean | undefined;
};
