import type { LicenceAnswer } from '@mereward/shared/bookings/rod-licence';
import { useWatch, type Control } from 'react-hook-form';
import { FormCheckbox } from '@/components/form-controls';
import { FormFault } from '@/components/form-fault';
import { FormField } from '@/components/form-field';
import { OutLink } from '@/components/out-link';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import type { DetailsForm } from '@/features/bookings/details-fields';
import { dayName } from '@/lib/format-time';

type Props = { control: Control<DetailsForm, unknown, DetailsForm>; licence: LicenceAnswer };

/** What the law of the place asks of a rod, and its holder's own word on it. We check no licence. */
export function LicencePart({ control, licence }: Props) {
  const held = useWatch({ control, name: 'licenceHeld' });
  return (
    <Section title="Rod licence" bare>
      <Text>{licence.words}</Text>
      <Text>A ticket is permission to fish, not a licence.</Text>
      {licence.link === null ? null : (
        <OutLink
          href={licence.link}
          label="Rod licences: the authority’s own page"
          note={licence.checkedOn === null ? undefined : `last looked at on ${dayName(licence.checkedOn)}`}
        />
      )}
      {licence.needed === 'no' ? null : (
        <>
          <FormCheckbox
            control={control}
            name="licenceHeld"
            label="There is a rod licence for everybody who needs one, or will be before they fish"
          />
          <FormFault control={control} name="licenceHeld" />
        </>
      )}
      {licence.needed !== 'no' && held ? (
        <>
          <FormField
            control={control}
            name="lastSix"
            label="Last six characters of its number"
            optional
            hint="So that the bailiff need not ask."
          />
          <FormField control={control} name="licenceUntil" label="Good until" optional picker="date" />
        </>
      ) : null}
    </Section>
  );
}
