import { useState } from 'react';
import type { SpotView } from '@mereward/shared/charts/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { usePegPage } from '@/features/charts/api';
import { useRemoveSpot } from '@/features/charts/spot-api';

type Props = { lakeId: string; pegId: string };

/** The spots written up for a peg, to be added to, changed and taken away. */
export function SpotsSection({ lakeId, pegId }: Props) {
  const page = usePegPage(pegId);
  const [doomed, setDoomed] = useState<SpotView | null>(null);
  const removal = useRemoveSpot(pegId);
  const spotHref = (id: string) => `/office/lakes/${lakeId}/pegs/${pegId}/spots/${id}` as const;
  return (
    <Section
      title="Spots"
      note="Places worth casting to from this peg. Visitors read them in wraps and by far-bank mark."
      end={<LinkButton label="Add a spot" href={spotHref('new')} />}
    >
      <Loaded query={page} waiting="Reading the spots…">
        {({ spots }) =>
          spots?.length ? (
            <List label="Spots of this peg">
              {spots.map((spot) => (
                <Row
                  key={spot.id}
                  title={spot.name}
                  note={spot.words}
                  end={
                    <View style={{ gap: space.hair }}>
                      <LinkButton label="Change" href={spotHref(spot.id)} />
                      <Button
                        label="Take away"
                        kind="quiet"
                        spoken={`Take away: ${spot.name}`}
                        onPress={() => setDoomed(spot)}
                      />
                    </View>
                  }
                />
              ))}
            </List>
          ) : (
            <Text tone="inkSoft">No spot yet.</Text>
          )
        }
      </Loaded>
      <ProblemNote problem={removal.error} />
      <Confirm
        open={doomed !== null}
        title="Take this spot away?"
        words={`${doomed?.name ?? ''} is gone from the peg’s page at once, for good. The casts stay.`}
        act="Take it away"
        danger
        busy={removal.isPending}
        onClose={() => setDoomed(null)}
        onAct={() => {
          if (doomed) removal.mutate(doomed.id, { onSettled: () => setDoomed(null) });
        }}
      />
    </Section>
  );
}
