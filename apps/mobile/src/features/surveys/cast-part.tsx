import type { ReactNode } from 'react';
import { Pressable, View } from 'react-native';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  part: { gap: space.small, paddingVertical: space.medium, borderTopWidth: 1, borderTopColor: c.rule },
  head: { minHeight: target.bank, flexDirection: 'row', alignItems: 'center', gap: space.medium },
}));

/** One part of the cast form, ruled off from the one above. */
export function CastPart({ children }: { children: ReactNode }) {
  return <View style={useStyles().part}>{children}</View>;
}

type Props = {
  label: string;
  /** What stands in it now. */
  words: string;
  /** Stands at the right: what opening it changes, "straight over". */
  act: string;
  open: boolean;
  onTurn: () => void;
  children: ReactNode;
};

/** A part that says what it holds in one line, and opens when that is to be changed. */
export function FoldedPart({ label, words, act, open, onTurn, children }: Props) {
  const styles = useStyles();
  return (
    <CastPart>
      <Pressable role="button" aria-expanded={open} onPress={onTurn} style={styles.head}>
        <View style={{ flex: 1, minWidth: 0 }}>
          <Text size="small" tone="inkSoft">
            {label}
          </Text>
          <Text weight="semibold">{words}</Text>
        </View>
        <Text tone="water" style={{ flexShrink: 1, textAlign: 'right' }}>
          {act}
          <Text aria-hidden tone="water">
            {open ? ' ▴' : ' ▾'}
          </Text>
        </Text>
      </Pressable>
      {open ? <View style={{ gap: space.medium }}>{children}</View> : null}
    </CastPart>
  );
}
