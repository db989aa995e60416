import { useState } from 'react';
import { View } from 'react-native';
import { Field } from '@/components/field';
import { PressLink } from '@/components/press-link';
import type { TableLine, TableLook } from '@/components/table-lines';
import { lineHolds } from '@/components/table-order';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  card: {
    padding: space.medium,
    gap: space.hair,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: radius.control,
    backgroundColor: c.sheet,
  },
  line: { flexDirection: 'row', gap: space.medium, alignItems: 'center', justifyContent: 'space-between' },
}));

function Card({ heads, line }: { heads: TableLook['heads']; line: TableLine }) {
  const styles = useStyles();
  const inside = heads.map(({ key, head }, at) =>
    at === 0 ? (
      <View key={key}>{line.shown[0]}</View>
    ) : line.values[at] === null ? null : (
      <View key={key} style={styles.line}>
        <Text size="small" tone="inkSoft">
          {head}
        </Text>
        <View style={{ flexShrink: 1, alignItems: 'flex-end' }}>{line.shown[at]}</View>
      </View>
    ),
  );
  return (
    <View role="listitem">
      {line.href === null ? (
        <View style={styles.card}>{inside}</View>
      ) : (
        <PressLink href={line.href} style={styles.card}>
          {inside}
        </PressLink>
      )}
    </View>
  );
}

/** A table's rows as cards, for a phone. Screens use `Table`. */
export function CardTable({ caption, heads, lines, filter }: TableLook) {
  const [typed, setTyped] = useState('');
  const shown = lines.filter((line) => lineHolds(line, typed));
  return (
    <View style={{ gap: space.medium }}>
      {filter ? <Field label="Find" keypad="search" value={typed} onChange={setTyped} /> : null}
      {shown.length === 0 ? <Text tone="inkSoft">Nothing here holds those words.</Text> : null}
      <View role="list" aria-label={caption} style={{ gap: space.small }}>
        {shown.map((line) => (
          <Card key={line.key} heads={heads} line={line} />
        ))}
      </View>
    </View>
  );
}
