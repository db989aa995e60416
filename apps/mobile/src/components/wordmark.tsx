import { View } from 'react-native';
import { Text } from '@/components/text';
import { useTheme } from '@/hooks/use-theme';

/** The name, standing on a waterline with a float's tip above it. */
export function Wordmark() {
  const { colours } = useTheme();
  return (
    <View role="img" aria-label="Mereward" style={{ alignSelf: 'flex-start', paddingTop: 12 }}>
      <Text size="lead" weight="semibold" style={{ letterSpacing: -0.3, lineHeight: 24 }}>
        Mereward
      </Text>
      <View style={{ flexDirection: 'row', marginTop: 5, alignItems: 'flex-end' }}>
        <View style={{ flex: 1, height: 2, backgroundColor: colours.water }} />
      </View>
      <View
        style={{
          marginTop: 3,
          marginLeft: 10,
          marginRight: 18,
          height: 1,
          backgroundColor: colours.water,
          opacity: 0.6,
        }}
      />
      <View style={{ position: 'absolute', right: 8, bottom: 4, width: 4 }}>
        <View
          style={{
            height: 13,
            borderTopLeftRadius: 2,
            borderTopRightRadius: 2,
            backgroundColor: colours.float,
          }}
        />
        <View style={{ height: 7, backgroundColor: colours.ink }} />
      </View>
    </View>
  );
}
