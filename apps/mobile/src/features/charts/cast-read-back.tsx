import type { CastReading } from '@mereward/shared/charts/chart-answers';
import { AGE_WORDS } from '@mereward/shared/charts/chart-age';
import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';
import { useCastReading, type SaidCast } from './chart-answers-api';
import { sentences, waterUnlessWarned } from './sentences';

type Props = { pegId: string; cast: SaidCast };

/** What the chart says at the end of a cast: depth and bottom with their grade and age, whose water, how sure of the place. */
export function CastReadBack({ pegId, cast }: Props) {
  const reading = useCastReading(pegId, cast);
  return (
    <Loaded query={reading} waiting="Reading the cast back…">
      {(view) => (
        <View role="status" style={{ gap: space.hair, alignItems: 'flex-start', maxWidth: MEASURE_PX }}>
          {view.ok ? (
            <Read view={view} pegId={pegId} />
          ) : (
            <Text>{sentences([view.reason, view.remedy])}</Text>
          )}
        </View>
      )}
    </Loaded>
  );
}

function Read({ view, pegId }: { view: Extract<CastReading, { ok: true }>; pegId: string }) {
  const units = useUnits();
  const { place, spreadM, warnings, whyNot, words, age } = view;
  const [lon, lat] = place.position;
  return (
    <>
      <Text weight="semibold">{words}</Text>
      <Text size="small" tone="inkSoft">
        {`So counted and aimed, 95 casts in 100 land within ${length(spreadM, units)} of it. ${sentences(waterUnlessWarned(place.water.words, warnings))}`}
      </Text>
      {age === 'changed' || age === 'old' ? (
        <Text size="small" tone="amber">{`${AGE_WORDS[age]}.`}</Text>
      ) : null}
      {[...warnings.filter((each) => each !== place.water.words), ...(whyNot ? [whyNot] : [])].map((each) => (
        <Text key={each} size="small" tone="amber">
          {each}
        </Text>
      ))}
      <LinkButton
        label="It isn’t like that"
        kind="quiet"
        href={`/water/pegs/${pegId}/disagree?lon=${String(lon)}&lat=${String(lat)}`}
      />
    </>
  );
}
