import type { Ref } from 'react';
import type { Text as NativeText, TextProps } from 'react-native';
import { Text } from '@/components/text';
import type { SizeName } from '@/constants/type';

type Props = TextProps & { level: 1 | 2 | 3; size?: SizeName | undefined; ref?: Ref<NativeText> | undefined };

const sizes = { 1: 'title', 2: 'lead', 3: 'body' } as const;

/** A real heading. A page has one of level 1, and `Page` writes it. */
export function Heading({ level, size, ...rest }: Props) {
  return <Text {...rest} role="heading" aria-level={level} size={size ?? sizes[level]} weight="semibold" />;
}
