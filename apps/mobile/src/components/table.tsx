import { lazy, Suspense } from 'react';
import { CardTable } from '@/components/card-table';
import { tableLook } from '@/components/table-lines';
import type { TableProps } from '@/components/table-props';
import { Waiting } from '@/components/waiting';
import { useWide } from '@/hooks/use-wide';

// The table's machinery is large and only wide screens use it, so it is fetched when one does; with no signal and never
// fetched before, the rows are shown as cards.
const WideTable = lazy(async () => ({
  default: await import('@/components/wide-table').then(
    (loaded) => loaded.WideTable,
    () => CardTable,
  ),
}));

/** Rows of things: a real table on a wide screen (sort, filter, sticky head, CSV out), cards on a phone. */
export function Table<Row>(props: TableProps<Row>) {
  const wide = useWide();
  if (!wide) return <CardTable {...tableLook(props, 'body')} />;
  return (
    <Suspense fallback={<Waiting words="Laying out the table…" />}>
      <WideTable {...tableLook(props, 'small')} />
    </Suspense>
  );
}
