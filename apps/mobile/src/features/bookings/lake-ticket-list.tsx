import type { FreePegs } from '@mereward/shared/bookings/availability-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { PickingProps } from '@/features/bookings/free-pegs-part';
import { HoldButton } from '@/features/bookings/hold-button';
import { aMember } from '@/features/bookings/party';
import { QuotePart } from '@/features/bookings/quote-part';

/** Tickets that name no peg: one chooses a lake, and a peg on arrival or by a draw. */
export function LakeTicketList({ free, kind, choice, change }: PickingProps & { free: FreePegs }) {
  const how =
    kind.details.pegChoice === 'draw'
      ? 'The peg is drawn when you come.'
      : 'You choose your peg when you come. The first to claim it has it.';
  const rods = choice.rods ?? kind.details.rodsIncluded;
  return (
    <>
      <Note>{how}</Note>
      {free.lakes.map((lake, i) => {
        const member = aMember({ pegId: null, kind, rods });
        const why = lake.closed ?? lake.whyNot;
        return (
          <Section
            key={lake.id}
            title={lake.name}
            bare={i === 0}
            end={<Text tone="inkSoft">{`${String(lake.free)} pegs free`}</Text>}
          >
            {why === null ? (
              <View style={{ gap: space.small }}>
                <QuotePart
                  wish={{
                    kindId: kind.id,
                    lakeId: lake.id,
                    day: choice.day ?? '',
                    start: choice.start,
                    rods: member.rods,
                    people: 1,
                  }}
                />
                <HoldButton
                  label={`Hold a place on ${lake.name}`}
                  choice={choice}
                  holding={{ lakeId: lake.id, party: [...choice.party, member] }}
                />
                <Button
                  label="Book for more people…"
                  kind="quiet"
                  onPress={() =>
                    change({
                      party: [...choice.party, member],
                      filters: { ...choice.filters, lakeId: lake.id },
                    })
                  }
                />
              </View>
            ) : (
              <Note kind="caution">{why}</Note>
            )}
          </Section>
        );
      })}
    </>
  );
}
