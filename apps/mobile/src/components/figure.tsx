import { View } from 'react-native';
import { Text } from '@/components/text';

/** One large figure with its caption: "2.4 m" over "deep today, ± 0.2". */
export function Figure({ figure, caption }: { figure: string; caption: string }) {
  return (
    <View>
      <Text size="figure" weight="semibold">
        {figure}
      </Text>
      <Text size="small" tone="inkSoft">
        {caption}
      </Text>
    </View>
  );
}
