import { useFormContext, useWatch, type Control } from 'react-hook-form';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { LeadPart } from '@/features/surveys/lead-part';
import { LEAD_SHAPES, LINE_TYPES } from '@/features/surveys/lead-words';
import { PULLS, RODS, STICKS, type TypedKit } from '@/features/surveys/kit-draft';

/** What a form that holds a kit has at least. */
export type HoldsKit = { kit: TypedKit };
type Props = { control: Control<HoldsKit> };

const REFERENCES = [
  { key: 'lead_to_clip', label: 'lead to clip', note: 'counted to the line clip' },
  { key: 'lead_to_rod_tip', label: 'lead to rod tip', note: 'rod carried round the sticks' },
] as const;
const MEASURED = [
  { key: 'along_line', label: 'along the line', note: 'tape round the sticks' },
  { key: 'centres', label: 'between centres', note: 'half a turn round each is added' },
] as const;
/** Sticks, rod, line and float: the constants every cast of the visit is reduced with. Stands in a `FormProvider`. */
export function KitPart({ lakeId }: { lakeId: string }) {
  const { control } = useFormContext<HoldsKit>();
  return (
    <>
      <FormChoice
        control={control}
        name="kit.wrapReference"
        label="Wraps are read from"
        hint="Choose it each time: the wrong one moves every cast by a rod’s length."
        choices={REFERENCES}
        columns={2}
      />
      <SticksPart control={control} />
      <FloatKitPart control={control} />
      <RodPart control={control} lakeId={lakeId} />
    </>
  );
}

function SticksPart({ control }: Props) {
  const sticks = useWatch({ control, name: 'kit.sticks' });
  return (
    <>
      <FormChoice
        control={control}
        name="kit.sticks"
        label="Sticks stand apart"
        choices={STICKS}
        columns={3}
      />
      {sticks === 'other' ? (
        <FormField
          control={control}
          name="kit.stickSpacingM"
          label="Apart, in metres"
          keypad="decimal"
          bank
        />
      ) : null}
      <FormField
        control={control}
        name="kit.stickCheckedOn"
        label="Last checked by tape on"
        hint="A chart asks for a tape check within twelve months."
        picker="date"
        optional
        bank
      />
      <FormPart
        control={control}
        title="How the sticks were taped"
        names={['kit.stickMeasured', 'kit.stickDiameterMm']}
      >
        <FormChoice control={control} name="kit.stickMeasured" label="Taped" choices={MEASURED} columns={2} />
        <FormField
          control={control}
          name="kit.stickDiameterMm"
          label="Stick thickness, millimetres"
          keypad="decimal"
          optional
          bank
        />
      </FormPart>
    </>
  );
}

function FloatKitPart({ control }: Props) {
  const pull = useWatch({ control, name: 'kit.pull' });
  return (
    <>
      <FormField
        control={control}
        name="kit.floatOffsetM"
        label="Float and link above the ring, metres"
        hint="Wound down, from the ring to the float’s top; measure it in a bucket. Usually 0.2 to 0.4."
        keypad="decimal"
        bank
      />
      <FormChoice control={control} name="kit.pull" label="One pull of line" choices={PULLS} columns={4} />
      {pull === 'other' ? (
        <FormField control={control} name="kit.pullM" label="One pull, metres" keypad="decimal" bank />
      ) : null}
    </>
  );
}

function RodPart({ control, lakeId }: Props & { lakeId: string }) {
  return (
    <FormPart
      control={control}
      title="Rod, line and lead"
      names={[
        'kit.rodLengthFt',
        'kit.lineAlongRodM',
        'kit.reelHeightM',
        'kit.stretchPercent',
        'kit.stretchSigmaPercent',
        'kit.wrapSigmaShare',
        'kit.leadG',
        'kit.leadId',
        'kit.declinationDeg',
      ]}
    >
      <FormField control={control} name="kit.rodLengthFt" label="Rod, feet" keypad="decimal" bank />
      <FormField
        control={control}
        name="kit.lineAlongRodM"
        label="Line along the rod, clip to tip, metres"
        hint="About the rod’s length less 0.65 m."
        keypad="decimal"
        bank
      />
      <FormField
        control={control}
        name="kit.reelHeightM"
        label="Reel above the water, metres"
        keypad="decimal"
        bank
      />
      <FormChoice
        control={control}
        name="kit.rod"
        label="Rod while the line is tight"
        hint="A single cast may differ."
        choices={RODS}
        columns={3}
      />
      <LinePart control={control} />
      <FormField control={control} name="kit.leadG" label="Lead, grams" keypad="decimal" bank />
      <FormChoice
        control={control}
        name="kit.leadShape"
        label="Its shape"
        choices={LEAD_SHAPES}
        columns={4}
      />
      <LeadPart lakeId={lakeId} />
      <FormField
        control={control}
        name="kit.declinationDeg"
        label="Magnetic to true north, degrees"
        hint="East positive, from a current map of declination; only compass bearings need it."
        keypad="decimal"
        bank
      />
    </FormPart>
  );
}

function LinePart({ control }: Props) {
  const line = useWatch({ control, name: 'kit.lineType' });
  return (
    <>
      <FormChoice control={control} name="kit.lineType" label="Line" choices={LINE_TYPES} columns={3} />
      {line === 'braid' ? null : (
        <>
          <FormField
            control={control}
            name="kit.stretchPercent"
            label="Stretch under a cast’s pull, %"
            hint="Nylon several per cent, more when wet: 5 % of 50 m is 2.5 m. Measure it on the grass."
            keypad="decimal"
            bank
          />
          <FormField
            control={control}
            name="kit.stretchSigmaPercent"
            label="Give or take, %"
            keypad="decimal"
            bank
          />
        </>
      )}
      <FormField
        control={control}
        name="kit.wrapSigmaShare"
        label="A count without its remainder is good to, wraps"
        hint="A quarter of a wrap when nobody measured what was left over."
        keypad="decimal"
        bank
      />
    </>
  );
}
