import { useFormContext, type Control } from 'react-hook-form';
import { FormCheckbox, FormChoice, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { AudienceFields } from '@/features/lakes/audience-fields';
import { LAKE_KINDS, OWNERSHIPS, STOCK_CLASSES, type TypedLake } from '@/features/lakes/lake-fields';

/** What a form that holds a lake's details has at least. */
export type HoldsLake = { details: TypedLake };
type Props = { control: Control<HoldsLake> };

/** A lake's fields, all but its outline, in the order they are wanted. */
export function LakeForm() {
  const { control } = useFormContext<HoldsLake>();
  return (
    <>
      <FormField control={control} name="details.name" label="Name" />
      <FormSelect control={control} name="details.kind" label="Kind of water" choices={LAKE_KINDS} />
      <FormField
        control={control}
        name="details.datumM"
        label="Chart datum, metres"
        keypad="decimal"
        hint="The reading of the gauge board that all depths are given at, such as the usual summer level."
      />
      <FormCheckbox control={control} name="details.nights" label="Night fishing is allowed" />
      <AudienceFields control={control} />
      <SurveyPart control={control} />
      <UsePart control={control} />
      <PlacePart control={control} />
    </>
  );
}

function SurveyPart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="How it is surveyed"
      names={['details.maxGapM', 'details.longestCastM']}
    >
      <FormField
        control={control}
        name="details.maxGapM"
        label="Farthest from a cast that is still charted, metres"
        keypad="decimal"
        hint="Beyond it the chart says “not surveyed”. From 2 to 15; 8 is usual."
      />
      <FormField
        control={control}
        name="details.longestCastM"
        label="Longest cast allowed, metres"
        keypad="decimal"
      />
    </FormPart>
  );
}

function UsePart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="Numbers, stock and ownership"
      names={['details.maxPeople', 'details.maxRods']}
    >
      <FormField
        control={control}
        name="details.maxPeople"
        label="Most people at once"
        keypad="numeric"
        optional
      />
      <FormField
        control={control}
        name="details.maxRods"
        label="Most rods at once"
        keypad="numeric"
        optional
      />
      <FormChoice
        control={control}
        name="details.stockClass"
        label="Its fish"
        choices={STOCK_CLASSES}
        bank={false}
      />
      <FormChoice
        control={control}
        name="details.ownership"
        label="The water is"
        choices={OWNERSHIPS}
        bank={false}
      />
    </FormPart>
  );
}

function PlacePart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="Surroundings and emergency"
      names={[
        'details.emergencyAccess',
        'details.phoneSignal',
        'details.inflowOutflow',
        'details.designations',
      ]}
    >
      <FormField
        control={control}
        name="details.emergencyAccess"
        label="Way in for an ambulance, and boat slip"
        lines={3}
        optional
      />
      <FormField control={control} name="details.phoneSignal" label="Phone signal" optional />
      <FormField control={control} name="details.inflowOutflow" label="Inflow, outflow, screens" optional />
      <FormField
        control={control}
        name="details.designations"
        label="Designations"
        hint="SSSI, SAC, LNR. Works there may need consent: ask the body that named it before you start."
        optional
      />
      <FormCheckbox
        control={control}
        name="details.publicPathBeside"
        label="A public path runs beside the water"
      />
    </FormPart>
  );
}
