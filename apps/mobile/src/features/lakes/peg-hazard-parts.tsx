import { useWatch, type Control } from 'react-hook-form';
import { FormCheckbox, FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import { Note } from '@/components/note';
import { LINE_FISHING, LINE_KINDS } from '@/features/lakes/peg-choices';
import type { HoldsPeg } from '@/features/lakes/peg-fields';

type Props = { control: Control<HoldsPeg> };

/** What can hurt somebody at this peg: overhead line and hazards. */
export function PegHazardParts({ control }: Props) {
  return (
    <>
      <LinePart control={control} />
      <FormPart control={control} title="Hazards" names={['details.hazards']} open>
        <FormField
          control={control}
          name="details.hazards"
          label="Hazards, one a line"
          hint="Steep bank, deep margin, soft edge, tree limbs, public path behind, submerged stakes, no phone signal…"
          lines={4}
          optional
        />
      </FormPart>
    </>
  );
}

function LinePart({ control }: Props) {
  const kind = useWatch({ control, name: 'details.overheadLine.kind' });
  return (
    <FormPart
      control={control}
      title="Overhead power line"
      names={[
        'details.overheadLine.distanceM',
        'details.overheadLine.heightM',
        'details.overheadLine.fishing',
        'details.overheadLine.document',
      ]}
      open
    >
      <Note kind="caution" title="Under 30 m nobody fishes without an assessment">
        Look up. Line and rod can draw the current without touching. Measure level from the outermost wire, on
        the ground, never with a rod or tape raised. The network operator decides what may be done near its
        line: ask it.
      </Note>
      <FormChoice
        control={control}
        name="details.overheadLine.kind"
        label="Overhead line"
        choices={LINE_KINDS}
        bank={false}
      />
      {kind === 'present' ? <LineFields control={control} /> : null}
    </FormPart>
  );
}

function LineFields({ control }: Props) {
  return (
    <>
      <FormField
        control={control}
        name="details.overheadLine.distanceM"
        label="Distance, metres"
        hint="Level, from below the outermost wire. Unmeasured counts as under 30 m."
        keypad="decimal"
        optional
      />
      <FormField
        control={control}
        name="details.overheadLine.heightM"
        label="Height, metres"
        keypad="decimal"
        optional
      />
      <FormField control={control} name="details.overheadLine.operator" label="Network operator" optional />
      <FormCheckbox
        control={control}
        name="details.overheadLine.signFitted"
        label="A warning sign is fitted"
      />
      <FormChoice
        control={control}
        name="details.overheadLine.fishing"
        label="At this peg"
        choices={LINE_FISHING}
        bank={false}
      />
      <FormField
        control={control}
        name="details.overheadLine.document"
        label="Assessment on file"
        hint="Its name and date. Without one, no ticket is written within 30 m."
        optional
      />
    </>
  );
}
