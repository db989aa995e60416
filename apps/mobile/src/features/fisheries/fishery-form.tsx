import { useFormContext, useWatch, type Control } from 'react-hook-form';
import { FormChoice, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { Note } from '@/components/note';
import { JURISDICTIONS, VAT_STATES, type HoldsFishery } from '@/features/fisheries/fishery-fields';

type Props = { control: Control<HoldsFishery> };

/** A fishery's fields: what everybody needs stands open, the rest is folded into parts. */
export function FisheryForm() {
  const { control } = useFormContext<HoldsFishery>();
  return (
    <>
      <FormField control={control} name="details.name" label="Name of the fishery" />
      <FormField
        control={control}
        name="details.position"
        label="Latitude, longitude"
        hint="Of the lodge or the gate, in degrees: 52.36610, -1.14170."
      />
      <FormSelect
        control={control}
        name="details.jurisdiction"
        label="Whose byelaws hold"
        choices={JURISDICTIONS}
      />
      <FormField
        control={control}
        name="details.zone"
        label="Time zone"
        hint="As the zone database names it: Europe/London. All times are told by it."
      />
      <ReachPart control={control} />
      <PlacePart control={control} />
      <LegalPart control={control} />
    </>
  );
}

function ReachPart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="Emergency and contact"
      names={['details.dutyPhone', 'details.meetingPoint', 'details.officeContact']}
      open
    >
      <FormField control={control} name="details.dutyPhone" label="Duty phone" keypad="tel" optional />
      <FormField
        control={control}
        name="details.meetingPoint"
        label="Where an ambulance is met"
        hint="Shown on every peg’s page."
        lines={2}
        optional
      />
      <FormField
        control={control}
        name="details.officeContact"
        label="Office"
        hint="Telephone, e-mail, hours."
        optional
      />
    </FormPart>
  );
}

function PlacePart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="Address, opening and ways of the place"
      names={['details.address', 'details.postcode', 'details.gridReference', 'details.gateCode']}
    >
      <FormField control={control} name="details.address" label="Address" lines={3} optional />
      <FormField control={control} name="details.postcode" label="Postcode" optional />
      <FormField control={control} name="details.gridReference" label="Grid reference" optional />
      <FormField
        control={control}
        name="details.opening"
        label="Opening"
        hint="All hours, or when the gate is open."
        optional
      />
      <FormField
        control={control}
        name="details.facilities"
        label="Toilets, water, power"
        lines={2}
        optional
      />
      <FormField
        control={control}
        name="details.conduct"
        label="Dogs, fires, barbecues, vehicles"
        lines={2}
        optional
      />
      <FormField
        control={control}
        name="details.gateCode"
        label="Gate code"
        hint="Shown to staff only, never on an open page."
        optional
      />
    </FormPart>
  );
}

function LegalPart({ control }: Props) {
  const vat = useWatch({ control, name: 'details.vatStatus' });
  return (
    <FormPart
      control={control}
      title="Legal entity and VAT"
      names={['details.legalEntity', 'details.vatNumber']}
    >
      <FormField control={control} name="details.legalEntity" label="Legal entity" optional />
      <Note kind="caution">
        Whether the fishery must register, and for what, is not decided here: ask an accountant.
      </Note>
      <FormChoice control={control} name="details.vatStatus" label="VAT" choices={VAT_STATES} bank={false} />
      {vat === 'registered' ? (
        <FormField control={control} name="details.vatNumber" label="VAT number" optional />
      ) : null}
    </FormPart>
  );
}
