import type { ReactNode } from 'react';
import { Link, type Href } from 'expo-router';
import { typeOf, type SizeName, type WeightName } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  href: Href;
  children: ReactNode;
  size?: SizeName | undefined;
  weight?: WeightName | undefined;
};

/** A link within words. Underlined, so colour is not the only sign. */
export function TextLink({ href, children, size = 'body', weight }: Props) {
  const { colours } = useTheme();
  return (
    <Link
      href={href}
      style={[typeOf(size, weight), { color: colours.water, textDecorationLine: 'underline' }]}
    >
      {children}
    </Link>
  );
}
