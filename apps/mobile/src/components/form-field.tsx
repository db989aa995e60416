import type { ComponentProps } from 'react';
import { Controller, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Field } from '@/components/field';

type Props<V extends FieldValues, Out> = Omit<
  ComponentProps<typeof Field>,
  'value' | 'onChange' | 'onBlur' | 'error'
> & {
  control: Control<V, unknown, Out>;
  name: FieldPath<V>;
};

/** A `Field` bound to a form's value by name. The value is text: turn it into a number in the form's schema. */
export function FormField<V extends FieldValues, Out>({ control, name, ...rest }: Props<V, Out>) {
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <Field
          {...rest}
          value={typeof field.value === 'string' ? field.value : String(field.value ?? '')}
          onChange={field.onChange}
          onBlur={field.onBlur}
          error={fieldState.error?.message}
        />
      )}
    />
  );
}
