import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { GaugeBoardView, LakeView, LevelRecorded } from '@mereward/shared/lakes/contract';
import { toMetres } from '@mereward/shared/units/length';
import { useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { Button } from '@/components/button';
import { ChoiceGrid } from '@/components/choice-grid';
import { Empty } from '@/components/empty';
import { Form } from '@/components/form';
import { FormField } from '@/components/form-field';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { lakeKeys, useLake } from '@/features/lakes/api';
import { recordLevel } from '@/features/surveys/api';
import { LevelKept } from '@/features/surveys/level-kept';
import { levelWords } from '@/features/surveys/visit-words';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { typedNumber } from '@/lib/typed-schemas';

/** Records what a gauge board reads, in the board's own unit. */
export function LevelScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const [boardId, setBoardId] = useState<string | null>(null);
  const boards = lake.data?.boards ?? [];
  const board =
    boards.find(({ id }) => id === boardId) ??
    boards.find(({ details }) => details.isDatumBoard) ??
    boards[0];
  if (lake.data?.may.recordLevel && board)
    return <LevelForm key={board.id} lake={lake.data} board={board} onBoard={setBoardId} />;
  return (
    <Page title="Record the level" back={{ label: 'Bank', href: '/bank' }}>
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) =>
          value.may.recordLevel ? (
            <Empty title="No gauge board yet">Give the lake a gauge board in the office first.</Empty>
          ) : (
            <Empty title="Not yours to record">Managers and bailiffs record the level.</Empty>
          )
        }
      </Loaded>
    </Page>
  );
}

const LevelDraft = z.object({
  reading: typedNumber({ what: 'The reading', min: -100, max: 9000 }),
  note: z.string().max(300, 'At most 300 letters.'),
  id: z.string(), // '' until it is first sent: a second try records it once
  at: z.string(),
});

type Props = { lake: LakeView; board: GaugeBoardView; onBoard: (boardId: string) => void };

function LevelForm({ lake, board, onBoard }: Props) {
  const queries = useQueryClient();
  const [kept, setKept] = useState<LevelRecorded | null>(null);
  const { unit, code } = board.details;
  const form: DraftForm<z.input<typeof LevelDraft>, z.output<typeof LevelDraft>> = useDraftForm({
    form: `level:${board.id}`,
    schema: LevelDraft,
    start: { reading: '', note: '', id: '', at: '' },
    send: (read) =>
      recordLevel(board.id, {
        ...idsOf(),
        levelM: toMetres(read.reading, unit),
        levelText: `${form.getValues('reading').trim()} ${unit}`,
        note: read.note.trim(),
      }),
    onDone: (answer) => {
      void queries.invalidateQueries({ queryKey: lakeKeys.one(lake.id) });
      setKept(answer);
      form.startAfresh();
    },
  });
  const idsOf = () => {
    const { id, at } = form.getValues();
    if (id !== '') return { id, at };
    const fresh = { id: newId(), at: new Date().toISOString() };
    form.setValue('id', fresh.id);
    form.setValue('at', fresh.at);
    return fresh;
  };
  return (
    <Page
      title="Record the level"
      over={lake.details.name}
      back={{ label: 'Bank', href: '/bank' }}
      actions={
        <Button
          label="Keep the reading"
          kind="main"
          bank
          grow
          busy={form.busy}
          busyLabel="Keeping…"
          onPress={form.submit}
        />
      }
    >
      <Form label="Level" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        {kept ? <LevelKept lake={lake} board={board} kept={kept} onTakenBack={() => setKept(null)} /> : null}
        <Text tone="inkSoft">{levelWords(lake)}</Text>
        {lake.boards.length > 1 ? (
          <ChoiceGrid
            label="Board"
            choices={lake.boards.map(({ id, details }) => ({
              key: id,
              label: details.code,
              note: details.isDatumBoard ? 'chart datum' : undefined,
            }))}
            value={board.id}
            onChange={onBoard}
          />
        ) : null}
        <FormField
          control={form.control}
          name="reading"
          label={`Board ${code} reads, ${unit === 'ft' ? 'feet' : 'metres'}`}
          hint="As it stands on the board, where the water meets it."
          keypad="decimal"
          bank
        />
        <FormField control={form.control} name="note" label="Note" optional bank />
      </Form>
    </Page>
  );
}
