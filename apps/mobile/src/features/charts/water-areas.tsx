import { useState } from 'react';
import type { LakeWaters, WaterAreaView } from '@mereward/shared/lakes/peg-water-contract';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { List, Row } from '@/components/list';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useUnits } from '@/hooks/use-units';
import type { useWaterDeeds } from './chart-answers-api';
import { waterArea } from './water-words';

type Props = { waters: LakeWaters; deeds: ReturnType<typeof useWaterDeeds> };

/** The areas that were drawn, the one on top first; each can be taken away again. */
export function WaterAreas({ waters, deeds }: Props) {
  const units = useUnits();
  const [doomed, setDoomed] = useState<WaterAreaView | null>(null);
  const nameOf = ({ details: { pegId } }: WaterAreaView): string => {
    const number = waters.pegs.find((peg) => peg.pegId === pegId)?.number;
    return pegId === null ? 'Nobody’s: kept free of lines' : `Peg ${number ?? 'gone'}`;
  };
  return (
    <Section title="Drawn areas">
      {waters.areas.length === 0 ? (
        <Text tone="inkSoft">
          None. Each peg has the water nearest to its stance that it can cast to and see.
        </Text>
      ) : (
        <List label="Drawn areas, the one on top first">
          {[...waters.areas].reverse().map((each) => (
            <Row
              key={each.id}
              title={nameOf(each)}
              note={[waterArea(each.takesM2, units), each.details.note].filter(Boolean).join(' · ')}
              end={
                waters.may.change ? (
                  <Button
                    label="Take away"
                    kind="quiet"
                    spoken={`Take away: ${nameOf(each)}, ${waterArea(each.takesM2, units)}`}
                    onPress={() => setDoomed(each)}
                  />
                ) : undefined
              }
            />
          ))}
        </List>
      )}
      <Confirm
        open={doomed !== null}
        title="Take this area away?"
        words="The water under it goes back to whoever has it without the area."
        act="Take it away"
        danger
        busy={deeds.remove.isPending}
        onClose={() => setDoomed(null)}
        onAct={() => {
          if (doomed) deeds.remove.mutate(doomed.id, { onSettled: () => setDoomed(null) });
        }}
      />
    </Section>
  );
}
