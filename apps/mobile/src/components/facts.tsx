import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

export type Fact = { term: string; fact: ReactNode };

/** Names and what they are, ruled, the fact on the right: "Parking … by the lodge". Facts that are null are left out. */
export function Facts({ facts }: { facts: readonly Fact[] }) {
  const { colours } = useTheme();
  return (
    <View role="list">
      {facts
        .filter(({ fact }) => fact !== null && fact !== undefined && fact !== '')
        .map(({ term, fact }) => (
          <View
            key={term}
            role="listitem"
            style={{
              flexDirection: 'row',
              flexWrap: 'wrap',
              gap: space.medium,
              paddingVertical: space.small,
              borderBottomWidth: 1,
              borderBottomColor: colours.rule,
            }}
          >
            <Text tone="inkSoft" style={{ flexGrow: 1, flexBasis: 110 }}>
              {term}
            </Text>
            <View style={{ flexGrow: 2, flexBasis: 170, alignItems: 'flex-start' }}>
              {typeof fact === 'string' || typeof fact === 'number' ? <Text>{fact}</Text> : fact}
            </View>
          </View>
        ))}
    </View>
  );
}
