import { useState } from 'react';
import type { BoardSpan, BoardView } from '@mereward/shared/bookings/availability-contract';
import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Heading } from '@/components/heading';
import { Kept } from '@/components/kept';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { BlockForm } from '@/features/bookings/block-form';
import { useRemoveBlock } from '@/features/bookings/board-api';
import { spansIn } from '@/features/bookings/board-cells';
import type { BoardChoice } from '@/features/bookings/board-table-props';
import { useOfficeBooking } from '@/features/bookings/office-api';
import { paidWords } from '@/features/bookings/paid-words';
import { StaffDeeds } from '@/features/bookings/staff-deeds';
import { SPAN_LOOKS, spanName, spanTimes, type BoardLine } from '@/features/bookings/board-words';
import { themed } from '@/hooks/themed';
import { dayName } from '@/lib/format-time';

const useStyles = themed((c) => ({
  span: {
    gap: space.small,
    padding: space.medium,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: radius.control,
    backgroundColor: c.sheet,
  },
}));

type Props = { board: BoardView; line: BoardLine; choice: BoardChoice };

/** What lies on the chosen peg at the chosen time, and what may be done there. */
export function BoardDetail({ board, line, choice: { cell } }: Props) {
  const here = spansIn(line.spans, cell);
  const [blocking, setBlocking] = useState(false);
  const [kept, setKept] = useState<string | null>(null);
  return (
    <View style={{ gap: space.medium }}>
      <Heading level={2}>{line.pegId === null ? 'Choosing on arrival' : `Peg ${line.title}`}</Heading>
      <Text tone="inkSoft">
        {cell.clock ? `${dayName(cell.day)}, from ${cell.clock}` : dayName(cell.day)}
      </Text>
      {line.shut ? (
        <Note kind="danger" title="It can’t be let">
          {line.shut}
        </Note>
      ) : null}
      {here.map((span) => (
        <Span
          key={`${span.from}.${span.booking?.id ?? span.blockId ?? span.state}`}
          board={board}
          span={span}
        />
      ))}
      {here.length === 0 && !line.shut ? (
        <StatusShape shape="triangle" tone="reed" word="free all this time" />
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {board.may.book && !line.shut && line.pegId !== null ? (
          <LinkButton
            label="Book for somebody"
            kind={here.length === 0 ? 'main' : 'plain'}
            href={`/office/bookings/new?lakeId=${board.lakeId}&pegId=${line.pegId}&day=${cell.day}`}
          />
        ) : null}
        {board.may.block && line.pegId !== null ? (
          <Button label="Keep pegs back" onPress={() => setBlocking(!blocking)} />
        ) : null}
      </View>
      <Kept words={kept} />
      {blocking ? (
        <BlockForm
          board={board}
          pegId={line.pegId}
          day={cell.day}
          onDone={({ title, pegs }) => {
            setBlocking(false);
            setKept(`Kept back for “${title}”: ${pegs.map(({ number }) => number).join(', ')}.`);
          }}
        />
      ) : null}
    </View>
  );
}

function Span({ board, span }: { board: BoardView; span: BoardSpan }) {
  const styles = useStyles();
  const { booking, blockId } = span;
  return (
    <View style={styles.span}>
      <StatusShape {...SPAN_LOOKS[span.state]} />
      {booking || span.words ? <Text weight="semibold">{spanName(span)}</Text> : null}
      <Text>{spanTimes(span, board.zone)}</Text>
      {booking ? (
        <>
          <Text tone="inkSoft">
            {`${bookingCodeWords(booking.code)} · ${String(booking.people)} ${booking.people === 1 ? 'person' : 'people'}, ${String(booking.rods)} ${booking.rods === 1 ? 'rod' : 'rods'}`}
          </Text>
          <WholeBooking bookingId={booking.id} />
        </>
      ) : null}
      {blockId && board.may.block ? (
        <GiveBack board={board} blockId={blockId} title={spanName(span)} />
      ) : null}
    </View>
  );
}

/** The booking with all that may be done with it, opened in place; its own page is a link away. */
function WholeBooking({ bookingId }: { bookingId: string }) {
  const booking = useOfficeBooking(bookingId);
  return (
    <Loaded query={booking} waiting="Reading the booking…">
      {(value) => (
        <>
          <Text>{paidWords(value)}</Text>
          {value.notYet.map((why) => (
            <Text key={why} tone="amber">
              {why}
            </Text>
          ))}
          <StaffDeeds booking={value} />
          <View style={{ alignItems: 'flex-start' }}>
            <LinkButton label="All of it" href={`/office/bookings/${bookingId}`} kind="quiet" />
          </View>
        </>
      )}
    </Loaded>
  );
}

type GiveBackProps = { board: BoardView; blockId: string; title: string };

function GiveBack({ board, blockId, title }: GiveBackProps) {
  const [asking, setAsking] = useState(false);
  const remove = useRemoveBlock(board.fisheryId);
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <Button label="Give the pegs back" onPress={() => setAsking(true)} />
      <ProblemNote problem={remove.error} />
      <Confirm
        open={asking}
        title={`Give back the pegs of “${title}”?`}
        words="Every peg kept back for it can be booked again, by anybody."
        act="Give them back"
        busy={remove.isPending}
        onClose={() => setAsking(false)}
        onAct={() => remove.mutate(blockId, { onSettled: () => setAsking(false) })}
      />
    </View>
  );
}
