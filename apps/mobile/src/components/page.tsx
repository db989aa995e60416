import type { ReactNode } from 'react';
import { usePathname } from 'expo-router';
import { ScrollView, View } from 'react-native';
import { EmergencyLine } from '@/components/emergency-line';
import { PageHead, type PageHeadProps } from '@/components/page-head';
import { MEASURE_PX, space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { useWide } from '@/hooks/use-wide';
import { usePageTitle } from '@/hooks/use-page-title';

const useStyles = themed((c) => ({
  page: { flex: 1, minHeight: 0, minWidth: 0, backgroundColor: c.paper },
  scroll: { flex: 1 },
  inside: { flexGrow: 1, paddingHorizontal: space.page, width: '100%' },
  wideInside: { paddingHorizontal: space.wide },
  content: { flexGrow: 1, gap: space.large, paddingBottom: space.large },
  actions: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    gap: space.small,
    paddingHorizontal: space.page,
    paddingVertical: space.medium,
    borderTopWidth: 1,
    borderTopColor: c.rule,
    backgroundColor: c.paper,
  },
}));

const widths = { reading: MEASURE_PX + 2 * space.wide, wide: 1440 } as const;

type Props = Omit<PageHeadProps, 'path'> & {
  /** `reading` keeps lines short; `wide` is for tables and things side by side. */
  width?: keyof typeof widths | undefined;
  /** The page does not scroll: its one child fills what is left, as a chart does. */
  fill?: boolean | undefined;
  /** Stand at the foot within reach of the thumb: the one main act last. Give each button `grow`. */
  actions?: ReactNode;
  children: ReactNode;
};

/** Every screen's frame: the main landmark, one level-1 heading, the way back, the main act, the emergency line. */
export function Page({ width = 'reading', fill = false, actions, children, ...head }: Props) {
  const styles = useStyles();
  const wide = useWide();
  const path = usePathname();
  usePageTitle(head.title);
  return (
    <View role="main" nativeID="main" tabIndex={-1} style={styles.page}>
      {fill ? (
        <>
          <View style={{ paddingHorizontal: space.page }}>
            <PageHead {...head} path={path} />
          </View>
          <View style={{ flex: 1, minHeight: 0 }}>{children}</View>
        </>
      ) : (
        <ScrollView
          key={path}
          style={styles.scroll}
          contentContainerStyle={[styles.inside, wide && styles.wideInside, { maxWidth: widths[width] }]}
        >
          <PageHead {...head} path={path} />
          <View style={styles.content}>{children}</View>
          <EmergencyLine />
        </ScrollView>
      )}
      {actions ? (
        <View style={[styles.actions, wide && styles.wideInside, { maxWidth: widths[width] }]}>
          {actions}
        </View>
      ) : null}
    </View>
  );
}
