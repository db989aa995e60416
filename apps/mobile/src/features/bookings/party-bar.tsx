import { useState } from 'react';
import type { FreePeg } from '@mereward/shared/bookings/availability-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { Select } from '@/components/select';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { PartyMember } from '@/features/bookings/find-choice';
import type { PickingProps } from '@/features/bookings/free-pegs-part';
import { HoldButton } from '@/features/bookings/hold-button';
import { kindOfMember, kindsBeside, withChange } from '@/features/bookings/party';
import { themed } from '@/hooks/themed';

const useStyles = themed((c) => ({
  member: {
    gap: space.small,
    paddingVertical: space.medium,
    borderBottomWidth: 1,
    borderBottomColor: c.rule,
  },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'flex-end' },
}));

type Props = PickingProps & { pegs: readonly FreePeg[] };

/** Who is booked for so far, when it is more than one, and the hold for all of them at once. */
export function PartyBar({ pegs, ...props }: Props) {
  const { choice, change } = props;
  const [open, setOpen] = useState(false);
  if (choice.party.length === 0) return null;
  const named = choice.party.map(({ pegId }) => pegs.find((peg) => peg.pegId === pegId));
  const lakeId = named.find((peg) => peg !== undefined)?.lakeId ?? choice.filters.lakeId ?? '';
  const words = choice.party.map((_, i) => named[i]?.number ?? 'a place').join(', ');
  return (
    <>
      <Note title={`${countWords(choice.party.length)}: ${words}`}>
        <Text>Choose further pegs from the list, or go on.</Text>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          <Button label="Who fishes where" kind="main" onPress={() => setOpen(true)} />
          <Button label="Drop them" kind="quiet" onPress={() => change({ party: [] })} />
        </View>
      </Note>
      <Sheet open={open} onClose={() => setOpen(false)} title="Who fishes where">
        {choice.party.map((member, i) => (
          <Member
            key={`${String(i)} ${member.pegId ?? ''}`}
            {...props}
            member={member}
            peg={named[i]}
            onChange={(to) => change({ party: withChange(choice.party, i, to) })}
          />
        ))}
        <Text tone="inkSoft">
          Names and dates of birth are asked for next. All pegs are held together, or none.
        </Text>
        <HoldButton
          label={`Hold ${countWords(choice.party.length)}`}
          choice={choice}
          holding={{ lakeId, party: choice.party }}
        />
      </Sheet>
    </>
  );
}

const countWords = (count: number): string => (count === 1 ? '1 ticket' : `${String(count)} tickets`);

type MemberProps = PickingProps & {
  member: PartyMember;
  peg: FreePeg | undefined;
  onChange: (to: Partial<PartyMember> | null) => void;
};

function Member({ kinds, kind, member, peg, onChange }: MemberProps) {
  const styles = useStyles();
  const own = kinds.find(({ id }) => id === member.ticketTypeId) ?? kind;
  const upTo = (most: number) =>
    Array.from({ length: most }, (_, i) => ({ key: String(i + 1), label: String(i + 1) }));
  const peopleMost = Math.min(own.details.peopleMost, peg?.people ?? own.details.peopleMost);
  return (
    <View style={styles.member}>
      <View style={styles.row}>
        <Text weight="semibold" style={{ flex: 1 }}>
          {peg ? `Peg ${peg.number}` : 'A place'}
        </Text>
        <Button
          label="Take out"
          kind="quiet"
          spoken={`Take ${peg ? `peg ${peg.number}` : 'this place'} out`}
          onPress={() => onChange(null)}
        />
      </View>
      <Select
        label="Kind of ticket"
        choices={kindsBeside(kinds, kind).map(({ id, details }) => ({ key: id, label: details.name }))}
        value={own.id}
        onChange={(id) => {
          const to = kinds.find((each) => each.id === id);
          if (to)
            onChange({
              ticketTypeId: id,
              kind: kindOfMember(to),
              rods: Math.min(member.rods, to.details.rodsMost),
            });
        }}
      />
      <View style={styles.row}>
        <View style={{ flex: 1 }}>
          <Select
            label="Rods"
            choices={upTo(own.details.rodsMost)}
            value={String(member.rods)}
            onChange={(rods) => onChange({ rods: Number(rods) })}
          />
        </View>
        {peopleMost > 1 ? (
          <View style={{ flex: 1 }}>
            <Select
              label="Anglers on it"
              choices={upTo(peopleMost)}
              value={String(member.people)}
              onChange={(people) => onChange({ people: Number(people) })}
            />
          </View>
        ) : null}
      </View>
    </View>
  );
}
