import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';

type Props = {
  /** What there is none of: "No lakes yet". */
  title: string;
  /** What to do next. */
  children?: ReactNode;
  action?: ReactNode;
};

/** Nothing here, and what to do about it. */
export function Empty({ title, children, action }: Props) {
  return (
    <View
      style={{
        gap: space.medium,
        paddingVertical: space.large,
        maxWidth: MEASURE_PX,
        alignItems: 'flex-start',
      }}
    >
      <Text size="lead" weight="semibold">
        {title}
      </Text>
      {typeof children === 'string' ? <Text tone="inkSoft">{children}</Text> : children}
      {action}
    </View>
  );
}
