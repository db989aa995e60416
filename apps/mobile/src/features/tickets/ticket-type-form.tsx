import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { useFormContext, useWatch, type Control } from 'react-hook-form';
import { FormCheckbox, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { Section } from '@/components/section';
import type { HoldsTicketType } from '@/features/tickets/holds-ticket-type';
import { AUDIENCES } from '@/features/tickets/ticket-choices';
import { Pair, TicketHoursFields } from '@/features/tickets/ticket-hours-fields';
import { TicketPegsFields } from '@/features/tickets/ticket-pegs-fields';
import { TicketPriceFields } from '@/features/tickets/ticket-price-fields';

type Part = { control: Control<HoldsTicketType> };

/** Everything of a kind of ticket, in the order an owner thinks of it. */
export function TicketTypeForm({ fishery, today }: { fishery: FisheryListItem; today: string }) {
  const { control } = useFormContext<HoldsTicketType>();
  const audience = useWatch({ control, name: 'details.audience' });
  return (
    <>
      <FormField control={control} name="details.name" label="Name" />
      <FormField
        control={control}
        name="details.description"
        label="Described in a line"
        hint="Anglers read it under the name."
        optional
      />
      <FormSelect control={control} name="details.audience" label="Who may have it" choices={AUDIENCES} />
      {audience === 'concession' ? (
        <FormField
          control={control}
          name="details.concessionProof"
          label="What is shown for the lower price"
          hint="Such as “a student card”."
        />
      ) : null}
      <Section title="Hours">
        <TicketHoursFields />
      </Section>
      <Section title="Price">
        <TicketPriceFields today={today} />
      </Section>
      <Section title="Lakes and pegs">
        <TicketPegsFields lakes={fishery.lakes} />
      </Section>
      <Section title="Limits">
        <NumbersPart control={control} />
        <AgesPart control={control} />
        <SalePart control={control} />
        <StayPart control={control} />
      </Section>
      <Section title="What the angler says">
        <FormCheckbox
          control={control}
          name="details.needs.rodLicence"
          label="Declares a rod licence, where the law asks for one"
        />
        <FormCheckbox control={control} name="details.needs.vehicle" label="Gives a vehicle’s number" />
        <FormCheckbox
          control={control}
          name="details.needs.emergencyContact"
          label="Gives somebody to ring in an emergency"
        />
      </Section>
    </>
  );
}

const NumbersPart = ({ control }: Part) => (
  <FormPart
    control={control}
    title="Rods and people"
    names={['details.rodsIncluded', 'details.rodsMost', 'details.peopleMost']}
    open
  >
    <Pair>
      <FormField control={control} name="details.rodsIncluded" label="Rods included" keypad="numeric" />
      <FormField control={control} name="details.rodsMost" label="Rods at most" keypad="numeric" />
      <FormField
        control={control}
        name="details.peopleMost"
        label="People at most"
        hint="On one ticket."
        keypad="numeric"
      />
    </Pair>
  </FormPart>
);

const AgesPart = ({ control }: Part) => (
  <FormPart control={control} title="Ages" names={['details.ages']}>
    <Pair>
      <FormField
        control={control}
        name="details.ages.leastAge"
        label="From this age"
        hint="On the day fished."
        keypad="numeric"
        optional
      />
      <FormField
        control={control}
        name="details.ages.mostAge"
        label="Up to this age"
        keypad="numeric"
        optional
      />
    </Pair>
    <FormField
      control={control}
      name="details.ages.guardianBelowAge"
      label="Below this age a guardian comes along"
      hint="On the same peg or the next."
      keypad="numeric"
      optional
    />
  </FormPart>
);

const SalePart = ({ control }: Part) => (
  <FormPart
    control={control}
    title="When it is sold"
    names={['details.leastNoticeHours', 'details.mostNoticeDays', 'details.firstDay', 'details.lastDay']}
  >
    <Pair>
      <FormField
        control={control}
        name="details.leastNoticeHours"
        label="Hours before the start, at least"
        hint="0: sold until it ends."
        keypad="numeric"
      />
      <FormField
        control={control}
        name="details.mostNoticeDays"
        label="Days ahead, at most"
        keypad="numeric"
      />
    </Pair>
    <Pair>
      <FormField
        control={control}
        name="details.firstDay"
        label="For days fished from"
        picker="date"
        optional
      />
      <FormField control={control} name="details.lastDay" label="To, included" picker="date" optional />
    </Pair>
  </FormPart>
);

const StayPart = ({ control }: Part) => (
  <FormPart
    control={control}
    title="Stays in a row, and the peg between two"
    names={[
      'details.mostNightsInARow',
      'details.restHours',
      'details.mostBookings',
      'details.turnaroundMinutes',
    ]}
  >
    <Pair>
      <FormField
        control={control}
        name="details.mostNightsInARow"
        label="Nights in a row, at most"
        keypad="numeric"
        optional
      />
      <FormField
        control={control}
        name="details.restHours"
        label="Then hours off the water"
        keypad="numeric"
      />
    </Pair>
    <Pair>
      <FormField
        control={control}
        name="details.mostBookings"
        label="Bookings to come, one person"
        keypad="numeric"
        optional
      />
      <FormField
        control={control}
        name="details.turnaroundMinutes"
        label="Minutes the peg is kept free after"
        keypad="numeric"
      />
    </Pair>
  </FormPart>
);
