import { Pressable, View } from 'react-native';
import { Text } from '@/components/text';
import { radius, space, target } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.small },
  toggle: {
    minHeight: target.plain,
    justifyContent: 'center',
    paddingHorizontal: space.medium,
    borderWidth: 1,
    borderColor: c.edge,
    borderRadius: radius.control,
    backgroundColor: c.sheet,
  },
  on: {
    borderColor: c.water,
    borderWidth: 2,
    backgroundColor: c.waterTint,
    paddingHorizontal: space.medium - 1,
  },
}));

export type Toggle<K extends string> = { key: K; label: string };

type Props<K extends string> = {
  label: string;
  toggles: readonly Toggle<K>[];
  isOn: (key: K) => boolean;
  onToggle: (key: K) => void;
};

/** A row of things each shown or not shown, such as the layers of a chart. What is on has a heavier rim and letters. */
export function Toggles<K extends string>({ label, toggles, isOn, onToggle }: Props<K>) {
  const styles = useStyles();
  return (
    <View role="group" aria-label={label} style={styles.row}>
      {toggles.map(({ key, label: words }) => (
        <Pressable
          key={key}
          role="switch"
          aria-checked={isOn(key)}
          onPress={() => onToggle(key)}
          style={[styles.toggle, isOn(key) && styles.on]}
        >
          <Text weight={isOn(key) ? 'semibold' : 'regular'} tone={isOn(key) ? 'water' : 'ink'}>
            {words}
          </Text>
        </Pressable>
      ))}
    </View>
  );
}
