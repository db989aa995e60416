import { List, Row } from '@/components/list';
import { spansIn } from '@/features/bookings/board-cells';
import type { BoardTableProps } from '@/features/bookings/board-table-props';
import { spanWords } from '@/features/bookings/board-words';

/** Off the web there is no table: each peg's spans in words. */
export function BoardTable({ caption, lines, cells, zone, onChoose }: BoardTableProps) {
  const [cell] = cells;
  const window = { fromMs: cell?.fromMs ?? 0, untilMs: cells.at(-1)?.untilMs ?? 0 };
  return (
    <List label={caption}>
      {lines.map((line) => (
        <Row
          key={line.key}
          title={line.title}
          note={spansIn(line.spans, window)
            .map((span) => spanWords(span, zone))
            .join('; ')}
          {...(cell ? { onPress: () => onChoose({ lineKey: line.key, cell }) } : {})}
        />
      ))}
    </List>
  );
}
