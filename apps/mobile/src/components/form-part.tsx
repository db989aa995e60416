import { useState, type ReactNode } from 'react';
import { get, useFormState, type Control, type FieldPath, type FieldValues } from 'react-hook-form';
import { Disclosure } from '@/components/disclosure';
import { space } from '@/constants/layout';
import { View } from 'react-native';

type Props<V extends FieldValues, Out> = {
  control: Control<V, unknown, Out>;
  title: string;
  /** The fields in it, or what they lie in: a fault of one opens the part. */
  names: readonly FieldPath<V>[];
  open?: boolean | undefined;
  children: ReactNode;
};

/** A part of a long form that is folded away until it is wanted, or until something in it is wrong. */
export function FormPart<V extends FieldValues, Out>({
  control,
  title,
  names,
  open,
  children,
}: Props<V, Out>) {
  const { errors } = useFormState({ control });
  const faulty = names.some((name) => get(errors, name) !== undefined);
  const [wasFaulty, setWasFaulty] = useState(false);
  if (faulty && !wasFaulty) setWasFaulty(true); // it stays open while the fault is put right
  return (
    <Disclosure key={wasFaulty ? 'faulty' : 'first'} title={title} open={open === true || wasFaulty}>
      <View style={{ gap: space.page }}>{children}</View>
    </Disclosure>
  );
}
