import { useState, type ReactNode } from 'react';
import { Pressable, View } from 'react-native';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = { title: string; open?: boolean | undefined; children: ReactNode };

/** Something that opens in place: "How did you get this?". */
export function Disclosure({ title, open: openAtFirst = false, children }: Props) {
  const [open, setOpen] = useState(openAtFirst);
  const { colours } = useTheme();
  return (
    <View>
      <Pressable
        role="button"
        aria-expanded={open}
        onPress={() => setOpen(!open)}
        style={{ minHeight: target.plain, flexDirection: 'row', alignItems: 'center', gap: space.small }}
      >
        <View style={{ transform: [{ rotate: open ? '180deg' : '90deg' }] }}>
          <Shape name="triangle" colour={colours.water} />
        </View>
        <Text weight="semibold" tone="water" style={{ flex: 1 }}>
          {title}
        </Text>
      </Pressable>
      {open ? (
        <View style={{ paddingLeft: space.large, paddingBottom: space.medium, gap: space.small }}>
          {children}
        </View>
      ) : null}
    </View>
  );
}
