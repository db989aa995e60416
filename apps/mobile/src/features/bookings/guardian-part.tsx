import type { Control } from 'react-hook-form';
import { FormCheckbox } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormFault } from '@/components/form-fault';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import type { DetailsForm } from '@/features/bookings/details-fields';

type Props = { control: Control<DetailsForm, unknown, DetailsForm> };

/** Who answers for a junior on the bank. */
export function GuardianPart({ control }: Props) {
  return (
    <Section title="The junior’s guardian" bare>
      <Note kind="caution" title="A junior is never left alone">
        <Text>
          The guardian stays on the same or the next peg all the time. Whoever finds a junior alone rings the
          guardian and stays.
        </Text>
        <Text>Letters about this booking go to you; staff never write to an under-18 alone.</Text>
      </Note>
      <FormField control={control} name="guardianName" label="Guardian’s name" />
      <FormField
        control={control}
        name="guardianPhone"
        label="Guardian’s telephone on the day"
        keypad="tel"
      />
      <FormCheckbox
        control={control}
        name="consent"
        label="I am the guardian, or speak for them, and agree to the junior’s fishing here"
      />
      <FormFault control={control} name="consent" />
    </Section>
  );
}
