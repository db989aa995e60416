import { View } from 'react-native';
import { Text } from '@/components/text';
import { useTheme } from '@/hooks/use-theme';

/** The name on a waterline, with a float standing in it just past the last letter. */
export function Wordmark() {
  const { colours } = useTheme();
  return (
    <View role="img" aria-label="Mereward" style={{ alignSelf: 'flex-start', paddingRight: 12 }}>
      <Text size="lead" weight="semibold" style={{ letterSpacing: -0.3, lineHeight: 24 }}>
        Mereward
      </Text>
      <View style={{ marginTop: 3, marginRight: -12, height: 2, backgroundColor: colours.water }} />
      <View
        style={{
          marginTop: 3,
          marginLeft: 12,
          marginRight: 6,
          height: 1,
          backgroundColor: colours.water,
          opacity: 0.6,
        }}
      />
      <View style={{ position: 'absolute', right: 0, bottom: 1, width: 4 }}>
        <View
          style={{
            height: 10,
            borderTopLeftRadius: 2,
            borderTopRightRadius: 2,
            backgroundColor: colours.float,
          }}
        />
        <View
          style={{
            height: 9,
            borderBottomLeftRadius: 2,
            borderBottomRightRadius: 2,
            backgroundColor: colours.ink,
          }}
        />
      </View>
    </View>
  );
}
