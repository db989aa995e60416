import { useState } from 'react';
import type { FreePeg, FreePegs } from '@mereward/shared/bookings/availability-contract';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { Toggles } from '@/components/toggles';
import { space } from '@/constants/layout';
import type { FindProps } from '@/features/bookings/find-at-fishery';
import { filterCount, freeQuery, NO_FILTERS } from '@/features/bookings/find-choice';
import { FilterSheet } from '@/features/bookings/filter-sheet';
import { useFreePegs } from '@/features/bookings/free-api';
import { FreePegList } from '@/features/bookings/free-peg-list';
import { LakeTicketList } from '@/features/bookings/lake-ticket-list';
import { PartyBar } from '@/features/bookings/party-bar';
import { PegOffer } from '@/features/bookings/peg-offer';
import { useBoardEvents } from '@/features/bookings/use-board-events';
import { pegTitle } from '@mereward/shared/lakes/peg-facts';

export type PickingProps = FindProps & {
  fishery: FisheryView;
  kinds: readonly TicketTypeView[];
  kind: TicketTypeView;
};

/** The pegs for the day and ticket chosen, kept fresh while they are looked at. */
export function FreePegsPart(props: PickingProps) {
  const { fishery, choice, change } = props;
  const [filtering, setFiltering] = useState(false);
  const [freeOnly, setFreeOnly] = useState(false);
  const free = useFreePegs(fishery.id, freeQuery(choice));
  useBoardEvents(fishery.id);
  const used = filterCount(choice.filters);
  return (
    <View style={{ gap: space.medium }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'center' }}>
        <Button
          label={used === 0 ? 'Filter pegs' : `Filters (${String(used)})`}
          onPress={() => setFiltering(true)}
        />
        {props.kind.details.pegChoice === 'book_a_peg' ? (
          <Toggles
            label="What is shown"
            toggles={[{ key: 'free', label: 'Free pegs only' }]}
            isOn={() => freeOnly}
            onToggle={() => setFreeOnly(!freeOnly)}
          />
        ) : null}
        {used === 0 ? null : (
          <Button label="Show every peg" kind="quiet" onPress={() => change({ filters: NO_FILTERS })} />
        )}
      </View>
      <FilterSheet
        open={filtering}
        onClose={() => setFiltering(false)}
        lakes={free.data?.lakes ?? []}
        filters={choice.filters}
        onChange={(filters) => change({ filters })}
      />
      <Loaded query={free} waiting="Looking which pegs are free…">
        {(pegs) => <Pegs {...props} free={pegs} freeOnly={freeOnly} />}
      </Loaded>
      <PartyBar {...props} pegs={free.data?.pegs ?? []} />
    </View>
  );
}

function Pegs({ free, freeOnly, ...props }: PickingProps & { free: FreePegs; freeOnly: boolean }) {
  const { kind, choice, change } = props;
  if (free.whyNot !== null)
    return (
      <Note kind="caution" title="Not for this day">
        {free.whyNot}
      </Note>
    );
  const open = free.pegs.find(({ pegId }) => pegId === choice.pegId);
  const close = (): void => change({ pegId: null });
  return (
    <View style={{ gap: space.medium }}>
      <Text tone="inkSoft">{free.words}</Text>
      {kind.details.pegChoice === 'book_a_peg' ? (
        <FreePegList {...props} free={free} freeOnly={freeOnly} />
      ) : (
        <LakeTicketList {...props} free={free} />
      )}
      <Sheet open={open !== undefined} onClose={close} title={open ? pegTitle(open) : ''}>
        {open ? <PegOffer {...props} key={open.pegId} free={free} peg={open} /> : null}
      </Sheet>
    </View>
  );
}

export type OfferProps = PickingProps & { free: FreePegs; peg: FreePeg };
