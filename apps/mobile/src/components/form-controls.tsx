import type { ComponentProps } from 'react';
import { useController, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Checkbox } from '@/components/checkbox';
import { ChoiceGrid } from '@/components/choice-grid';
import type { ChoiceGridProps } from '@/components/choice-props';
import { Select } from '@/components/select';
import type { SelectProps } from '@/components/select-props';
import { Stepper } from '@/components/stepper';

/** `Out` is what the form's schema makes of `V`; a control of either kind will do. */
type Bound<V extends FieldValues, Out> = { control: Control<V, unknown, Out>; name: FieldPath<V> };
type Free<P> = Omit<P, 'value' | 'onChange' | 'error'>;

/** A `ChoiceGrid` bound to a form's value by name. */
export function FormChoice<V extends FieldValues, Out, K extends string>({
  control,
  name,
  ...rest
}: Bound<V, Out> & Free<ChoiceGridProps<K>>) {
  const { field, fieldState } = useController({ control, name });
  const value = rest.choices.find(({ key }) => key === field.value)?.key ?? null;
  return <ChoiceGrid {...rest} value={value} onChange={field.onChange} error={fieldState.error?.message} />;
}

/** A `Select` bound to a form's value by name. */
export function FormSelect<V extends FieldValues, Out, K extends string>({
  control,
  name,
  ...rest
}: Bound<V, Out> & Free<SelectProps<K>>) {
  const { field, fieldState } = useController({ control, name });
  const value = rest.choices.find(({ key }) => key === field.value)?.key ?? null;
  return <Select {...rest} value={value} onChange={field.onChange} error={fieldState.error?.message} />;
}

/** A `Stepper` bound to a form's number by name. */
export function FormStepper<V extends FieldValues, Out>({
  control,
  name,
  ...rest
}: Bound<V, Out> & Free<ComponentProps<typeof Stepper>>) {
  const { field, fieldState } = useController({ control, name });
  const value: unknown = field.value;
  return (
    <Stepper
      {...rest}
      value={typeof value === 'number' ? value : null}
      onChange={field.onChange}
      error={fieldState.error?.message}
    />
  );
}

/** A `Checkbox` bound to a form's yes or no by name. */
export function FormCheckbox<V extends FieldValues, Out>({
  control,
  name,
  label,
}: Bound<V, Out> & { label: string }) {
  const { field } = useController({ control, name });
  return <Checkbox label={label} checked={field.value === true} onChange={field.onChange} />;
}
