import { Pressable, View } from 'react-native';
import type { ChoiceCellsProps } from '@/components/choice-cells-props';
import { FieldError } from '@/components/field-frame';
import { Text } from '@/components/text';
import { radius, space, target } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  cells: { flexDirection: 'row', flexWrap: 'wrap', gap: space.small },
  cell: {
    flexGrow: 1,
    padding: space.small,
    alignItems: 'center',
    justifyContent: 'center',
    borderWidth: 2,
    borderRadius: radius.control,
    borderColor: c.edge,
    backgroundColor: c.sheet,
  },
  chosen: { borderColor: c.water, backgroundColor: c.waterTint },
}));

/** The cells behind `ChoiceGrid` and `ManyChoiceGrid`. */
export function ChoiceCells({ label, hint, error, kind, cells, columns = 3, bank = true }: ChoiceCellsProps) {
  const styles = useStyles();
  return (
    <View role={kind === 'radio' ? 'radiogroup' : 'group'} aria-label={label} style={{ gap: space.small }}>
      <Text size="small" weight="semibold">
        {label}
      </Text>
      {hint ? (
        <Text size="small" tone="inkSoft">
          {hint}
        </Text>
      ) : null}
      <View style={styles.cells}>
        {cells.map((cell) => (
          <Pressable
            key={cell.key}
            role={kind}
            aria-checked={cell.chosen}
            onPress={cell.choose}
            style={[
              styles.cell,
              {
                minHeight: bank ? target.bank : target.plain,
                flexBasis: `${Math.floor(92 / columns)}%` as const,
              },
              cell.chosen && styles.chosen,
            ]}
          >
            <Text weight={cell.chosen ? 'semibold' : 'regular'} style={{ textAlign: 'center' }}>
              {cell.label}
            </Text>
            {cell.note ? (
              <Text size="tiny" tone="inkSoft">
                {cell.note}
              </Text>
            ) : null}
          </Pressable>
        ))}
      </View>
      {error ? <FieldError id={label} words={error} /> : null}
    </View>
  );
}
