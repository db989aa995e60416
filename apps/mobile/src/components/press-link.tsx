import type { ReactNode } from 'react';
import { Link, type Href } from 'expo-router';
import { Pressable, StyleSheet, type StyleProp, type ViewStyle } from 'react-native';

type Props = {
  href: Href;
  style?: StyleProp<ViewStyle>;
  /** Marks the link to where the reader is now. */
  here?: boolean | undefined;
  children: ReactNode;
};

/** A real link around anything: a row, a card, a place. */
export function PressLink({ href, style, here = false, children }: Props) {
  return (
    <Link href={href} asChild>
      {/* The link hands its child's style straight to the element, which takes no lists. */}
      <Pressable role="link" {...(here ? { 'aria-current': 'page' } : {})} style={StyleSheet.flatten(style)}>
        {children}
      </Pressable>
    </Link>
  );
}
