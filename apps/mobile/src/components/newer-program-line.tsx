import { View } from 'react-native';
import { Button } from '@/components/button';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';
import { programVersion } from '@/lib/program-version';

/** One calm line when a newer program has come. Nothing happens until it is asked for. */
export function NewerProgramLine() {
  const { colours } = useTheme();
  if (!programVersion.useNewer()) return null;
  return (
    <View
      role="region"
      aria-label="Program"
      style={{
        paddingHorizontal: space.page,
        flexDirection: 'row',
        alignItems: 'center',
        gap: space.small,
        borderTopWidth: 1,
        borderTopColor: colours.rule,
        backgroundColor: colours.waterTint,
      }}
    >
      <Text role="status" size="small" style={{ flex: 1 }}>
        A newer version is here. What you typed stays.
      </Text>
      <Button label="Reload" kind="quiet" onPress={programVersion.take} />
    </View>
  );
}
