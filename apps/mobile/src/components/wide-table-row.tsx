import { Link } from 'expo-router';
import type { TableHead, TableLine } from '@/components/table-lines';
import { cssType } from '@/constants/css-type';
import { space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = { heads: readonly TableHead[]; line: TableLine };

/** One row of a wide table; its first cell names it and carries the link. */
export function WideTableRow({ heads, line }: Props) {
  const { colours } = useTheme();
  return (
    <tr>
      {heads.map(({ key, figures }, at) => {
        const style = {
          ...cssType('small'),
          height: target.plain,
          padding: `0 ${String(space.small)}px`,
          textAlign: figures ? ('right' as const) : ('left' as const),
          borderBottom: `1px solid ${colours.rule}`,
          color: colours.ink,
        };
        if (at > 0)
          return (
            <td key={key} style={style}>
              <div style={{ display: 'flex', justifyContent: figures ? 'flex-end' : 'flex-start' }}>
                {line.shown[at]}
              </div>
            </td>
          );
        return (
          <th key={key} scope="row" style={{ ...style, fontWeight: 600 }}>
            {line.href === null ? (
              line.shown[0]
            ) : (
              <Link
                href={line.href}
                style={{
                  color: colours.water,
                  textDecorationLine: 'underline',
                  display: 'flex',
                  alignItems: 'center',
                  minHeight: target.plain,
                  minWidth: target.plain,
                }}
              >
                {line.shown[0]}
              </Link>
            )}
          </th>
        );
      })}
    </tr>
  );
}
