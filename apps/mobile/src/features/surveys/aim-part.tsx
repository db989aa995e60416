import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { FormChoice, FormSelect, FormStepper } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { aimWords, sideWords } from '@/features/surveys/aim-words';
import { BY_COMPASS } from '@/features/surveys/cast-draft';
import { FoldedPart } from '@/features/surveys/cast-part';
import { marksAhead } from '@/features/surveys/marks-ahead';
import type { CastFormState } from '@/features/surveys/use-cast-form';

const METHODS = [
  { key: 'compass_phone', label: 'phone compass' },
  { key: 'compass_sighting', label: 'sighting compass' },
  { key: 'estimated', label: 'by eye' },
] as const;

type Props = { form: CastFormState; lake: LakeView };

/** Where one stands and what one aims over, in one line until it changes. */
export function AimPart({ form, lake }: Props) {
  const typed = form.watch();
  const byCompass = typed.aim === BY_COMPASS;
  const { pegId, aim, compassDeg } = form.formState.errors;
  const [opened, setOpened] = useState(false);
  const open = opened || typed.pegId === '' || typed.aim === '' || Boolean(pegId ?? aim);
  const [words, act] = aimWords(typed, lake);
  const peg = lake.pegs.find(({ id }) => id === typed.pegId);
  return (
    <FoldedPart
      label={peg ? `Aim, from peg ${peg.number}` : 'Aim'}
      words={words}
      act={act}
      open={open || Boolean(compassDeg)}
      onTurn={() => setOpened(!open)}
    >
      {byCompass ? <ByCompass form={form} /> : <BesideMark form={form} />}
      <FormSelect
        control={form.control}
        name="aim"
        label="Aim over"
        bank
        unset="Choose a mark"
        choices={[
          ...marksAhead(lake, typed.pegId).map(({ id, details }) => ({
            key: id,
            label: `${details.name} (${details.code})`,
          })),
          { key: BY_COMPASS, label: 'no mark: a compass bearing' },
        ]}
      />
      <FormSelect
        control={form.control}
        name="pegId"
        label="Peg"
        bank
        unset="Choose the peg you stand on"
        choices={lake.pegs.map(({ id, number, name }) => ({
          key: id,
          label: name === '' ? number : `${number}, ${name}`,
        }))}
      />
    </FoldedPart>
  );
}

function BesideMark({ form }: Pick<Props, 'form'>) {
  return (
    <FormStepper
      control={form.control}
      name="offsetDeg"
      label="Beside the mark: − left, + right"
      min={-90}
      max={90}
      step={1}
      unit="°"
      note={sideWords(form.watch('offsetDeg') ?? 0)}
    />
  );
}

function ByCompass({ form }: Pick<Props, 'form'>) {
  return (
    <>
      <FormField
        control={form.control}
        name="compassDeg"
        label="Bearing as the compass reads"
        hint="Degrees, 0 to 359"
        keypad="decimal"
        bank
      />
      <FormChoice control={form.control} name="compassMethod" label="Read by" choices={METHODS} columns={3} />
      <Note kind="caution" title="A compass is rougher than a mark">
        Keep it away from the car, steel platforms, alarms and magnets, and turn it afresh before each
        reading.
      </Note>
    </>
  );
}
