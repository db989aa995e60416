import { useState } from 'react';
import { useRouter } from 'expo-router';
import type { GaugeBoardView, LakeView } from '@mereward/shared/lakes/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { LinkButton } from '@/components/link-button';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { PlaceField } from '@/features/charts/place-field';
import { NEW_BOARD, TypedBoard, typedBoard } from '@/features/lakes/board-fields';
import { BoardForm } from '@/features/lakes/board-form';
import { putBoard } from '@/features/lakes/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const Wanted = z.object({ details: TypedBoard });

/** Sets up a new gauge board. */
export function NewBoardScreen() {
  return (
    <OfficeLakePage title="A new gauge board" may="changePegs">
      {(lake) => <BoardFields lake={lake} board={null} />}
    </OfficeLakePage>
  );
}

/** A gauge board's form: a new one's or one's that stands. The first of a lake is offered as its datum board. */
export function BoardFields({ lake, board }: { lake: LakeView; board: GaugeBoardView | null }) {
  const router = useRouter();
  const [fresh] = useState(newId);
  const id = board?.id ?? fresh;
  const version = board?.version ?? null;
  const isFirst = !lake.boards.some(({ details }) => details.isDatumBoard);
  const form = useDraftForm({
    form: `board:${lake.id}:${board ? `${id}:${String(version)}` : 'new'}`,
    schema: Wanted,
    start: { details: board ? typedBoard(board.details) : { ...NEW_BOARD, isDatumBoard: isFirst } },
    send: ({ details }) => putBoard({ lakeId: lake.id, id }, { details, version }),
    onDone: () => router.replace(`/office/lakes/${lake.id}/boards/${id}`),
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Gauge board"
        act="Keep the board"
        busyLabel="Keeping…"
        beside={<LinkButton label="Leave it" href={`/office/lakes/${lake.id}`} />}
      >
        <BoardForm />
        <PlaceField lake={lake} label={form.watch('details.code') || 'the board'} />
      </DraftFormFrame>
    </FormProvider>
  );
}
