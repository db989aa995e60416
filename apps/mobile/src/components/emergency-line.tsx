import { Linking, View } from 'react-native';
import { Text } from '@/components/text';
import { TextLink } from '@/components/text-link';
import { space } from '@/constants/layout';
import { typeOf } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

function Ring({ number }: { number: string }) {
  const { colours } = useTheme();
  return (
    <Text
      role="link"
      {...{ href: `tel:${number}` }}
      onPress={() => void Linking.openURL(`tel:${number}`)}
      style={[typeOf('small', 'semibold'), { color: colours.water, textDecorationLine: 'underline' }]}
    >
      {number}
    </Text>
  );
}

/** At the foot of every page. */
export function EmergencyLine() {
  const { colours } = useTheme();
  return (
    <View
      role="note"
      aria-label="Emergency"
      style={{ paddingVertical: space.page, borderTopWidth: 1, borderTopColor: colours.rule }}
    >
      <Text size="small" tone="inkSoft" style={{ maxWidth: 430 }}>
        In an emergency ring <Ring number="999" /> or <Ring number="112" /> and say which lake and peg. Reach
        or throw, don’t go in.{' '}
        <TextLink href="/emergency" size="small">
          Emergency card
        </TextLink>
      </Text>
    </View>
  );
}
