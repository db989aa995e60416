import type { TableHead } from '@/components/table-lines';
import { cssType } from '@/constants/css-type';
import { space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type SortableHead = TableHead & { sorted: 'asc' | 'desc' | null; sort: () => void };

const spoken = { asc: 'ascending', desc: 'descending' } as const;
const arrow = { asc: '↑', desc: '↓' } as const;

/** The head of a wide table. It stays while the rows scroll; each head is a button that sorts. */
export function WideTableHead({ heads }: { heads: readonly SortableHead[] }) {
  const { colours } = useTheme();
  return (
    <thead>
      <tr>
        {heads.map(({ key, head, figures, sorted, sort }) => (
          <th
            key={key}
            scope="col"
            {...(sorted ? { 'aria-sort': spoken[sorted] } : {})}
            style={{
              position: 'sticky',
              top: 0,
              zIndex: 1,
              padding: 0,
              textAlign: figures ? 'right' : 'left',
              backgroundColor: colours.paper,
              borderBottom: `1px solid ${colours.edge}`,
            }}
          >
            <button
              type="button"
              onClick={sort}
              style={{
                ...cssType('small', sorted ? 'semibold' : 'regular'),
                minHeight: target.plain,
                minWidth: target.plain,
                padding: `0 ${String(space.small)}px`,
                border: 'none',
                background: 'none',
                color: sorted ? colours.ink : colours.inkSoft,
                cursor: 'pointer',
                textAlign: 'inherit',
              }}
            >
              {head}
              <span aria-hidden style={{ display: 'inline-block', width: 16, textAlign: 'center' }}>
                {sorted ? arrow[sorted] : ''}
              </span>
            </button>
          </th>
        ))}
      </tr>
    </thead>
  );
}
