import type { ReactNode } from 'react';
import type { Href } from 'expo-router';
import { Pressable, View } from 'react-native';
import { PressLink } from '@/components/press-link';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  list: { borderTopWidth: 1, borderTopColor: c.rule },
  row: { borderBottomWidth: 1, borderBottomColor: c.rule },
  inside: {
    minHeight: target.plain,
    paddingVertical: space.medium,
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.medium,
  },
  chosen: { backgroundColor: c.floatTint },
}));

/** A ruled list of `Row`s. `label` names it to a screen reader. */
export function List({ label, children }: { label: string; children: ReactNode }) {
  const styles = useStyles();
  return (
    <View role="list" aria-label={label} style={styles.list}>
      {children}
    </View>
  );
}

type RowProps = {
  title: string;
  /** A smaller line under the title. */
  note?: string | undefined;
  /** Stands on the right: a figure, a `StatusShape`, a button. */
  end?: ReactNode;
  href?: Href | undefined;
  onPress?: (() => void) | undefined;
  chosen?: boolean | undefined;
};

/** One line of a `List`: goes somewhere (`href`), does something (`onPress`) or only says. */
export function Row({ title, note, end, href, onPress, chosen = false }: RowProps) {
  const styles = useStyles();
  const words = (
    <View style={{ flex: 1, minWidth: 0 }}>
      <Text weight={href || onPress ? 'semibold' : 'regular'}>{title}</Text>
      {note ? (
        <Text size="small" tone="inkSoft">
          {note}
        </Text>
      ) : null}
    </View>
  );
  const inside = [styles.inside, chosen && styles.chosen];
  const ending = typeof end === 'string' ? <Text>{end}</Text> : end;
  return (
    <View role="listitem" style={styles.row}>
      {href ? (
        <PressLink href={href} style={inside}>
          {words}
          {ending}
        </PressLink>
      ) : onPress ? (
        <Pressable role="button" onPress={onPress} style={inside}>
          {words}
          {ending}
        </Pressable>
      ) : (
        <View style={inside}>
          {words}
          {ending}
        </View>
      )}
    </View>
  );
}
