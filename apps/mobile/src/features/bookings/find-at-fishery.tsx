import { useState } from 'react';
import type { FisheryListItem, FisheryView } from '@mereward/shared/fisheries/contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { space } from '@/constants/layout';
import { DayStrip } from '@/features/bookings/day-strip';
import type { FindChoice } from '@/features/bookings/find-choice';
import { FreePegsPart } from '@/features/bookings/free-pegs-part';
import { KindBar } from '@/features/bookings/kind-bar';
import { lastSearch } from '@/features/bookings/use-find-choice';
import { useFishery } from '@/features/fisheries/office-api';
import { useTicketTypes } from '@/features/tickets/office-api';
import { startsOf } from '@/features/tickets/kind-words';
import { civilTime } from '@/lib/zoned-time';

export type FindProps = { choice: FindChoice; change: (to: Partial<FindChoice>) => void };
type Props = FindProps & { fishery: FisheryListItem };

/** The search at one fishery: a day, a kind of ticket, then the pegs. */
export function FindAtFishery({ fishery, choice, change }: Props) {
  const about = useFishery(fishery.id);
  const kinds = useTicketTypes(fishery.id);
  return (
    <Loaded query={about} waiting="Reading the fishery…">
      {(view) => (
        <Loaded
          query={kinds}
          waiting="Reading the kinds of ticket…"
          empty={{
            when: ({ ticketTypes }) => onSale(ticketTypes).length === 0,
            show: (
              <Empty
                title={`${fishery.name} sells no tickets here yet`}
                action={<LinkButton label="To the water" href="/water" />}
              >
                Ask the fishery’s office or the bailiff on the bank. A ticket written there for your e-mail
                address is shown under My tickets.
              </Empty>
            ),
          }}
        >
          {({ ticketTypes }) => (
            <Find fishery={view} kinds={onSale(ticketTypes)} choice={choice} change={change} />
          )}
        </Loaded>
      )}
    </Loaded>
  );
}

/** Matches are entered at their organiser's, and staff tickets are written at the lodge. */
const onSale = (kinds: readonly TicketTypeView[]): TicketTypeView[] =>
  kinds.filter(({ details: { audience } }) => audience !== 'match' && audience !== 'staff');

type Finding = FindProps & { fishery: FisheryView; kinds: readonly TicketTypeView[] };

function Find({ fishery, kinds, choice, change }: Finding) {
  const [today] = useState(() => civilTime(Date.now(), fishery.details.zone).slice(0, 10));
  const last = lastSearch.use();
  const wanted = choice.kindId ?? last.kindId;
  const kind =
    kinds.find(({ id }) => id === wanted) ??
    kinds.find(({ details }) => details.audience === 'public') ??
    kinds[0];
  if (!kind) return null;
  const starts = startsOf(kind.details);
  const whole: FindChoice = {
    ...choice,
    fisheryId: fishery.id,
    day: choice.day ?? today,
    kindId: kind.id,
    start: starts.find((start) => start === choice.start) ?? usualStart(starts),
    rods: Math.min(choice.rods ?? last.rods ?? kind.details.rodsIncluded, kind.details.rodsMost),
  };
  return (
    <View style={{ gap: space.medium }}>
      <DayStrip fishery={fishery} kind={kind} choice={whole} change={change} today={today} />
      <KindBar kinds={kinds} kind={kind} choice={whole} change={change} />
      <FreePegsPart fishery={fishery} kinds={kinds} kind={kind} choice={whole} change={change} />
    </View>
  );
}

/** Where a start is to be picked: noon when it may be, else the first. */
const usualStart = (starts: readonly string[]): string | null =>
  starts.includes('12:00') ? '12:00' : (starts[0] ?? null);
