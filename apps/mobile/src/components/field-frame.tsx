import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Label } from '@/components/label';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  id: string;
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  optional?: boolean | undefined;
  children: ReactNode;
};

/** Ids of the hint and the error that stand, for `aria-describedby`. */
export const describedBy = ({ id, hint, error }: Pick<Props, 'id' | 'hint' | 'error'>): string | undefined =>
  [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined;

/** Label, hint and error around any control, in the order a reader needs them. */
export function FieldFrame({ id, label, hint, error, optional, children }: Props) {
  return (
    <View style={{ gap: space.hair, maxWidth: MEASURE_PX, width: '100%' }}>
      <Label id={id} words={label} optional={optional} />
      {hint ? (
        <Text nativeID={`${id}-hint`} size="small" tone="inkSoft">
          {hint}
        </Text>
      ) : null}
      {children}
      {error ? <FieldError id={id} words={error} /> : null}
    </View>
  );
}

/** What is wrong with a field and what to do, told by shape and word. */
export function FieldError({ id, words }: { id: string; words: string }) {
  const { colours } = useTheme();
  return (
    <View style={{ flexDirection: 'row', gap: space.hair, alignItems: 'center' }}>
      <Shape name="cross" colour={colours.brick} />
      <Text nativeID={`${id}-error`} size="small" tone="brick" role="alert" style={{ flex: 1 }}>
        {words}
      </Text>
    </View>
  );
}
