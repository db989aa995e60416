import type { FreePegs } from '@mereward/shared/bookings/availability-contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { space } from '@/constants/layout';
import { PEG_LOOKS } from '@/features/bookings/peg-words';
import { FIRST_TICKET, ON_ARRIVAL, type TypedSomebody } from '@/features/bookings/somebody-draft';
import { themed } from '@/hooks/themed';

const MOST_TICKETS = 40;

const useStyles = themed((c) => ({
  ticket: { borderLeftWidth: 2, borderLeftColor: c.rule, paddingLeft: space.page, gap: space.medium },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.medium },
  half: { flexGrow: 1, flexBasis: 190 },
  count: { flexGrow: 1, flexBasis: 90 },
}));

type Props = { kinds: readonly TicketTypeView[]; free: FreePegs | undefined };

/** The tickets of a party: each its kind, its peg, its rods and people, and a name where it is another's. */
export function SomebodyTickets({ kinds, free }: Props) {
  const { control, getValues } = useFormContext<TypedSomebody>();
  const { fields, append, remove } = useFieldArray({ control, name: 'tickets' });
  return (
    <>
      {fields.map((field, at) => (
        <Ticket
          key={field.id}
          at={at}
          kinds={kinds}
          free={free}
          {...(fields.length > 1 ? { onRemove: () => remove(at) } : {})}
        />
      ))}
      {fields.length < MOST_TICKETS ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label="One more ticket"
            onPress={() =>
              append({ ...FIRST_TICKET, ticketTypeId: getValues('tickets.0.ticketTypeId'), pegId: '' })
            }
          />
        </View>
      ) : null}
    </>
  );
}

type TicketProps = Props & { at: number; onRemove?: () => void };

function Ticket({ at, kinds, free, onRemove }: TicketProps) {
  const styles = useStyles();
  const { control } = useFormContext<TypedSomebody>();
  const typeId = useWatch({ control, name: `tickets.${at}.ticketTypeId` });
  const kind = kinds.find(({ id }) => id === typeId)?.details;
  const asksBirth =
    kind !== undefined &&
    (kind.audience === 'junior' || kind.ages.leastAge !== null || kind.ages.mostAge !== null);
  const pegs = (free?.pegs ?? []).filter(({ pegId }) => kind?.pegIds == null || kind.pegIds.includes(pegId));
  return (
    <View role="group" aria-label={`Ticket ${String(at + 1)}`} style={styles.ticket}>
      <View style={styles.row}>
        <View style={styles.half}>
          <FormSelect
            control={control}
            name={`tickets.${at}.ticketTypeId`}
            label="Ticket"
            choices={kinds.map(({ id, details }) => ({ key: id, label: details.name }))}
            unset="Choose a ticket"
          />
        </View>
        <View style={styles.half}>
          <FormSelect
            control={control}
            name={`tickets.${at}.pegId`}
            label="Peg"
            choices={[
              ...pegs.map(({ pegId, number, state }) => ({
                key: pegId,
                label: number,
                note: PEG_LOOKS[state].word,
              })),
              ...(kind && kind.pegChoice !== 'book_a_peg'
                ? [{ key: ON_ARRIVAL, label: 'Chosen on arrival' }]
                : []),
            ]}
            unset="Choose a peg"
          />
        </View>
      </View>
      <View style={styles.row}>
        <View style={styles.count}>
          <FormField control={control} name={`tickets.${at}.rods`} label="Rods" keypad="numeric" />
        </View>
        <View style={styles.count}>
          <FormField control={control} name={`tickets.${at}.people`} label="People" keypad="numeric" />
        </View>
        {at > 0 || kind?.audience === 'junior' ? (
          <View style={styles.half}>
            <FormField control={control} name={`tickets.${at}.name`} label="Angler’s name" />
          </View>
        ) : null}
        {asksBirth ? (
          <View style={styles.half}>
            <FormField
              control={control}
              name={`tickets.${at}.bornOn`}
              label="Born on"
              hint="The ticket has an age."
              picker="date"
            />
          </View>
        ) : null}
      </View>
      {onRemove ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label="Take this ticket away"
            kind="quiet"
            spoken={`Take this ticket away: ${String(at + 1)}`}
            onPress={onRemove}
          />
        </View>
      ) : null}
    </View>
  );
}
