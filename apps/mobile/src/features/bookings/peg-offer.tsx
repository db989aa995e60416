import { View } from 'react-native';
import { Button } from '@/components/button';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { PegRows } from '@/features/bookings/free-peg-list';
import type { OfferProps } from '@/features/bookings/free-pegs-part';
import { HoldAct, HoldFault } from '@/features/bookings/hold-button';
import { aMember, withMember } from '@/features/bookings/party';
import { groundWords, PEG_LOOKS, pegsLike, wayWords } from '@/features/bookings/peg-words';
import { QuotePart } from '@/features/bookings/quote-part';
import { JoinWaiting } from '@/features/bookings/join-waiting';
import { useHold } from '@/features/bookings/use-hold';
import { useUnits } from '@/hooks/use-units';
import { dayName } from '@/lib/format-time';

/** One peg: what it holds, the way there, its price, and the hold; when it is gone, what is like it. */
export function PegOffer(props: OfferProps) {
  const { peg, kind, choice } = props;
  const hold = useHold(choice);
  const own = hold.isPending || hold.isSuccess; // it is taken by now, but by this reader
  const units = useUnits();
  const lake = props.free.lakes.find(({ id }) => id === peg.lakeId);
  return (
    <View style={{ gap: space.medium }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'center' }}>
        <StatusShape {...PEG_LOOKS[own ? 'free' : peg.state]} />
        <Text tone="inkSoft">{[lake?.name, props.free.words].filter(Boolean).join(' · ')}</Text>
      </View>
      <HoldFault hold={hold} />
      {peg.state === 'free' || own ? <Offered {...props} hold={hold} /> : <Gone {...props} />}
      <Facts
        facts={[
          { term: 'In front of it', fact: groundWords(peg.ground, units) },
          { term: 'Room for', fact: roomWords(peg) },
          { term: 'The way', fact: wayWords(peg) },
          { term: 'Path', fact: peg.surface },
          { term: 'Wheelchair', fact: peg.stepFree.facts },
        ]}
      />
      <LinkButton label="What lies in front of it" href={`/water/pegs/${peg.pegId}`} />
      {peg.state === 'free' || own || choice.day === null ? null : (
        <JoinWaiting
          lakeId={peg.lakeId}
          lakeName={lake?.name ?? ''}
          peg={peg}
          day={choice.day}
          wish={{ ticketTypeId: kind.id, start: choice.start, rods: choice.rods ?? 1 }}
          choice={choice}
        />
      )}
    </View>
  );
}

const counted = (count: number, one: string): string => `${String(count)} ${one}${count === 1 ? '' : 's'}`;

const roomWords = ({ people, rods, placesLeft }: OfferProps['peg']): string => {
  const room = `${counted(people, 'angler')}, ${counted(rods, 'rod')}`;
  return placesLeft === null ? room : `${room}; shared, ${counted(placesLeft, 'place')} left`;
};

function Offered({ peg, kind, choice, change, hold }: OfferProps & { hold: ReturnType<typeof useHold> }) {
  const member = aMember({ pegId: peg.pegId, kind, rods: choice.rods ?? kind.details.rodsIncluded });
  const inParty = choice.party.some(({ pegId }) => pegId === peg.pegId);
  const alone = choice.party.length === 0;
  return (
    <>
      <QuotePart
        wish={{
          kindId: kind.id,
          lakeId: peg.lakeId,
          day: choice.day ?? '',
          start: choice.start,
          rods: member.rods,
          people: 1,
        }}
      />
      {alone ? (
        <HoldAct
          label={`Hold peg ${peg.number}`}
          choice={choice}
          hold={hold}
          holding={{ lakeId: peg.lakeId, party: [member] }}
        />
      ) : null}
      {inParty ? (
        <Text tone="inkSoft">This peg is in your party already. See the bar at the foot of the list.</Text>
      ) : (
        <Button
          label={alone ? 'Book for more people…' : `Add peg ${peg.number} to your party`}
          kind={alone ? 'quiet' : 'main'}
          onPress={() => change({ party: withMember(choice.party, member), pegId: null })}
        />
      )}
    </>
  );
}

function Gone({ peg, free, change }: OfferProps) {
  const like = pegsLike(peg, free.pegs);
  const next = peg.nextFree;
  return (
    <>
      {peg.whyNot === null ? null : <Text>{peg.whyNot}</Text>}
      {like.length > 0 ? (
        <View style={{ gap: space.small }}>
          <Text weight="semibold">Free, and most like it</Text>
          <PegRows
            label="Free pegs most like it"
            pegs={like}
            open={null}
            wanted={[]}
            currency={free.currency}
            onOpen={(pegId) => change({ pegId })}
          />
        </View>
      ) : null}
      {next ? (
        <Button
          label={`Free on ${dayName(next.day)}: see it then`}
          onPress={() => change({ day: next.day, party: [] })}
        />
      ) : null}
    </>
  );
}
