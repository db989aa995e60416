import { List, Row } from '@/components/list';
import { StatusShape } from '@/components/status-shape';
import { spansIn, type BoardCell } from '@/features/bookings/board-cells';
import type { BoardChoice } from '@/features/bookings/board-table-props';
import { SPAN_LOOKS, spanName, spanTimes, type BoardLine } from '@/features/bookings/board-words';

type Props = {
  caption: string;
  lines: readonly BoardLine[];
  day: BoardCell;
  zone: string;
  chosen: BoardChoice | null;
  onChoose: (choice: BoardChoice) => void;
};

/** The day's pegs one under another, for a phone. */
export function BoardList({ caption, lines, day, zone, chosen, onChoose }: Props) {
  return (
    <List label={caption}>
      {lines.map((line) => {
        const here = spansIn(line.spans, day);
        const [first] = here;
        const note = here.map((span) => `${spanName(span)}, ${spanTimes(span, zone)}`).join('\n');
        return (
          <Row
            key={line.key}
            title={line.pegId === null ? line.title : `Peg ${line.title}`}
            note={line.shut ?? (note === '' ? undefined : note)}
            chosen={chosen?.lineKey === line.key}
            onPress={() => onChoose({ lineKey: line.key, cell: day })}
            end={
              line.shut ? (
                <StatusShape shape="cross" tone="brick" word="not let" size="small" />
              ) : first ? (
                <StatusShape {...SPAN_LOOKS[first.state]} size="small" />
              ) : (
                <StatusShape shape="triangle" tone="reed" word="free" size="small" />
              )
            }
          />
        );
      })}
    </List>
  );
}
