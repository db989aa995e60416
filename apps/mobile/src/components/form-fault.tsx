import { useId } from 'react';
import { get, useFormState, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { FieldError } from '@/components/field-frame';

type Props<V extends FieldValues, Out> = { control: Control<V, unknown, Out>; name: FieldPath<V> };

/** What is wrong with something that has no place for it, such as a box to tick. */
export function FormFault<V extends FieldValues, Out>({ control, name }: Props<V, Out>) {
  const id = useId();
  const { errors } = useFormState({ control, name });
  const fault: unknown = get(errors, `${name}.message`);
  return typeof fault === 'string' ? <FieldError id={id} words={fault} /> : null;
}
