import type { ReactNode, Ref } from 'react';
import { Text as NativeText, type TextProps } from 'react-native';
import type { Colours } from '@/constants/colours';
import { typeOf, type SizeName, type WeightName } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

type Props = TextProps & {
  children?: ReactNode;
  ref?: Ref<NativeText> | undefined;
  size?: SizeName | undefined;
  weight?: WeightName | undefined;
  tone?: keyof Colours | undefined;
};

/** Words on a screen in the program's face. `size` from the scale, `tone` a colour's name; figures line up by themselves. */
export function Text({ size = 'body', weight, tone = 'ink', style, ...rest }: Props) {
  const { colours } = useTheme();
  return <NativeText {...rest} style={[typeOf(size, weight), { color: colours[tone] }, style]} />;
}
