import { useState } from 'react';
import type { GaugeBoardView, LakeView, LevelRecorded } from '@mereward/shared/lakes/contract';
import { readingM } from '@mereward/shared/lakes/water-level';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { recordLevel } from '@/features/lakes/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { figure } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { typedNumber } from '@/lib/typed-schemas';
import { civilTime, instantOf } from '@/lib/zoned-time';

const wanted = (unit: 'm' | 'ft', zone: string) =>
  z.object({
    level: z.string().transform((text, context) => {
      const read = typedNumber({ what: 'The reading', min: -100, max: 9000, unit }).safeParse(text);
      if (read.success) return { levelM: readingM(read.data, unit), levelText: `${text.trim()} ${unit}` };
      context.issues.push({ code: 'custom', message: read.error.issues[0]?.message ?? '', input: text });
      return z.NEVER;
    }),
    at: z.string().transform((civil, context): string => {
      const instant = instantOf(civil, zone);
      if (instant) return instant;
      context.issues.push({ code: 'custom', message: 'Choose the day and the time', input: civil });
      return z.NEVER;
    }),
    note: z.string().trim().max(300, 'At most 300 letters.'),
  });

type Props = { lake: LakeView; board: GaugeBoardView };

/** Records what the board reads now, or read at another time, and says what is unusual about it. */
export function LevelForm({ lake, board }: Props) {
  const [recorded, setRecorded] = useState<LevelRecorded | null>(null);
  return (
    <Section title="Record a reading" bare>
      {recorded ? <Recorded recorded={recorded} /> : null}
      <LevelFields key={recorded?.reading.id ?? 'first'} {...{ lake, board }} onRecorded={setRecorded} />
    </Section>
  );
}

function LevelFields({ lake, board, onRecorded }: Props & { onRecorded: (recorded: LevelRecorded) => void }) {
  const { unit } = board.details;
  const [id] = useState(newId);
  const [schema] = useState(() => wanted(unit, lake.zone));
  const [now] = useState(() => civilTime(Date.now(), lake.zone));
  const form = useDraftForm({
    form: `level:${board.id}`,
    schema,
    start: { level: '', at: now, note: '' },
    leaveOut: ['at'],
    send: ({ level, at, note }) => recordLevel({ lakeId: lake.id, id: board.id }, { id, at, note, ...level }),
    onDone: onRecorded,
  });
  return (
    <DraftFormFrame form={form} label="Record a reading" act="Keep the reading" busyLabel="Keeping…">
      <FormField
        control={form.control}
        name="level"
        label={`The board reads, ${unit === 'm' ? 'metres' : 'feet'}`}
        hint="The number at the water’s surface, as it stands on the board."
        keypad="decimal"
      />
      <FormField
        control={form.control}
        name="at"
        label="Read at"
        hint={`By the fishery’s clock (${lake.zone}).`}
        picker="datetime-local"
      />
      <FormField control={form.control} name="note" label="Note" optional />
    </DraftFormFrame>
  );
}

function Recorded({ recorded: { reading, warnings } }: { recorded: LevelRecorded }) {
  return (
    <Note
      kind={warnings.length > 0 ? 'caution' : 'fine'}
      title={`${figure(reading.levelM, 2)} m is kept`}
      live
    >
      {warnings.map(({ kind, words }) => (
        <Text key={kind}>{words}</Text>
      ))}
    </Note>
  );
}
