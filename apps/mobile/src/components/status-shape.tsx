import { View } from 'react-native';
import { Shape, type ShapeName } from '@/components/shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { SizeName } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  shape: ShapeName;
  tone: 'reed' | 'amber' | 'brick' | 'water' | 'inkSoft' | 'float';
  word: string;
  size?: SizeName | undefined;
};

/** A state told by shape and word together, colour only helping: `<StatusShape shape="diamond" tone="amber" word="held" />`. */
export function StatusShape({ shape, tone, word, size }: Props) {
  const { colours } = useTheme();
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.hair }}>
      <Shape name={shape} colour={colours[tone]} />
      <Text weight="semibold" size={size} tone={tone === 'float' ? 'ink' : tone}>
        {word}
      </Text>
    </View>
  );
}
