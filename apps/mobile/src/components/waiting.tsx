import { ActivityIndicator, View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

/** Said while the first answer is on its way: "Reading the lakes…". */
export function Waiting({ words }: { words: string }) {
  const { colours } = useTheme();
  return (
    <View
      role="status"
      style={{ flexDirection: 'row', alignItems: 'center', gap: space.medium, paddingVertical: space.large }}
    >
      <View aria-hidden>
        <ActivityIndicator color={colours.water} />
      </View>
      <Text tone="inkSoft">{words}</Text>
    </View>
  );
}
