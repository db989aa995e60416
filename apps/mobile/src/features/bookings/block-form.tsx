import { useState } from 'react';
import type { BoardView, BlockView } from '@mereward/shared/bookings/availability-contract';
import { useController } from 'react-hook-form';
import { z } from 'zod';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { blockPegs } from '@/features/bookings/board-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { instantOf } from '@/lib/zoned-time';

const instant = (zone: string) =>
  z.string().transform((civil, context): string => {
    const at = instantOf(civil, zone);
    if (at) return at;
    context.issues.push({ code: 'custom', message: 'Choose the day and the time', input: civil });
    return z.NEVER;
  });

const wanted = (zone: string) =>
  z
    .object({
      title: z.string().trim().min(1, 'Say what for: only staff read it').max(80, 'At most 80 letters'),
      pegIds: z.array(z.string()).min(1, 'Choose a peg at least'),
      from: instant(zone),
      until: instant(zone),
    })
    .refine(({ from, until }) => from < until, { path: ['until'], message: 'It ends before it starts' });

type Props = { board: BoardView; pegId: string | null; day: string; onDone: (block: BlockView) => void };

/** Keeps pegs back from booking for a while: all of those chosen, or none. */
export function BlockForm({ board, pegId, day, onDone }: Props) {
  const [id] = useState(newId);
  const [schema] = useState(() => wanted(board.zone));
  const form: DraftForm<z.input<typeof schema>, z.output<typeof schema>> = useDraftForm({
    form: `block:${board.lakeId}:${day}:${pegId ?? ''}`,
    schema,
    start: {
      title: '',
      pegIds: pegId === null ? [] : [pegId],
      from: `${day}T06:00`,
      until: `${day}T20:00`,
    },
    send: (block) => blockPegs(board.fisheryId, { id, ...block }),
    onDone,
  });
  const { control } = form;
  const { field, fieldState } = useController({ control, name: 'pegIds' });
  return (
    <DraftFormFrame form={form} label="Keep pegs back" act="Keep them back" busyLabel="Keeping…">
      <FormField
        control={control}
        name="title"
        label="What for"
        hint="Such as “match of the club”. Anglers read only that the pegs are kept back."
      />
      <FormField
        control={control}
        name="from"
        label="From"
        hint={`By the fishery’s clock (${board.zone}).`}
        picker="datetime-local"
      />
      <FormField
        control={control}
        name="until"
        label="Until"
        hint="At most 32 days."
        picker="datetime-local"
      />
      <ManyChoiceGrid
        label="Pegs"
        choices={board.pegs.map((peg) => ({ key: peg.pegId, label: peg.number }))}
        values={field.value}
        onChange={field.onChange}
        error={fieldState.error?.message}
        columns={4}
        bank={false}
      />
    </DraftFormFrame>
  );
}
