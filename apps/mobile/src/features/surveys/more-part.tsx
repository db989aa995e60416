import { CastFlag } from '@mereward/shared/surveys/contract';
import { CAST_FLAG_WORDS } from '@mereward/shared/surveys/cast-words';
import { useController } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { CastPart } from '@/features/surveys/cast-part';
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

/** What is wanted now and then: drag length, rod angle, side-step, fall, smell, what went wrong, a note. */
export function MorePart({ form }: { form: CastFormState }) {
  const { control } = form;
  const flags = useController({ control, name: 'flags' });
  return (
    <CastPart>
      <FormPart
        control={control}
        title="More of this cast: drag length, rod, smell, note"
        names={['dragLengthM', 'sidestepM', 'dropCountS', 'note']}
      >
        <FormField
          control={control}
          name="dragLengthM"
          label="Dragged for"
          hint="Metres of line drawn back while it felt so"
          keypad="decimal"
          optional
          bank
        />
        <FormChoice
          control={control}
          name="rod"
          label="Rod while the line was tight"
          hint="It moves the spot by one to three metres"
          choices={RODS}
          columns={3}
        />
        <FormChoice control={control} name="smell" label="Smell" choices={SMELLS} columns={2} />
        <FormField
          control={control}
          name="sidestepM"
          label="Stood beside the origin mark"
          hint="Metres, to the right; − to the left"
          keypad="decimal"
          optional
          bank
        />
        <FormField
          control={control}
          name="dropCountS"
          label="Counted fall"
          hint="Seconds; shown beside the cast, never charted without a calibrated lead"
          keypad="decimal"
          optional
          bank
        />
        <ManyChoiceGrid
          label="Anything wrong with it"
          choices={FLAGS}
          values={flags.field.value}
          onChange={flags.field.onChange}
          columns={2}
        />
        <FormField control={control} name="note" label="Note" lines={2} optional />
      </FormPart>
    </CastPart>
  );
}
