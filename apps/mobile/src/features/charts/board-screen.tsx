import { useLocalSearchParams } from 'expo-router';
import type { GaugeBoardView, LakeView } from '@mereward/shared/lakes/contract';
import { Disclosure } from '@/components/disclosure';
import { Empty } from '@/components/empty';
import { NewerNote } from '@/components/newer-note';
import { Page } from '@/components/page';
import { Loaded } from '@/components/loaded';
import { BoardFields } from '@/features/charts/board-form-screen';
import { useLake } from '@/features/lakes/api';
import { LevelForm } from '@/features/lakes/level-form';
import { ReadingsTable } from '@/features/lakes/readings-table';
import { useHeld } from '@/hooks/use-held';

/** One gauge board: record a reading, the board itself, and the readings so far. */
export function BoardScreen() {
  const { lakeId, boardId } = useLocalSearchParams<{ lakeId: string; boardId: string }>();
  const lake = useLake(lakeId);
  const board = lake.data?.boards.find(({ id }) => id === boardId);
  return (
    <Page
      width="wide"
      title={board ? `Gauge board ${board.details.code}` : 'Gauge board'}
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: lake.data?.details.name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Loaded
        query={lake}
        waiting="Reading the board…"
        empty={{
          when: () => board === undefined,
          show: <Empty title="No such board">Go back to the lake and look again.</Empty>,
        }}
      >
        {(value) => (board ? <Board lake={value} now={board} /> : null)}
      </Loaded>
    </Page>
  );
}

function Board({ lake, now }: { lake: LakeView; now: GaugeBoardView }) {
  const { held, hold, newer } = useHeld(now);
  return (
    <>
      {lake.may.recordLevel ? <LevelForm lake={lake} board={now} /> : null}
      {lake.may.changePegs ? (
        <Disclosure title="The board itself">
          {newer ? <NewerNote what="this board" onTake={() => hold(newer)} /> : null}
          <BoardFields key={held.version} lake={lake} board={held} />
        </Disclosure>
      ) : null}
      <ReadingsTable lake={lake} board={now} />
    </>
  );
}
