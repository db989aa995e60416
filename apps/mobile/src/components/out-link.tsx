import { Linking, Platform, View } from 'react-native';
import { Text } from '@/components/text';
import { target } from '@/constants/layout';
import { typeOf } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

type Props = { href: string; label: string; note?: string | undefined };

/** A link to somebody else's page, such as an authority's. It says that it leads away. */
export function OutLink({ href, label, note }: Props) {
  const { colours } = useTheme();
  return (
    <View style={{ minHeight: target.plain, justifyContent: 'center' }}>
      <Text
        role="link"
        {...{ href, hrefAttrs: { target: '_blank', rel: 'noopener noreferrer' } }}
        {...(Platform.OS === 'web' ? {} : { onPress: () => void Linking.openURL(href) })}
        style={[typeOf('body'), { color: colours.water, textDecorationLine: 'underline' }]}
      >
        {label}
      </Text>
      <Text size="small" tone="inkSoft">
        {['opens another site', note].filter(Boolean).join('; ')}
      </Text>
    </View>
  );
}
