import { useFormContext } from 'react-hook-form';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { MARK_FIXES, PERMANENCES, type TypedMark } from '@/features/lakes/mark-fields';

export type HoldsMark = { details: TypedMark };

/** A far-bank mark's fields, all but its place. */
export function MarkForm() {
  const { control } = useFormContext<HoldsMark>();
  return (
    <>
      <FormField
        control={control}
        name="details.code"
        label="Code"
        hint="Short, as it stands on the chart: M3."
      />
      <FormField
        control={control}
        name="details.name"
        label="What it is"
        hint="As an angler would tell another: “pump-house chimney”."
      />
      <FormChoice
        control={control}
        name="details.permanence"
        label="How lasting"
        choices={PERMANENCES}
        columns={2}
        bank={false}
      />
      <FormChoice
        control={control}
        name="details.fixedBy"
        label="Where its place comes from"
        choices={MARK_FIXES}
        columns={2}
        bank={false}
      />
      <FormField
        control={control}
        name="details.sigmaM"
        label="How sure the place is, ± metres"
        keypad="decimal"
        hint="Casts aimed at it carry this on."
      />
      <FormField
        control={control}
        name="details.nightNote"
        label="At night"
        hint="A lamp, a reflector, or not to be seen."
        optional
      />
    </>
  );
}
