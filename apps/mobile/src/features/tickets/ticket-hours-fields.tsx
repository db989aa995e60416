import type { ReactNode } from 'react';
import { useFormContext, useWatch, type Control } from 'react-hook-form';
import { View } from 'react-native';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { space } from '@/constants/layout';
import { CLOCK_CHANGES, DURATION_KINDS, START_STEPS, STAY_HOURS } from '@/features/tickets/ticket-choices';
import type { HoldsTicketType } from '@/features/tickets/holds-ticket-type';

type Props = { control: Control<HoldsTicketType> };

/** How long a ticket is good for: the model, and what that model asks. */
export function TicketHoursFields() {
  const { control } = useFormContext<HoldsTicketType>();
  const kind = useWatch({ control, name: 'details.duration.kind' });
  return (
    <>
      <FormChoice
        control={control}
        name="details.duration.kind"
        label="How long it is good for"
        choices={DURATION_KINDS}
        bank={false}
      />
      <HoursOf control={control} kind={kind} />
    </>
  );
}

function HoursOf({ control, kind }: Props & { kind: string }) {
  switch (kind) {
    case 'dawn_dusk':
      return <SunHours control={control} />;
    case 'elapsed':
      return <ChosenHours control={control} />;
    case 'season':
      return <SeasonDays control={control} />;
    default:
      return <ClockHours control={control} />;
  }
}

/** Fields side by side where there is room. */
export function Pair({ children }: { children: ReactNode[] }) {
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
      {children.map((child, at) => (
        <View key={at} style={{ flexGrow: 1, flexBasis: 190 }}>
          {child}
        </View>
      ))}
    </View>
  );
}

const ClockHours = ({ control }: Props) => (
  <Pair>
    <FormField control={control} name="details.duration.starts" label="Starts at" picker="time" />
    <FormField
      control={control}
      name="details.duration.ends"
      label="Ends at"
      hint="At or before the start means the next day."
      picker="time"
    />
  </Pair>
);

const SunHours = ({ control }: Props) => (
  <Pair>
    <FormField
      control={control}
      name="details.duration.beforeSunriseMinutes"
      label="Minutes before sunrise"
      keypad="numeric"
    />
    <FormField
      control={control}
      name="details.duration.afterSunsetMinutes"
      label="Minutes after sunset"
      keypad="numeric"
    />
  </Pair>
);

const ChosenHours = ({ control }: Props) => (
  <>
    <FormChoice
      control={control}
      name="details.duration.hours"
      label="Hours"
      choices={STAY_HOURS}
      columns={4}
      bank={false}
    />
    <Pair>
      <FormField control={control} name="details.duration.startsFrom" label="Earliest start" picker="time" />
      <FormField control={control} name="details.duration.startsUntil" label="Latest start" picker="time" />
    </Pair>
    <FormChoice
      control={control}
      name="details.duration.startStepMinutes"
      label="A start every"
      choices={START_STEPS}
      bank={false}
    />
    <FormChoice
      control={control}
      name="details.duration.clockChange"
      label="When the clock is moved meanwhile"
      choices={CLOCK_CHANGES}
      columns={2}
      bank={false}
    />
  </>
);

const SeasonDays = ({ control }: Props) => (
  <Pair>
    <FormField control={control} name="details.duration.firstDay" label="First day" picker="date" />
    <FormField control={control} name="details.duration.lastDay" label="Last day, included" picker="date" />
  </Pair>
);
