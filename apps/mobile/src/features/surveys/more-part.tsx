import { CastFlag } from '@mereward/shared/surveys/contract';
import { CAST_FLAG_WORDS } from '@mereward/shared/surveys/cast-words';
import { useController } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { Disclosure } from '@/components/disclosure';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import type { CastFormState } from '@/features/surveys/use-cast-form';

const RODS = [
  { key: '0', label: 'level' },
  { key: '45', label: 'half up' },
  { key: '80', label: 'upright' },
] as const;
const SMELLS = [
  { key: 'none', label: 'no smell' },
  { key: 'bad_eggs', label: 'bad eggs' },
] as const;
const FLAGS = CastFlag.options.map((key) => ({ key, label: CAST_FLAG_WORDS[key] }));

/** What is wanted now and then: rod angle, side-step, count of the fall, smell, what went wrong, a note. */
export function MorePart({ form }: { form: CastFormState }) {
  const flags = useController({ control: form.control, name: 'flags' });
  return (
    <Disclosure title="More of this cast">
      <FormChoice
        control={form.control}
        name="rod"
        label="Rod while the line was tight"
        hint="It moves the spot by one to three metres"
        choices={RODS}
        columns={3}
      />
      <FormField
        control={form.control}
        name="sidestepM"
        label="Stood beside the origin mark"
        hint="Metres, to the right; − to the left"
        keypad="decimal"
        optional
        bank
      />
      <FormField
        control={form.control}
        name="dropCountS"
        label="Counted fall"
        hint="Seconds; shown beside the cast, never charted without a calibrated lead"
        keypad="decimal"
        optional
        bank
      />
      <FormChoice control={form.control} name="smell" label="Smell" choices={SMELLS} columns={2} />
      <ManyChoiceGrid
        label="Anything wrong with it"
        choices={FLAGS}
        values={flags.field.value}
        onChange={flags.field.onChange}
        columns={2}
      />
      <FormField control={form.control} name="note" label="Note" lines={2} optional />
    </Disclosure>
  );
}
