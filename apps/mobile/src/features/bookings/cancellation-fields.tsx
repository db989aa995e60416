import { policyWords } from '@mereward/shared/bookings/cancellation';
import { useFieldArray, useFormContext, useFormState, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FormCheckbox, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { TermsDraft, type TypedTerms, type TypedTier } from '@/features/bookings/terms-draft';

export type HoldsTerms = { details: TypedTerms };

const UNITS = [
  { key: 'days', label: 'Days' },
  { key: 'hours', label: 'Hours' },
] as const;
const MOVES = [
  { key: 'yes', label: 'A free move instead' },
  { key: 'if_relet', label: 'A free move if the peg is let again' },
  { key: 'no', label: 'No free move' },
] as const;
const MOST_TIERS = 8;
const NEW_TIER: TypedTier = { notice: '24', unit: 'hours', percent: '0', freeMove: 'no' };

/** The steps of a cancellation policy, with the words anglers will read. */
export function CancellationFields() {
  const { control } = useFormContext<HoldsTerms>();
  const { fields, append, remove } = useFieldArray({ control, name: 'details.cancellation.tiers' });
  return (
    <>
      {fields.map((field, at) => (
        <View
          key={field.id}
          role="group"
          aria-label={`Step ${String(at + 1)}`}
          style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'flex-end' }}
        >
          <View style={{ flexGrow: 1, flexBasis: 110 }}>
            <FormField
              control={control}
              name={`details.cancellation.tiers.${at}.notice`}
              label="From this notice"
              keypad="numeric"
            />
          </View>
          <View style={{ flexBasis: 110 }}>
            <FormSelect
              control={control}
              name={`details.cancellation.tiers.${at}.unit`}
              label="In"
              choices={UNITS}
            />
          </View>
          <View style={{ flexGrow: 1, flexBasis: 110 }}>
            <FormField
              control={control}
              name={`details.cancellation.tiers.${at}.percent`}
              label="Goes back, %"
              keypad="decimal"
            />
          </View>
          <View style={{ flexGrow: 2, flexBasis: 200 }}>
            <FormSelect
              control={control}
              name={`details.cancellation.tiers.${at}.freeMove`}
              label="Or"
              choices={MOVES}
            />
          </View>
          <Button
            label="Take away"
            kind="quiet"
            spoken={`Take away step ${String(at + 1)}`}
            onPress={() => remove(at)}
          />
        </View>
      ))}
      <WholeFault />
      {fields.length < MOST_TIERS ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="One more step" onPress={() => append(NEW_TIER)} />
        </View>
      ) : null}
      <FormField
        control={control}
        name="details.cancellation.mostMoves"
        label="Moves an angler may make of one booking"
        keypad="numeric"
      />
      <FormField
        control={control}
        name="details.cancellation.coolingOffDays"
        label="Days after buying a season ticket in which all goes back"
        hint="14 is usual. Whether the law asks for it is for your adviser."
        keypad="numeric"
      />
      <FormCheckbox
        control={control}
        name="details.cancellation.banRefundsUnused"
        label="A ban gives back what was paid for tickets not begun"
      />
      <AsRead />
    </>
  );
}

/** What is wrong with the steps taken together. */
function WholeFault() {
  const { control } = useFormContext<HoldsTerms>();
  const { errors } = useFormState({ control, name: 'details.cancellation.tiers' });
  const tiers = errors.details?.cancellation?.tiers;
  const words = tiers?.root?.message ?? (tiers as { message?: string } | undefined)?.message;
  return words ? (
    <Note kind="danger" live>
      {words}
    </Note>
  ) : null;
}

function AsRead() {
  const { control } = useFormContext<HoldsTerms>();
  const typed = useWatch({ control, name: 'details' });
  const read = TermsDraft.safeParse(typed);
  if (!read.success)
    return (
      <Text tone="inkSoft">What anglers will read appears here once every figure is in its bounds.</Text>
    );
  return (
    <View role="status" style={{ gap: space.small }}>
      <Text weight="semibold">Anglers will read</Text>
      <List label="What anglers will read">
        {policyWords(read.data.cancellation).map((words) => (
          <Row key={words} title={words} />
        ))}
      </List>
    </View>
  );
}
