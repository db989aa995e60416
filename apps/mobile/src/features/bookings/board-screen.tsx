import { useEffect, useMemo, useState } from 'react';
import type { BoardView } from '@mereward/shared/bookings/availability-contract';
import { ScrollView, View } from 'react-native';
import { Age } from '@/components/age';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Sheet } from '@/components/sheet';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { useBoard } from '@/features/bookings/board-api';
import { BoardBar } from '@/features/bookings/board-bar';
import { boardCells, daysOf, type BoardCell, type Zoom } from '@/features/bookings/board-cells';
import { BoardDetail } from '@/features/bookings/board-detail';
import { BoardList } from '@/features/bookings/board-list';
import { BoardTable } from '@/features/bookings/board-table';
import type { BoardChoice } from '@/features/bookings/board-table-props';
import { boardLines, SPAN_LOOKS } from '@/features/bookings/board-words';
import { useBoardEvents } from '@/features/bookings/use-board-events';
import { useBoardPlace } from '@/features/bookings/use-board-place';
import { useFishery } from '@/features/fisheries/office-api';
import { useMyLakes } from '@/features/fisheries/use-my-lakes';
import { useLake } from '@/features/lakes/api';
import { themed } from '@/hooks/themed';
import { useThreeColumns, useWide } from '@/hooks/use-wide';
import { civilTime } from '@/lib/zoned-time';

const READERS = ['owner', 'manager', 'office', 'head_bailiff', 'bailiff'] as const;
const MINUTE_MS = 60_000;

const useStyles = themed((c) => ({
  page: {
    flex: 1,
    minHeight: 0,
    gap: space.medium,
    paddingHorizontal: space.page,
    paddingBottom: space.page,
  },
  board: { flex: 1, minHeight: 0, flexDirection: 'row', gap: space.page },
  table: { flex: 1, minWidth: 0, borderWidth: 1, borderColor: c.rule, backgroundColor: c.sheet },
  detail: { width: 330, flexGrow: 0, flexShrink: 0 },
  key: { flexDirection: 'row', flexWrap: 'wrap', gap: space.page },
}));

/** Every peg of a lake against time: who has which, what is kept back, what is closed. */
export function BoardScreen() {
  const { fisheries, lakes } = useMyLakes(READERS);
  const wide = useWide();
  return (
    <Page title="The board" fill={wide} width="wide" back={{ label: 'Office', href: '/office' }}>
      <Loaded
        query={fisheries}
        waiting="Reading the lakes…"
        empty={{
          when: () => lakes.length === 0,
          show: (
            <Empty title="No lake yet" action={<LinkButton label="To the office" href="/office" />}>
              The board shows the pegs of a lake. Draw the lake and its pegs first.
            </Empty>
          ),
        }}
      >
        {() => <Board lakes={lakes} />}
      </Loaded>
    </Page>
  );
}

function useNowMs(): number {
  const [nowMs, setNowMs] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNowMs(Date.now()), MINUTE_MS);
    return () => clearInterval(timer);
  }, []);
  return nowMs;
}

type Lakes = ReturnType<typeof useMyLakes>['lakes'];

function Board({ lakes }: { lakes: Lakes }) {
  const styles = useStyles();
  const wide = useWide();
  const nowMs = useNowMs();
  const [first] = lakes;
  const zone = useFishery(first?.fisheryId ?? '').data?.details.zone ?? 'Europe/London';
  const today = civilTime(nowMs, zone).slice(0, 10);
  const { place, moveTo } = useBoardPlace({ lakeIds: lakes.map(({ id }) => id), today });
  const zoom: Zoom = wide ? place.zoom : 'day';
  useBoardEvents(lakes.find(({ id }) => id === place.lakeId)?.fisheryId ?? first?.fisheryId ?? '');
  const board = useBoard(place.lakeId, place.from, daysOf(zoom));
  const [choice, setChoice] = useState<BoardChoice | null>(null);
  const { data, error, isFetching, dataUpdatedAt, refetch } = board;
  const cells = useMemo(
    () => boardCells(place.from, zoom, data?.zone ?? zone),
    [place.from, zoom, data?.zone, zone],
  );
  return (
    <View style={wide ? styles.page : { gap: space.medium }}>
      <BoardBar
        place={{ ...place, zoom }}
        today={today}
        lakes={lakes}
        zooms={wide}
        onMove={(to) => {
          setChoice(null);
          moveTo(to);
        }}
      />
      {error && !data ? <ProblemNote problem={error} onRetry={() => void refetch()} /> : null}
      {data ? (
        <>
          <View style={styles.key}>
            {Object.values(SPAN_LOOKS).map((look) => (
              <StatusShape key={look.word} {...look} size="small" />
            ))}
            {wide ? (
              <Text size="small" tone="inkSoft">
                Shaded: sunset to sunrise.
              </Text>
            ) : null}
            <Age readAtMs={dataUpdatedAt} reading={isFetching} failed={error !== null} />
          </View>
          <Laid board={data} cells={cells} nowMs={nowMs} choice={choice} onChoose={setChoice} />
        </>
      ) : error ? null : (
        <Waiting words="Reading the board…" />
      )}
    </View>
  );
}

type LaidProps = {
  board: BoardView;
  cells: readonly BoardCell[];
  nowMs: number;
  choice: BoardChoice | null;
  onChoose: (choice: BoardChoice | null) => void;
};

/** The board with what was chosen on it beside it, or over it where there is no room. */
function Laid({ board, cells, nowMs, choice, onChoose }: LaidProps) {
  const styles = useStyles();
  const wide = useWide();
  const roomy = useThreeColumns();
  const lake = useLake(board.lakeId);
  const lines = boardLines(board);
  const line = lines.find(({ key }) => key === choice?.lineKey);
  const caption = `Board of ${board.lakeName}`;
  const detail =
    line && choice ? (
      <BoardDetail key={`${line.key}.${choice.cell.key}`} board={board} line={line} choice={choice} />
    ) : null;
  if (lines.length === 0)
    return (
      <Empty
        title="No peg yet"
        action={<LinkButton label="Place the first" href={`/office/lakes/${board.lakeId}/pegs/new`} />}
      >
        {`${board.lakeName} has no pegs to let.`}
      </Empty>
    );
  const sheet = (
    <Sheet open={detail !== null && !roomy} onClose={() => onChoose(null)} title="On the board">
      {detail}
    </Sheet>
  );
  if (!wide) {
    const day: BoardCell = {
      key: 'day',
      day: cells[0]?.day ?? '',
      clock: null,
      fromMs: cells[0]?.fromMs ?? 0,
      untilMs: cells.at(-1)?.untilMs ?? 0,
    };
    return (
      <>
        <BoardList
          caption={caption}
          lines={lines}
          day={day}
          zone={board.zone}
          chosen={choice}
          onChoose={onChoose}
        />
        {sheet}
      </>
    );
  }
  return (
    <View style={styles.board}>
      <View style={styles.table}>
        <BoardTable
          caption={caption}
          lines={lines}
          cells={cells}
          zone={board.zone}
          place={lake.data?.origin ?? null}
          nowMs={nowMs}
          chosen={choice}
          onChoose={onChoose}
        />
      </View>
      {roomy ? (
        <ScrollView style={styles.detail} contentContainerStyle={{ gap: space.medium }}>
          {detail ?? (
            <Text tone="inkSoft">
              Choose a peg and a day: press it, or walk there with the arrow keys and press Enter.
            </Text>
          )}
        </ScrollView>
      ) : (
        sheet
      )}
    </View>
  );
}
