import { View } from 'react-native';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

/** A line that stays and says what was kept: "Kept at 21:20." Nothing pops up and nothing vanishes. */
export function Kept({ words }: { words: string | null }) {
  const { colours } = useTheme();
  return (
    <View
      role="status"
      style={{ minHeight: 22, flexDirection: 'row', alignItems: 'center', gap: space.small }}
    >
      {words ? <Shape name="triangle" colour={colours.reed} /> : null}
      {words ? (
        <Text size="small" tone="reed">
          {words}
        </Text>
      ) : null}
    </View>
  );
}
