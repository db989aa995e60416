import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { PressLink } from '@/components/press-link';
import { Text } from '@/components/text';
import { Wordmark } from '@/components/wordmark';
import { space, target } from '@/constants/layout';
import type { Place } from '@/constants/places';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  rail: {
    width: 132,
    paddingVertical: space.page,
    borderRightWidth: 1,
    borderRightColor: c.rule,
    backgroundColor: c.sheet,
    gap: space.large,
  },
  bar: { flexDirection: 'row', borderTopWidth: 1, borderTopColor: c.rule, backgroundColor: c.sheet },
  railPlace: {
    minHeight: target.plain,
    paddingHorizontal: space.page,
    justifyContent: 'center',
    borderLeftWidth: 4,
    borderLeftColor: 'transparent',
  },
  barPlace: {
    flexGrow: 1,
    minWidth: target.plain,
    minHeight: 54,
    alignItems: 'center',
    justifyContent: 'center',
    borderTopWidth: 3,
    borderTopColor: 'transparent',
  },
  railHere: { borderLeftColor: c.water, backgroundColor: c.waterTint },
  barHere: { borderTopColor: c.water },
}));

type Props = { places: readonly Place[]; wide: boolean };

function PlaceLink({ place, wide, here }: { place: Place; wide: boolean; here: boolean }) {
  const styles = useStyles();
  return (
    <PressLink
      href={place.href}
      here={here}
      style={wide ? [styles.railPlace, here && styles.railHere] : [styles.barPlace, here && styles.barHere]}
    >
      <Text size="small" weight={here ? 'semibold' : 'regular'} tone={here ? 'water' : 'ink'}>
        {place.label}
      </Text>
    </PressLink>
  );
}

/** The places: a bar along the foot of a phone, a rail down the side of a wide screen. */
export function Places({ places, wide }: Props) {
  const styles = useStyles();
  const path = usePathname();
  const links = places.map((place) => (
    <PlaceLink
      key={place.key}
      place={place}
      wide={wide}
      here={place.holds.includes(path.split('/')[1] ?? '')}
    />
  ));
  return wide ? (
    <View role="navigation" aria-label="Places" style={styles.rail}>
      <View style={{ paddingLeft: space.page + 4 }}>
        <Wordmark />
      </View>
      <View>{links}</View>
    </View>
  ) : (
    <View role="navigation" aria-label="Places" style={styles.bar}>
      {links}
    </View>
  );
}
