import type { ChartView } from '@mereward/shared/charts/contract';
import { aimWords, ownCountWords } from '@mereward/shared/charts/spot-figures';
import type { Point } from '@mereward/shared/geometry/plane';
import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useSameSpot } from './chart-answers-api';
import { placeOf } from './outline-drawing';
import { sentences, waterUnlessWarned } from './sentences';
import { useChartUnits } from './use-chart-units';

type Props = { chart: ChartView; pegId: string; place: Point };

/** A touched place as reached from the chosen peg on the reader's own sticks, and whose water it is. */
export function PlaceFromPeg({ chart, pegId, place }: Props) {
  const units = useChartUnits();
  const [lon, lat] = placeOf(chart.origin, place);
  const spot = useSameSpot(pegId, { lon, lat }, units);
  const number = chart.pegs.find(({ id }) => id === pegId)?.number ?? '';
  return (
    <Loaded query={spot} waiting="Counting it from the peg…">
      {(view) =>
        view.ok ? (
          <View style={{ gap: space.hair, alignItems: 'flex-start' }}>
            <Text>
              {`From peg ${number}: ${ownCountWords(view.yourSticks ?? view.surveySticks, units)}, ${sentences([aimWords(view.surveySticks), ...waterUnlessWarned(view.place.water.words, view.warnings)])}`}
            </Text>
            {view.warnings
              .filter((words) => words !== view.place.water.words)
              .map((words) => (
                <Text key={words} size="small" tone="amber">
                  {words}
                </Text>
              ))}
            <LinkButton
              label="It isn’t like that"
              kind="quiet"
              href={`/water/pegs/${pegId}/disagree?lon=${String(lon)}&lat=${String(lat)}`}
            />
          </View>
        ) : (
          <Text tone="inkSoft">{sentences([view.reason, view.remedy])}</Text>
        )
      }
    </Loaded>
  );
}
