import type { CSSProperties } from 'react';
import { cssType } from '@/constants/css-type';
import { space } from '@/constants/layout';
import { Shape } from '@/components/shape';
import type { Colours } from '@/constants/colours';
import { darkParts, spansIn, type BoardCell, type PlacedSpan } from '@/features/bookings/board-cells';
import { SPAN_LOOKS, spanName, spanWords, type BoardLine } from '@/features/bookings/board-words';
import { useTheme } from '@/hooks/use-theme';
import { dayName } from '@/lib/format-time';

const LANE_PX = 36;
const PAD_PX = 6;

type Props = {
  line: BoardLine;
  row: number;
  cells: readonly BoardCell[];
  placed: readonly PlacedSpan[];
  zone: string;
  place: readonly [number, number] | null;
  /** Now, in columns from the left; null when it is not on the board. */
  now: number | null;
  /** The column that Tab comes to in this row; null when it is another row's. */
  focusAt: number | null;
  chosenKey: string | null;
  onFocus: (column: number) => void;
  onChoose: (cell: BoardCell) => void;
};

const TINTS = { held: 'amberTint', taken: 'waterTint', blocked: 'paper', closed: 'brickTint' } as const;

/** The night of a column as a soft shade under everything. */
function shade(cell: BoardCell, { place, zone }: Props, colours: Colours): string | undefined {
  if (!place) return undefined;
  const parts = darkParts(cell, place, zone).map(([start, end]) => {
    const [from, to] = [start, end].map((share) => `${(share * 100).toFixed(1)}%`);
    return `transparent ${from}, ${colours.rule}66 ${from}, ${colours.rule}66 ${to}, transparent ${to}`;
  });
  return parts.length === 0 ? undefined : `linear-gradient(to right, ${parts.join(', ')})`;
}

const cellWords = ({ line, zone }: Props, cell: BoardCell): string => {
  const here = spansIn(line.spans, cell).map((span) => spanWords(span, zone));
  const when = cell.clock ? `${dayName(cell.day)}, ${cell.clock}` : dayName(cell.day);
  const what = line.shut ?? (here.length > 0 ? here.join('; ') : 'free');
  return `${line.pegId === null ? line.title : `Peg ${line.title}`}, ${when}: ${what}`;
};

/** One peg's time: a cell a column, its spans drawn over them from where they begin. */
export function BoardRow(props: Props) {
  const { line, row, cells, placed, now, focusAt, chosenKey, onFocus, onChoose } = props;
  const { colours } = useTheme();
  const lanes = Math.max(1, ...placed.map(({ lane }) => lane + 1));
  const height = lanes * LANE_PX + 2 * PAD_PX;
  return (
    <tr>
      <th
        scope="row"
        style={{
          ...cssType('small', 'semibold'),
          position: 'sticky',
          left: 0,
          zIndex: 2,
          padding: space.small,
          textAlign: 'left',
          color: colours.ink,
          backgroundColor: colours.paper,
          borderBottom: `1px solid ${colours.rule}`,
          borderRight: `1px solid ${colours.edge}`,
        }}
      >
        {line.title}
        {line.shut ? (
          <span style={{ ...cssType('tiny'), display: 'block', color: colours.brick }}>not let</span>
        ) : null}
      </th>
      {cells.map((cell, column) => (
        <td
          key={cell.key}
          data-at={`${String(row)}.${String(column)}`}
          tabIndex={focusAt === column ? 0 : -1}
          aria-label={cellWords(props, cell)}
          aria-selected={chosenKey === cell.key}
          onFocus={() => onFocus(column)}
          onClick={() => onChoose(cell)}
          style={{
            position: 'relative',
            height,
            padding: 0,
            cursor: 'pointer',
            borderBottom: `1px solid ${colours.rule}`,
            borderLeft: `1px solid ${colours.rule}`,
            backgroundColor: chosenKey === cell.key ? colours.floatTint : colours.sheet,
            backgroundImage: shade(cell, props, colours),
            boxShadow: chosenKey === cell.key ? `inset 0 0 0 2px ${colours.float}` : undefined,
          }}
        >
          {placed
            .filter(({ at }) => Math.floor(at) === column)
            .map((each) => (
              <Span
                key={`${each.span.from}.${String(each.lane)}`}
                placed={each}
                column={column}
                colours={colours}
              />
            ))}
          {now !== null && Math.floor(now) === column ? (
            <div
              aria-hidden
              style={{
                position: 'absolute',
                zIndex: 1,
                top: 0,
                bottom: 0,
                left: `${String((now - column) * 100)}%`,
                width: 2,
                backgroundColor: colours.float,
                pointerEvents: 'none',
              }}
            />
          ) : null}
        </td>
      ))}
    </tr>
  );
}

type SpanProps = { placed: PlacedSpan; column: number; colours: Colours };

/** A span, drawn from its first column over those that follow; presses fall through to the columns under it. */
function Span({ placed: { span, at, to, fishingTo, lane }, column, colours }: SpanProps) {
  const look = SPAN_LOOKS[span.state];
  const wide = (columns: number): string => `${(Math.max(0, columns) * 100).toFixed(2)}%`;
  const box: CSSProperties = {
    position: 'absolute',
    top: PAD_PX + lane * LANE_PX,
    height: LANE_PX - 4,
    left: wide(at - column),
    pointerEvents: 'none',
  };
  return (
    <>
      {fishingTo < to ? (
        <div
          aria-hidden
          style={{
            ...box,
            zIndex: 1,
            top: PAD_PX + lane * LANE_PX + LANE_PX / 2 - 4,
            height: 4,
            width: wide(to - at),
            backgroundColor: colours.edge,
          }}
        />
      ) : null}
      <div
        aria-hidden
        title={spanName(span)}
        style={{
          ...box,
          zIndex: 1,
          boxSizing: 'border-box',
          width: wide(fishingTo - at),
          minWidth: 18,
          display: 'flex',
          alignItems: 'center',
          gap: 2,
          overflow: 'hidden',
          whiteSpace: 'nowrap',
          border: `1px ${span.state === 'held' ? 'dashed' : 'solid'} ${colours[look.tone]}`,
          borderRadius: 4,
          backgroundColor: colours[TINTS[span.state]],
          color: colours.ink,
          ...cssType('tiny', 'semibold'),
        }}
      >
        <Shape name={look.shape} colour={colours[look.tone]} />
        <span style={{ overflow: 'hidden', textOverflow: 'ellipsis' }}>{spanName(span)}</span>
      </div>
    </>
  );
}
