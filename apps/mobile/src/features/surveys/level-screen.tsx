import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { GaugeBoardView, LakeView, LevelRecorded } from '@mereward/shared/lakes/contract';
import { toMetres } from '@mereward/shared/units/length';
import { z } from 'zod';
import { ChoiceGrid } from '@/components/choice-grid';
import { Empty } from '@/components/empty';
import { Form } from '@/components/form';
import { FormField } from '@/components/form-field';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Text } from '@/components/text';
import { useLake } from '@/features/lakes/api';
import { recordLevelHere, type Kept } from '@/features/surveys/keep-here';
import { LevelKept } from '@/features/surveys/level-kept';
import { levelWords } from '@/features/surveys/visit-words';
import { draftName, useAgain, type Again } from '@/hooks/use-again';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { useSession } from '@/lib/session';
import { typedNumber } from '@/lib/typed-schemas';

/** Records what a gauge board reads, in the board's own unit. */
export function LevelScreen() {
  const { lakeId, boardId: asked } = useLocalSearchParams<{ lakeId: string; boardId?: string }>();
  const lake = useLake(lakeId);
  const again = useAgain();
  const [boardId, setBoardId] = useState<string | null>(asked ?? null);
  const boards = lake.data?.boards ?? [];
  const board =
    boards.find(({ id }) => id === boardId) ??
    boards.find(({ details }) => details.isDatumBoard) ??
    boards[0];
  if (lake.data?.may.recordLevel && board && again)
    return <LevelForm key={board.id} lake={lake.data} board={board} again={again} onBoard={setBoardId} />;
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

type Props = { lake: LakeView; board: GaugeBoardView; again: Again; onBoard: (boardId: string) => void };

const UNREAD = { reading: '', note: '', id: '', at: '' };

function LevelForm({ lake, board, again, onBoard }: Props) {
  const router = useRouter();
  const { account } = useSession();
  const [kept, setKept] = useState<Kept<LevelRecorded> | null>(null);
  const { unit, code } = board.details;
  const form: DraftForm<z.input<typeof LevelDraft>, z.output<typeof LevelDraft>> = useDraftForm({
    form: draftName(`level:${board.id}`, again),
    schema: LevelDraft,
    start: { ...again.over(UNREAD), id: '', ...(again.timeRefused ? { at: '' } : {}) },
    send: (read) => {
      const levelText = `${form.getValues('reading').trim()} ${unit}`;
      const reading = { ...idsOf(), levelM: toMetres(read.reading, unit), levelText, note: read.note.trim() };
      const typed = form.getValues();
      return recordLevelHere({ lake, board, reading, typed, by: account?.name ?? '' }, again.instead);
    },
    onDone: (answer) => {
      setKept(answer);
      form.startAfresh();
      if (again.instead !== null) router.replace('/waiting');
    },
  });
  const idsOf = () => {
    const { id, at } = form.getValues();
    if (id !== '') return { id, at };
    const fresh = { id: newId(), at: at || new Date().toISOString() };
    form.setValue('id', fresh.id);
    form.setValue('at', fresh.at);
    return fresh;
  };
  return (
    <Page
      title="Record the level"
      over={lake.details.name}
      back={{ label: 'Bank', href: '/bank' }}
      actions={<SaveBar form={form} act="Keep the reading" busyLabel="Keeping…" />}
    >
      <Form label="Level" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        {kept ? (
          <LevelKept
            lake={lake}
            board={board}
            kept={kept.value}
            waits={kept.waits}
            onTakenBack={() => setKept(null)}
          />
        ) : null}
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
