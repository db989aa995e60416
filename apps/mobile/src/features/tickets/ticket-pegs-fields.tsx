import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { useController, useFormContext, useWatch } from 'react-hook-form';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { FormChoice } from '@/components/form-controls';
import { Loaded } from '@/components/loaded';
import { useLake } from '@/features/lakes/api';
import type { HoldsTicketType } from '@/features/tickets/holds-ticket-type';
import { PEG_CHOICES } from '@/features/tickets/ticket-choices';

const EVERY_PEG = [
  { key: 'every', label: 'Every peg', note: 'those made later too' },
  { key: 'some', label: 'Some pegs' },
] as const;

type Lake = FisheryListItem['lakes'][number];

/** Which lakes and pegs a ticket is for, and who chooses the peg. */
export function TicketPegsFields({ lakes }: { lakes: readonly Lake[] }) {
  const { control } = useFormContext<HoldsTicketType>();
  const { field, fieldState } = useController({ control, name: 'details.lakeIds' });
  const every = useWatch({ control, name: 'details.everyPeg' });
  const chosen = lakes.filter(({ id }) => field.value.includes(id));
  return (
    <>
      <ManyChoiceGrid
        label="Lakes"
        choices={lakes.map(({ id, name }) => ({ key: id, label: name }))}
        values={field.value}
        onChange={field.onChange}
        error={fieldState.error?.message}
        bank={false}
      />
      <FormChoice
        control={control}
        name="details.everyPeg"
        label="Pegs"
        choices={EVERY_PEG}
        columns={2}
        bank={false}
      />
      {every === 'some' ? chosen.map((lake) => <PegsOfLake key={lake.id} lake={lake} />) : null}
      <FormChoice
        control={control}
        name="details.pegChoice"
        label="The peg"
        choices={PEG_CHOICES}
        bank={false}
      />
    </>
  );
}

function PegsOfLake({ lake: { id, name } }: { lake: Lake }) {
  const { control } = useFormContext<HoldsTicketType>();
  const { field, fieldState } = useController({ control, name: 'details.pegIds' });
  const lake = useLake(id);
  return (
    <Loaded query={lake} waiting={`Reading the pegs of ${name}…`}>
      {({ pegs }) => {
        const here = new Set(pegs.map((peg) => peg.id));
        const others = field.value.filter((pegId) => !here.has(pegId));
        return (
          <ManyChoiceGrid
            label={`Pegs of ${name}`}
            choices={pegs.map((peg) => ({ key: peg.id, label: peg.number }))}
            values={field.value.filter((pegId) => here.has(pegId))}
            onChange={(pegIds) => field.onChange([...others, ...pegIds])}
            error={fieldState.error?.message}
            columns={4}
            bank={false}
          />
        );
      }}
    </Loaded>
  );
}
