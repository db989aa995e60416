import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { space } from '@/constants/layout';
import type { HoldsTicketType } from '@/features/tickets/holds-ticket-type';
import { VAT_CODES } from '@/features/tickets/ticket-choices';
import { Pair } from '@/features/tickets/ticket-hours-fields';
import { hasRate } from '@/features/tickets/ticket-type-draft';
import { themed } from '@/hooks/themed';

const MOST_PRICES = 60;

const useStyles = themed((c) => ({
  price: { borderLeftWidth: 2, borderLeftColor: c.rule, paddingLeft: space.page, gap: space.medium },
}));

/** Prices by the first day fished that they hold for. What was sold keeps its own. */
export function TicketPriceFields({ today }: { today: string }) {
  const { control, getValues } = useFormContext<HoldsTicketType>();
  const { fields, append, remove } = useFieldArray({ control, name: 'details.prices' });
  const addPrice = (): void => {
    const last = getValues('details.prices').at(-1);
    if (last) append({ ...last, fromDay: last.fromDay > today ? '' : today });
  };
  return (
    <>
      {fields.map((field, at) => (
        <Price key={field.id} at={at} {...(fields.length > 1 ? { onRemove: () => remove(at) } : {})} />
      ))}
      {fields.length < MOST_PRICES ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="A new price from a day on" onPress={addPrice} />
        </View>
      ) : null}
      <Note kind="caution" title="Ask an accountant">
        What VAT a ticket carries hangs on the fishery and on what is sold. Mereward counts with what you
        choose here and guesses nothing. Prices are all in: nothing is added on the way to paying.
      </Note>
    </>
  );
}

function Price({ at, onRemove }: { at: number; onRemove?: () => void }) {
  const styles = useStyles();
  const { control } = useFormContext<HoldsTicketType>();
  const vatCode = useWatch({ control, name: `details.prices.${at}.vatCode` });
  const currency = useWatch({ control, name: 'details.currency' });
  const sign = currency === 'GBP' ? '£' : currency;
  return (
    <View role="group" aria-label={`Price ${String(at + 1)}`} style={styles.price}>
      <Pair>
        <FormField
          control={control}
          name={`details.prices.${at}.fromDay`}
          label="For days fished from"
          picker="date"
        />
        <FormField
          control={control}
          name={`details.prices.${at}.price`}
          label={`Price, ${sign}`}
          keypad="decimal"
        />
      </Pair>
      <Pair>
        <FormField
          control={control}
          name={`details.prices.${at}.extraRod`}
          label={`Each extra rod, ${sign}`}
          keypad="decimal"
        />
        <FormField
          control={control}
          name={`details.prices.${at}.extraPerson`}
          label={`Each further person, ${sign}`}
          keypad="decimal"
        />
      </Pair>
      <Pair>
        <FormSelect control={control} name={`details.prices.${at}.vatCode`} label="VAT" choices={VAT_CODES} />
        {hasRate(vatCode) ? (
          <FormField
            control={control}
            name={`details.prices.${at}.vatPercent`}
            label="Rate, %"
            keypad="decimal"
          />
        ) : null}
      </Pair>
      {onRemove ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label="Take this price away"
            kind="quiet"
            spoken={`Take this price away: ${String(at + 1)}`}
            onPress={onRemove}
          />
        </View>
      ) : null}
    </View>
  );
}
