import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { View } from 'react-native';
import { Select } from '@/components/select';
import { space } from '@/constants/layout';
import type { FindProps } from '@/features/bookings/find-at-fishery';
import { kindLine, startsOf } from '@/features/tickets/kind-words';

type Props = FindProps & { kinds: readonly TicketTypeView[]; kind: TicketTypeView };

/** Kind of ticket, its start where there is a choice, and the rods. */
export function KindBar({ kinds, kind, choice, change }: Props) {
  const starts = startsOf(kind.details);
  const rods = Array.from({ length: kind.details.rodsMost }, (_, i) => String(i + 1));
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'flex-end' }}>
      <View style={{ flexGrow: 3, flexBasis: 300, minWidth: 0 }}>
        <Select
          label="Kind of ticket"
          choices={kinds.map(({ id, details }) => ({ key: id, label: kindLine(details, choice.day ?? '') }))}
          value={kind.id}
          onChange={(kindId) => change({ kindId, start: null, pegId: null, party: [] })}
        />
      </View>
      {starts.length > 1 ? (
        <View style={{ flexGrow: 1, flexBasis: 100 }}>
          <Select
            label="Start"
            choices={starts.map((start) => ({ key: start, label: start }))}
            value={choice.start}
            onChange={(start) => change({ start })}
          />
        </View>
      ) : null}
      {rods.length > 1 ? (
        <View style={{ flexGrow: 1, flexBasis: 90 }}>
          <Select
            label="Rods"
            choices={rods.map((count) => ({ key: count, label: count }))}
            value={choice.rods === null ? null : String(choice.rods)}
            onChange={(count) => change({ rods: Number(count) })}
          />
        </View>
      ) : null}
    </View>
  );
}
