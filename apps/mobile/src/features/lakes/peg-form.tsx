import type { ReactNode } from 'react';
import { useFormContext, useWatch, type Control } from 'react-hook-form';
import { View } from 'react-native';
import { FormCheckbox, FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { space } from '@/constants/layout';
import { ORIGIN_FIXES, STATUSES } from '@/features/lakes/peg-choices';
import { PegAccessParts } from '@/features/lakes/peg-access-parts';
import type { HoldsPeg } from '@/features/lakes/peg-fields';
import { PegHazardParts } from '@/features/lakes/peg-hazard-parts';
import { PegWordParts } from '@/features/lakes/peg-word-parts';

type Props = { control: Control<HoldsPeg> };

/** A peg's whole form: what every peg needs stands open, the rest is folded into parts. `places` sets where it is. */
export function PegForm({ places }: { places: ReactNode }) {
  const { control } = useFormContext<HoldsPeg>();
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        <View style={{ flexGrow: 1, flexBasis: 120 }}>
          <FormField control={control} name="details.number" label="Number" />
        </View>
        <View style={{ flexGrow: 3, flexBasis: 220 }}>
          <FormField control={control} name="details.name" label="Name" optional />
        </View>
      </View>
      <StatusFields control={control} />
      {places}
      <OriginPart control={control} />
      <WaterPart control={control} />
      <PegHazardParts control={control} />
      <PegAccessParts control={control} />
      <PegWordParts control={control} />
    </>
  );
}

function StatusFields({ control }: Props) {
  const status = useWatch({ control, name: 'details.status' });
  return (
    <>
      <FormChoice control={control} name="details.status" label="It is" choices={STATUSES} bank={false} />
      {status === 'open' ? null : (
        <>
          <FormField
            control={control}
            name="details.statusReason"
            label="Why"
            hint="Visitors read it: “platform being mended”."
          />
          <FormField
            control={control}
            name="details.statusUntil"
            label="Until, the last day"
            picker="date"
            optional
          />
        </>
      )}
    </>
  );
}

function OriginPart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="The origin mark"
      names={['details.originMark', 'details.originFixedBy', 'details.originMarked']}
      open
    >
      <FormField
        control={control}
        name="details.originMark"
        label="What it is"
        hint="Where to stand to repeat a cast: “painted dot on the peg board”."
        optional
      />
      <FormCheckbox
        control={control}
        name="details.originMarked"
        label="It is marked there, so that anybody finds it"
      />
      <FormChoice
        control={control}
        name="details.originFixedBy"
        label="Where its place comes from"
        choices={ORIGIN_FIXES}
        columns={2}
        bank={false}
      />
    </FormPart>
  );
}

function WaterPart({ control }: Props) {
  return (
    <FormPart
      control={control}
      title="The water in front, people and rods"
      names={[
        'details.waterWords',
        'details.longestCastM',
        'details.people',
        'details.rods',
        'details.shelters',
      ]}
    >
      <FormField
        control={control}
        name="details.waterWords"
        label="How far this peg’s water goes"
        hint="“To the line between the dead oak and the pump house.”"
        optional
      />
      <FormField
        control={control}
        name="details.longestCastM"
        label="Longest cast, metres"
        hint="Empty: the lake’s own limit."
        keypad="decimal"
        optional
      />
      <FormField control={control} name="details.people" label="People" keypad="numeric" />
      <FormField control={control} name="details.rods" label="Rods" keypad="numeric" />
      <FormField control={control} name="details.shelters" label="Shelters" keypad="numeric" />
      <FormField control={control} name="details.tackleLimits" label="Tackle limits here" optional />
    </FormPart>
  );
}
