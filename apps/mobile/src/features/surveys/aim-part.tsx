import type { LakeView } from '@mereward/shared/lakes/contract';
import { FormChoice, FormSelect, FormStepper } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { BY_COMPASS } from '@/features/surveys/cast-draft';
import type { CastFormState } from '@/features/surveys/use-cast-form';

const METHODS = [
  { key: 'compass_phone', label: 'phone compass' },
  { key: 'compass_sighting', label: 'sighting compass' },
  { key: 'estimated', label: 'by eye' },
] as const;

/** Where one stands and what one aims over. */
export function AimPart({ form, lake }: { form: CastFormState; lake: LakeView }) {
  const byCompass = form.watch('aim') === BY_COMPASS;
  const offsetDeg = form.watch('offsetDeg') ?? 0;
  return (
    <>
      <FormSelect
        control={form.control}
        name="pegId"
        label="Peg"
        bank
        choices={lake.pegs.map(({ id, number, name }) => ({
          key: id,
          label: name === '' ? number : `${number}, ${name}`,
        }))}
      />
      <FormSelect
        control={form.control}
        name="aim"
        label="Aim over"
        bank
        choices={[
          ...lake.marks.map(({ id, details }) => ({ key: id, label: `${details.name} (${details.code})` })),
          { key: BY_COMPASS, label: 'no mark: a compass bearing' },
        ]}
      />
      {byCompass ? (
        <>
          <FormField
            control={form.control}
            name="compassDeg"
            label="Bearing as the compass reads"
            hint="Degrees, 0 to 359"
            keypad="decimal"
            bank
          />
          <FormChoice
            control={form.control}
            name="compassMethod"
            label="Read by"
            choices={METHODS}
            columns={3}
          />
          <Note kind="caution" title="A compass is rougher than a mark">
            Keep it away from the car, steel platforms, alarms and magnets, and turn it afresh before each
            reading.
          </Note>
        </>
      ) : (
        <FormStepper
          control={form.control}
          name="offsetDeg"
          label="Beside the mark"
          min={-90}
          max={90}
          step={1}
          unit="°"
          note={offsetDeg === 0 ? 'straight over' : offsetDeg < 0 ? 'left of it' : 'right of it'}
        />
      )}
    </>
  );
}
