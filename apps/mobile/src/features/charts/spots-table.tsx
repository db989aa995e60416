import type { SpotView } from '@mereward/shared/charts/contract';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { Pressable, View } from 'react-native';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { useChartUnits } from './use-chart-units';
import { depthNow, depthShown } from '@mereward/shared/charts/depth-words';
import { aimWords, ownCount } from '@mereward/shared/charts/spot-figures';

const useStyles = themed((c) => ({
  head: {
    flexDirection: 'row',
    gap: space.small,
    paddingBottom: space.hair,
    borderBottomWidth: 1,
    borderBottomColor: c.rule,
  },
  row: {
    minHeight: target.plain,
    justifyContent: 'center',
    paddingVertical: space.small,
    borderBottomWidth: 1,
    borderBottomColor: c.rule,
  },
  line: { flexDirection: 'row', alignItems: 'baseline', gap: space.small },
  chosen: { backgroundColor: c.floatTint },
  name: { flex: 1, minWidth: 0 },
  figure: { width: 80, textAlign: 'right' },
  bottom: { textAlign: 'right' },
}));

type Props = {
  /** "Spots from this peg" */
  label?: string;
  spots: readonly SpotView[];
  spotId: string | null;
  onSpot: (spotId: string) => void;
  water: { levelM: number | null; datumM: number };
};

/** The spots that can be reached from a peg, each by count and aim, with depth and bottom. A press chooses one. */
export function SpotsTable({ label = 'Spots from this peg', spots, spotId, onSpot, water }: Props) {
  const styles = useStyles();
  const units = useChartUnits();
  const depth = (spot: SpotView): string =>
    spot.depthM === null ? '' : depthNow(depthShown(spot.depthM, water).depthM, units.length);
  return (
    <View>
      <View style={styles.head} aria-hidden>
        <Text size="small" tone="inkSoft" style={styles.name}>
          Spot
        </Text>
        <Text size="small" tone="inkSoft" style={styles.figure}>
          {`${stickWords(units.stickSpacingM)} wraps`}
        </Text>
        <Text size="small" tone="inkSoft" style={styles.figure}>
          {water.levelM === null ? 'at datum' : 'today'}
        </Text>
      </View>
      <View role="radiogroup" aria-label={label}>
        {spots.map((spot) => {
          const bottom = spot.bottom === null ? '' : BOTTOM_WORDS[spot.bottom];
          const chosen = spot.id === spotId;
          const said = [spot.name, `${ownCount(spot, units)} wraps`, aimWords(spot), depth(spot), bottom];
          return (
            <Pressable
              key={spot.id}
              role="radio"
              aria-checked={chosen}
              aria-label={said.filter(Boolean).join(', ')}
              onPress={() => onSpot(spot.id)}
              style={[styles.row, chosen && styles.chosen]}
            >
              <View style={styles.line}>
                <Text weight={chosen ? 'semibold' : 'regular'} style={styles.name}>
                  {spot.name}
                </Text>
                <Text style={styles.figure}>{ownCount(spot, units)}</Text>
                <Text style={styles.figure}>{depth(spot)}</Text>
              </View>
              <View style={styles.line}>
                <Text size="small" tone="inkSoft" style={styles.name}>
                  {aimWords(spot)}
                </Text>
                <Text size="small" tone="inkSoft" style={styles.bottom}>
                  {bottom}
                </Text>
              </View>
            </Pressable>
          );
        })}
      </View>
    </View>
  );
}
