import type { Href } from 'expo-router';
import { Text } from '@/components/text';
import { PressLink } from '@/components/press-link';
import { useButtonLook, type ButtonKind } from '@/components/button-look';

type Props = {
  label: string;
  href: Href;
  kind?: ButtonKind | undefined;
  grow?: boolean | undefined;
  bank?: boolean | undefined;
};

/** A link that looks like a button: it goes somewhere, and opens in a new tab like any link. */
export function LinkButton({ label, href, kind = 'plain', ...rest }: Props) {
  const look = useButtonLook(kind, rest);
  return (
    <PressLink href={href} style={look.box(false)}>
      <Text weight="semibold" style={look.words}>
        {label}
      </Text>
    </PressLink>
  );
}
