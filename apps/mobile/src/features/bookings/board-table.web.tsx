import { useRef, useState, type CSSProperties, type KeyboardEvent } from 'react';
import { cssType } from '@/constants/css-type';
import { space } from '@/constants/layout';
import { placeOf, placedSpans } from '@/features/bookings/board-cells';
import { BoardRow } from '@/features/bookings/board-row.web';
import type { BoardTableProps } from '@/features/bookings/board-table-props';
import { movedTo } from '@/features/bookings/board-moves';
import { useTheme } from '@/hooks/use-theme';
import { dayName } from '@/lib/format-time';

const LEAST_CELL_PX = { day: 62, hours: 44 } as const;
export const HEAD_PX = 78;

/** "Sat 4 Jul" of "Sat 4 July 2026". */
function shortDay(day: string): string {
  const [weekday = '', date = '', month = ''] = dayName(day).split(' ');
  return `${weekday} ${date} ${month.slice(0, 3)}`;
}

/** Pegs against time as a real table: head and pegs stay while it scrolls; the arrow keys move, Enter opens. */
export function BoardTable(props: BoardTableProps) {
  const { caption, lines, cells, zone, place, nowMs, chosen, onChoose } = props;
  const { colours } = useTheme();
  const table = useRef<HTMLTableElement>(null);
  const [focus, setFocus] = useState<readonly [number, number]>([0, 0]);
  const at: readonly [number, number] = [
    Math.min(focus[0], Math.max(0, lines.length - 1)),
    Math.min(focus[1], Math.max(0, cells.length - 1)),
  ];
  const now = placeOf(nowMs, cells);
  const isToday = nowMs >= (cells[0]?.fromMs ?? Infinity) && now < cells.length;
  const least = cells[0]?.clock ? LEAST_CELL_PX.hours : LEAST_CELL_PX.day;

  const move = (event: KeyboardEvent): void => {
    const to = movedTo(event.key, at, [lines.length, cells.length]);
    const [line, cell] = [lines[at[0]], cells[at[1]]];
    if ((event.key === 'Enter' || event.key === ' ') && line && cell) {
      event.preventDefault();
      onChoose({ lineKey: line.key, cell });
      return;
    }
    if (!to) return;
    event.preventDefault();
    setFocus(to);
    const found = table.current?.querySelector(`[data-at="${String(to[0])}.${String(to[1])}"]`);
    if (found instanceof HTMLElement) found.focus();
  };

  const sticky: CSSProperties = {
    position: 'sticky',
    backgroundColor: colours.paper,
    borderBottom: `1px solid ${colours.edge}`,
    ...cssType('small', 'semibold'),
    color: colours.ink,
  };
  return (
    <div style={{ position: 'absolute', inset: 0, overflow: 'auto' }}>
      <table
        ref={table}
        role="grid"
        aria-label={caption}
        onKeyDown={move}
        style={{
          borderCollapse: 'separate',
          borderSpacing: 0,
          tableLayout: 'fixed',
          width: '100%',
          minWidth: HEAD_PX + cells.length * least,
        }}
      >
        <colgroup>
          <col style={{ width: HEAD_PX }} />
        </colgroup>
        <thead>
          <tr>
            <th
              scope="col"
              style={{ ...sticky, top: 0, left: 0, zIndex: 4, textAlign: 'left', padding: space.small }}
            >
              Peg
            </th>
            {cells.map(({ key, day, clock }, column) => (
              <th
                key={key}
                scope="col"
                style={{
                  ...sticky,
                  top: 0,
                  zIndex: 3,
                  padding: `${String(space.small)}px ${String(space.hair)}px`,
                  textAlign: 'left',
                  borderLeft: `1px solid ${colours.rule}`,
                  overflowWrap: 'anywhere',
                }}
              >
                {clock ?? shortDay(day)}
                {isToday && Math.floor(now) === column ? (
                  <span style={{ ...cssType('tiny', 'semibold'), display: 'block', color: colours.float }}>
                    now
                  </span>
                ) : null}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {lines.map((line, row) => (
            <BoardRow
              key={line.key}
              line={line}
              row={row}
              cells={cells}
              placed={placedSpans(line.spans, cells)}
              zone={zone}
              place={place}
              now={isToday ? now : null}
              focusAt={row === at[0] ? at[1] : null}
              chosenKey={chosen?.lineKey === line.key ? chosen.cell.key : null}
              onFocus={(column) => setFocus([row, column])}
              onChoose={(cell) => onChoose({ lineKey: line.key, cell })}
            />
          ))}
        </tbody>
      </table>
    </div>
  );
}
