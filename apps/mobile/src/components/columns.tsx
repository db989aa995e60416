import type { ReactNode } from 'react';
import { ScrollView, View } from 'react-native';
import { themed } from '@/hooks/themed';
import { useThreeColumns, useWide } from '@/hooks/use-wide';
import { space } from '@/constants/layout';

const useStyles = themed((c) => ({
  row: { flex: 1, flexDirection: 'row', minHeight: 0 },
  side: { flexGrow: 0, flexShrink: 0 },
  sideInside: { padding: space.page, gap: space.page },
  left: { width: 300, borderRightWidth: 1, borderRightColor: c.rule },
  right: { width: 320, borderLeftWidth: 1, borderLeftColor: c.rule, backgroundColor: c.sheet },
  middle: { flex: 1, minWidth: 0 },
  stacked: { padding: space.page, gap: space.large },
}));

type Props = {
  /** What to choose from. */
  list: ReactNode;
  /** The main thing: it is given all that is left. */
  main: ReactNode;
  /** About what is chosen. */
  detail?: ReactNode;
};

/**
 * List, main thing and detail side by side on a wide screen; the main thing over detail over list on a phone. Between the
 * two widths the list goes under the detail. Put it in a `Page` with `fill`.
 */
export function Columns({ list, main, detail }: Props) {
  const styles = useStyles();
  const wide = useWide();
  const three = useThreeColumns();
  if (!wide)
    return (
      <ScrollView style={{ flex: 1 }}>
        {main}
        <View style={styles.stacked}>
          {detail}
          {list}
        </View>
      </ScrollView>
    );
  return (
    <View style={styles.row}>
      {three ? (
        <ScrollView style={[styles.side, styles.left]} contentContainerStyle={styles.sideInside}>
          {list}
        </ScrollView>
      ) : null}
      <View style={styles.middle}>{main}</View>
      {detail || !three ? (
        <ScrollView style={[styles.side, styles.right]} contentContainerStyle={styles.sideInside}>
          {detail}
          {three ? null : list}
        </ScrollView>
      ) : null}
    </View>
  );
}
