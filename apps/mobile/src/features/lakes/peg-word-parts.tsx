import type { Control } from 'react-hook-form';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import type { HoldsPeg } from '@/features/lakes/peg-fields';

type Props = { control: Control<HoldsPeg> };

/** Notes for each audience, and what is said in an emergency. */
export function PegWordParts({ control }: Props) {
  return (
    <>
      <FormPart control={control} title="Emergency" names={['details.emergency']}>
        <FormField control={control} name="details.emergency.gridReference" label="Grid reference" optional />
        <FormField control={control} name="details.emergency.throwLine" label="Nearest throw line" optional />
        <FormField
          control={control}
          name="details.emergency.ambulanceGate"
          label="Gate for the ambulance"
          optional
        />
        <FormField
          control={control}
          name="details.emergency.sayThis"
          label="Say this to the 999 operator"
          lines={2}
          optional
        />
      </FormPart>
      <FormPart
        control={control}
        title="Notes"
        names={['details.notesPublic', 'details.notesMembers', 'details.notesStaff']}
      >
        <FormField control={control} name="details.notesPublic" label="For everybody" lines={3} optional />
        <FormField control={control} name="details.notesMembers" label="For members" lines={3} optional />
        <FormField control={control} name="details.notesStaff" label="For staff" lines={3} optional />
      </FormPart>
    </>
  );
}
