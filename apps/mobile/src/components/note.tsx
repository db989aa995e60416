import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Shape, type ShapeName } from '@/components/shape';
import { Text } from '@/components/text';
import type { Colours } from '@/constants/colours';
import { MEASURE_PX, radius, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

export type NoteKind = 'plain' | 'fine' | 'caution' | 'danger';

type Props = {
  kind?: NoteKind | undefined;
  title?: string | undefined;
  children?: ReactNode;
  /** Set when the note appears in answer to an act, so a screen reader says it at once. */
  live?: boolean | undefined;
};

const looks: Record<NoteKind, { shape: ShapeName; tone: keyof Colours; ground: keyof Colours }> = {
  plain: { shape: 'dot', tone: 'water', ground: 'waterTint' },
  fine: { shape: 'triangle', tone: 'reed', ground: 'reedTint' },
  caution: { shape: 'diamond', tone: 'amber', ground: 'amberTint' },
  danger: { shape: 'cross', tone: 'brick', ground: 'brickTint' },
};

/** A boxed remark. A caution says the hazard, then the act, then who decides. Bare strings become body text. */
export function Note({ kind = 'plain', title, children, live = false }: Props) {
  const { colours } = useTheme();
  const look = looks[kind];
  return (
    <View
      role={live ? (kind === 'danger' ? 'alert' : 'status') : 'note'}
      style={{
        maxWidth: MEASURE_PX + 40,
        flexDirection: 'row',
        gap: space.small,
        padding: space.medium,
        borderRadius: radius.control,
        borderLeftWidth: 4,
        borderLeftColor: colours[look.tone],
        backgroundColor: colours[look.ground],
      }}
    >
      <View style={{ paddingTop: 4 }}>
        <Shape name={look.shape} colour={colours[look.tone]} />
      </View>
      <View style={{ flex: 1, gap: space.hair }}>
        {title ? <Text weight="semibold">{title}</Text> : null}
        {typeof children === 'string' ? <Text>{children}</Text> : children}
      </View>
    </View>
  );
}
