import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Heading } from '@/components/heading';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  title: string;
  note?: string | undefined;
  /** Stands at the right of the title. */
  end?: ReactNode;
  /** Without the hairline above. */
  bare?: boolean | undefined;
  children?: ReactNode;
};

/** A part of a page under its own level-2 heading, ruled off from the one above. */
export function Section({ title, note, end, bare = false, children }: Props) {
  const { colours } = useTheme();
  return (
    <View
      style={{
        gap: space.medium,
        ...(bare ? {} : { borderTopWidth: 1, borderTopColor: colours.rule, paddingTop: space.page }),
      }}
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.medium }}>
        <Heading level={2} style={{ flexGrow: 1 }}>
          {title}
        </Heading>
        {end}
      </View>
      {note ? (
        <Text tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
          {note}
        </Text>
      ) : null}
      {children}
    </View>
  );
}
