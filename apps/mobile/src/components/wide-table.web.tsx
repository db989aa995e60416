import { useMemo, useState } from 'react';
import {
  columnFilteringFeature,
  createFilteredRowModel,
  createSortedRowModel,
  globalFilteringFeature,
  rowSortingFeature,
  tableFeatures,
  useTable,
  type Row,
} from '@tanstack/react-table';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Text } from '@/components/text';
import type { TableLine, TableLook } from '@/components/table-lines';
import { compareCells, lineHolds } from '@/components/table-order';
import { WideTableHead } from '@/components/wide-table-head';
import { WideTableRow } from '@/components/wide-table-row';
import { space } from '@/constants/layout';
import { csvOf } from '@/lib/csv';
import { saveText } from '@/lib/save-file';

const features = tableFeatures({
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  columnFilteringFeature,
  globalFilteringFeature,
  filteredRowModel: createFilteredRowModel(),
});
type Features = typeof features;

const holds = (row: Row<Features, TableLine>, _column: string, typed: string): boolean =>
  lineHolds(row.original, typed);

/** Columns read a line's values by place; nothing known sorts last either way. */
const columnsFor = (heads: TableLook['heads']) =>
  heads.map(({ key }, at) => ({
    id: key,
    accessorFn: (line: TableLine) => line.values[at] ?? undefined,
    sortUndefined: 'last' as const,
    sortFn: (one: Row<Features, TableLine>, other: Row<Features, TableLine>) =>
      compareCells(one.original.values[at], other.original.values[at]),
    sortDescFirst: false,
  }));

/** A table's rows as a real table: sort by any head, filter by words, head that stays, CSV of what is shown. */
export function WideTable({ caption, heads, lines, csvName, filter }: TableLook) {
  const [typed, setTyped] = useState('');
  const columns = useMemo(() => columnsFor(heads), [heads]);
  const table = useTable({
    features,
    columns,
    data: lines,
    state: { globalFilter: typed },
    globalFilterFn: holds,
    getColumnCanGlobalFilter: () => true,
    getRowId: (line) => line.key,
  });
  const shown = table.getRowModel().rows.map((row) => row.original);
  const save = (): void => {
    const csv = csvOf(
      heads.map(({ head }) => head),
      shown.map((line) => line.values),
    );
    void saveText(`${csvName ?? 'table'}.csv`, csv, 'text/csv;charset=utf-8');
  };
  return (
    <View style={{ gap: space.medium }}>
      {filter || csvName ? (
        <View style={{ flexDirection: 'row', alignItems: 'flex-end', gap: space.page }}>
          {filter ? (
            <View style={{ width: 280 }}>
              <Field label="Find" keypad="search" value={typed} onChange={setTyped} />
            </View>
          ) : null}
          <Text role="status" size="small" tone="inkSoft" style={{ flex: 1, paddingBottom: space.medium }}>
            {shown.length === lines.length
              ? `${String(lines.length)} rows`
              : `${String(shown.length)} of ${String(lines.length)} rows`}
          </Text>
          {csvName ? <Button label="Save as CSV" onPress={save} /> : null}
        </View>
      ) : null}
      <table aria-label={caption} style={{ width: '100%', borderCollapse: 'separate', borderSpacing: 0 }}>
        <WideTableHead
          heads={heads.map((head) => ({
            ...head,
            sorted: table.getColumn(head.key)?.getIsSorted() || null,
            sort: () => table.getColumn(head.key)?.toggleSorting(),
          }))}
        />
        <tbody>
          {shown.map((line) => (
            <WideTableRow key={line.key} heads={heads} line={line} />
          ))}
        </tbody>
      </table>
      {shown.length === 0 ? <Text tone="inkSoft">Nothing here holds those words.</Text> : null}
    </View>
  );
}
