import type { TextStyle, ViewStyle } from 'react-native';
import type { Colours } from '@/constants/colours';
import { radius, space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

export type ButtonKind = 'main' | 'plain' | 'quiet' | 'danger';

type Look = { ink: string; words: TextStyle; box: (pressed: boolean) => ViewStyle };
type Terms = { grow?: boolean | undefined; bank?: boolean | undefined; disabled?: boolean | undefined };

function paint(kind: ButtonKind, c: Colours): { ground: string; edge: string; ink: string } {
  switch (kind) {
    case 'main':
      return { ground: c.float, edge: c.float, ink: c.onFloat };
    case 'plain':
      return { ground: c.sheet, edge: c.water, ink: c.water };
    case 'quiet':
      return { ground: 'transparent', edge: 'transparent', ink: c.water };
    case 'danger':
      return { ground: c.sheet, edge: c.brick, ink: c.brick };
  }
}

/** How a button and a link dressed as one look. */
export function useButtonLook(kind: ButtonKind, { grow, bank, disabled }: Terms): Look {
  const { colours } = useTheme();
  const { ground, edge, ink } = paint(kind, colours);
  return {
    ink,
    words: { color: ink, textAlign: 'center', flexShrink: 1 },
    box: (pressed) => ({
      minHeight: bank ? target.bank : target.plain,
      minWidth: bank ? target.bank : target.plain,
      paddingHorizontal: kind === 'quiet' ? space.small : space.page,
      paddingVertical: space.small,
      borderRadius: radius.control,
      borderWidth: 2,
      borderColor: edge,
      backgroundColor: ground,
      flexDirection: 'row',
      gap: space.small,
      alignItems: 'center',
      justifyContent: 'center',
      opacity: disabled ? 0.55 : pressed ? 0.8 : 1,
      ...(grow ? { flexGrow: 1, flexBasis: 0 } : {}),
    }),
  };
}
