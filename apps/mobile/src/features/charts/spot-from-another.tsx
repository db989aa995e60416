import { useState } from 'react';
import { aimWords, ownCountWords } from '@mereward/shared/charts/spot-figures';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Loaded } from '@/components/loaded';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { useSameSpot } from './chart-answers-api';
import { sentences, waterUnlessWarned } from './sentences';

type Props = { lake: LakeView; pegId: string; spot: { id: string; name: string } };

/** The same spot as it is reached from any other peg, on the reader's own sticks. */
export function SpotFromAnother({ lake, pegId, spot }: Props) {
  const units = useUnits();
  const [from, setFrom] = useState<string | null>(null);
  const seen = useSameSpot(from, from === null ? null : { spotId: spot.id }, units);
  const number = lake.pegs.find(({ id }) => id === from)?.number ?? '';
  return (
    <View style={{ gap: space.small }}>
      <Select
        label={`“${spot.name}” from peg`}
        unset="Choose a peg"
        choices={lake.pegs
          .filter(({ id }) => id !== pegId)
          .map((peg) => ({ key: peg.id, label: [peg.number, peg.name].filter(Boolean).join(', ') }))}
        value={from}
        onChange={setFrom}
      />
      {from === null ? null : (
        <Loaded query={seen} waiting="Counting it from there…">
          {(view) =>
            view.ok ? (
              <View role="status" style={{ gap: space.hair }}>
                <Text weight="semibold">
                  {`From peg ${number}: ${ownCountWords(view.yourSticks ?? view.surveySticks, units)}, ${aimWords(view.surveySticks)}.`}
                </Text>
                {waterUnlessWarned(view.place.water.words, view.warnings).map((words) => (
                  <Text key={words} size="small" tone="inkSoft">
                    {words}
                  </Text>
                ))}
                {view.warnings.map((words) => (
                  <Text key={words} size="small" tone="amber">
                    {words}
                  </Text>
                ))}
              </View>
            ) : (
              <Text tone="inkSoft">{sentences([view.reason, view.remedy])}</Text>
            )
          }
        </Loaded>
      )}
    </View>
  );
}
