import { Pressable } from 'react-native';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = { label: string; checked: boolean; onChange: (checked: boolean) => void };

/** Yes or no, with its words beside it. */
export function Checkbox({ label, checked, onChange }: Props) {
  const { colours } = useTheme();
  return (
    <Pressable
      role="checkbox"
      aria-checked={checked}
      onPress={() => onChange(!checked)}
      style={{ minHeight: target.plain, flexDirection: 'row', gap: space.small, alignItems: 'center' }}
    >
      <Shape name={checked ? 'square' : 'ring'} colour={colours.water} />
      <Text style={{ flex: 1 }}>{label}</Text>
    </Pressable>
  );
}
