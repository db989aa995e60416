import { useState } from 'react';
import { ChangeDetails, type AccountView } from '@mereward/shared/accounts/contract';
import { useController } from 'react-hook-form';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Kept } from '@/components/kept';
import { Section } from '@/components/section';
import { changeDetails } from '@/features/accounts/api';
import { SticksField } from '@/features/accounts/sticks-field';
import { lengthChoices } from '@/features/accounts/stick-choices';
import { useDraftForm } from '@/hooks/use-draft-form';

/** Name and units of whoever is signed in; they go along to every device. */
export function DetailsForm({ account }: { account: AccountView }) {
  const [kept, setKept] = useState(false);
  const form = useDraftForm({
    form: 'details',
    schema: ChangeDetails,
    start: { name: account.name, units: account.units },
    send: changeDetails,
    onDone: () => setKept(true),
  });
  const sticks = useController({ control: form.control, name: 'units.stickSpacingM' });
  return (
    <Section title="My details" bare>
      <DraftFormFrame
        form={form}
        label="My details"
        act="Keep my details"
        busyLabel="Keeping…"
        beside={<Kept words={kept && !form.formState.isDirty ? 'Your details are kept.' : null} />}
      >
        <FormField control={form.control} name="name" label="Name" autoComplete="name" />
        <FormChoice
          control={form.control}
          name="units.length"
          label="Lengths in"
          choices={lengthChoices}
          columns={2}
          bank={false}
        />
        <SticksField
          spacingM={sticks.field.value}
          onChange={sticks.field.onChange}
          error={sticks.fieldState.error?.message}
        />
      </DraftFormFrame>
    </Section>
  );
}
