import { addDays } from '@mereward/shared/time/zoned';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { ChoiceGrid } from '@/components/choice-grid';
import { Field } from '@/components/field';
import { Select } from '@/components/select';
import { space } from '@/constants/layout';
import { daysOf, ZOOMS, type Zoom } from '@/features/bookings/board-cells';

export type BoardPlace = { lakeId: string; from: string; zoom: Zoom };

type Props = {
  place: BoardPlace;
  today: string;
  lakes: readonly { id: string; name: string; fisheryName: string }[];
  /** False on a phone, which shows one day. */
  zooms: boolean;
  onMove: (place: Partial<BoardPlace>) => void;
};

const DAY = /^\d{4}-\d\d-\d\d$/;

/** Which lake, which days, how near: the board's controls in one row. */
export function BoardBar({ place: { lakeId, from, zoom }, today, lakes, zooms, onMove }: Props) {
  const several = new Set(lakes.map(({ fisheryName }) => fisheryName)).size > 1;
  const step = zooms ? daysOf(zoom) : 1;
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'flex-end' }}>
      {lakes.length > 1 ? (
        <View style={{ flexBasis: 170, flexGrow: 1, maxWidth: 280 }}>
          <Select
            label="Lake"
            choices={lakes.map(({ id, name, fisheryName }) => ({
              key: id,
              label: several ? `${name}, ${fisheryName}` : name,
            }))}
            value={lakeId}
            onChange={(to) => onMove({ lakeId: to })}
          />
        </View>
      ) : null}
      <View style={{ flexBasis: 160 }}>
        <Field
          label={zooms && zoom !== 'day' ? 'From day' : 'Day'}
          picker="date"
          value={from}
          onChange={(to) => {
            if (DAY.test(to)) onMove({ from: to });
          }}
        />
      </View>
      <Button label="Earlier" onPress={() => onMove({ from: addDays(from, -step) })} />
      <Button label="Today" onPress={() => onMove({ from: today })} />
      <Button label="Later" onPress={() => onMove({ from: addDays(from, step) })} />
      {zooms ? (
        <View style={{ flexBasis: 320 }}>
          <ChoiceGrid
            label="Show"
            choices={ZOOMS}
            value={zoom}
            onChange={(to) => onMove({ zoom: to })}
            columns={3}
            bank={false}
          />
        </View>
      ) : null}
    </View>
  );
}
