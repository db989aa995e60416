import { useFormContext } from 'react-hook-form';
import { FormCheckbox, FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { BOARD_KINDS, BOARD_UNITS, type TypedBoard } from '@/features/lakes/board-fields';

export type HoldsBoard = { details: TypedBoard };

const LIMITS = [
  { name: 'details.normalLowM', label: 'Usual low level, metres' },
  { name: 'details.normalHighM', label: 'Usual high level, metres' },
  { name: 'details.alarmLowM', label: 'Alarm when it falls to, metres' },
  { name: 'details.alarmHighM', label: 'Alarm when it rises to, metres' },
] as const;

/** A gauge board's fields, all but its place. */
export function BoardForm() {
  const { control } = useFormContext<HoldsBoard>();
  return (
    <>
      <FormField control={control} name="details.code" label="Code" hint="Short, as people call it: GB1." />
      <FormChoice
        control={control}
        name="details.kind"
        label="It is"
        choices={BOARD_KINDS}
        columns={2}
        bank={false}
      />
      <FormChoice
        control={control}
        name="details.unit"
        label="Painted in"
        choices={BOARD_UNITS}
        columns={2}
        bank={false}
      />
      <FormCheckbox
        control={control}
        name="details.higherNumberHigherWater"
        label="A higher number means higher water (go and look: some are fitted upside down)"
      />
      <FormCheckbox
        control={control}
        name="details.isDatumBoard"
        label="The lake’s chart datum is read on this board; depths today follow its newest reading"
      />
      <FormPart control={control} title="Usual range and alarms" names={LIMITS.map(({ name }) => name)}>
        {LIMITS.map((limit) => (
          <FormField key={limit.name} control={control} {...limit} keypad="decimal" optional />
        ))}
      </FormPart>
      <FormField control={control} name="details.lastCleanedOn" label="Last cleaned" picker="date" optional />
    </>
  );
}
