import type { Control } from 'react-hook-form';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { BARROW, PLATFORMS, STEP_FREE } from '@/features/lakes/peg-choices';
import type { HoldsPeg } from '@/features/lakes/peg-fields';

type Props = { control: Control<HoldsPeg> };

/** How one comes to the peg and what one stands on. */
export function PegAccessParts({ control }: Props) {
  return (
    <>
      <FormPart control={control} title="Access" names={['details.access', 'details.stepFree']}>
        <FormField
          control={control}
          name="details.access.fromParkingM"
          label="From the parking, metres"
          keypad="numeric"
          optional
        />
        <FormField control={control} name="details.access.surface" label="Path surface" optional />
        <FormField control={control} name="details.access.steepest" label="Steepest stretch" optional />
        <FormField control={control} name="details.access.steps" label="Steps" keypad="numeric" optional />
        <FormField control={control} name="details.access.gates" label="Gates" optional />
        <FormChoice
          control={control}
          name="details.access.barrow"
          label="A barrow gets there"
          choices={BARROW}
          bank={false}
        />
        <FormField control={control} name="details.access.winter" label="In winter" optional />
        <FormChoice
          control={control}
          name="details.stepFree.kind"
          label="Step-free"
          hint="“Suitable” only when it was measured. The facts below let each visitor judge for themselves."
          choices={STEP_FREE}
          columns={2}
          bank={false}
        />
        <FormField
          control={control}
          name="details.stepFree.facts"
          label="Step-free facts"
          hint="Path width, gradient, turning circle, edge height, bay beside, way to the toilet."
          lines={3}
          optional
        />
      </FormPart>
      <FormPart control={control} title="Parking" names={['details.parking']}>
        <FormField control={control} name="details.parking.bay" label="Bay" optional />
        <FormField control={control} name="details.parking.spaces" label="Spaces" keypad="numeric" optional />
        <FormField
          control={control}
          name="details.parking.walkMinutes"
          label="Walk, minutes"
          keypad="numeric"
          optional
        />
        <FormField
          control={control}
          name="details.parking.vehicleLimit"
          label="Height or weight limit"
          optional
        />
        <FormField control={control} name="details.parking.winterClosure" label="Closed in winter" optional />
      </FormPart>
      <FormPart control={control} title="Platform" names={['details.platform']}>
        <FormChoice
          control={control}
          name="details.platform.kind"
          label="Platform"
          choices={PLATFORMS}
          columns={4}
          bank={false}
        />
        <FormField
          control={control}
          name="details.platform.widthM"
          label="Width, metres"
          keypad="decimal"
          optional
        />
        <FormField
          control={control}
          name="details.platform.lengthM"
          label="Length, metres"
          keypad="decimal"
          optional
        />
        <FormField
          control={control}
          name="details.platform.heightM"
          label="Height above the water at datum, metres"
          keypad="decimal"
          optional
        />
        <FormField
          control={control}
          name="details.platform.inspectedOn"
          label="Last inspected"
          picker="date"
          optional
        />
        <FormField control={control} name="details.platform.state" label="State" optional />
      </FormPart>
    </>
  );
}
