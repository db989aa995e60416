import { useState } from 'react';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import { addDays } from '@mereward/shared/time/zoned';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { Pressable, ScrollView, View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import type { FindChoice } from '@/features/bookings/find-choice';
import type { FindProps } from '@/features/bookings/find-at-fishery';
import { useDayBoards } from '@/features/bookings/free-api';
import { freeOnDay } from '@/features/bookings/free-days';
import { themed } from '@/hooks/themed';
import { dayName } from '@/lib/format-time';

const DAYS = 14;

const useStyles = themed((c) => ({
  days: { flexDirection: 'row', gap: space.small, paddingBottom: space.hair },
  day: {
    minWidth: 64,
    minHeight: 72,
    paddingHorizontal: space.small,
    alignItems: 'center',
    justifyContent: 'center',
    borderRadius: radius.control,
    borderWidth: 1,
    borderColor: c.edge,
    backgroundColor: c.sheet,
  },
  chosen: { borderWidth: 2, borderColor: c.water, backgroundColor: c.waterTint },
}));

type Props = FindProps & { fishery: FisheryView; kind: TicketTypeView; today: string };

/** Two weeks of days side by side, each with how many pegs are free for the hours of the ticket. */
export function DayStrip({ fishery, kind, choice, change, today }: Props) {
  const styles = useStyles();
  const [choosing, setChoosing] = useState(false);
  const first = stripFrom(choice, today);
  const days = Array.from({ length: DAYS }, (_, i) => addDays(first, i));
  const lakeIds = choice.filters.lakeId === null ? kind.details.lakeIds : [choice.filters.lakeId];
  const boards = useDayBoards(fishery.id, lakeIds, { from: first, days: DAYS + 3 });
  const whole = boards.length === lakeIds.length;
  const free = (day: string): number | null =>
    whole
      ? freeOnDay(boards, {
          kind: kind.details,
          day,
          start: choice.start,
          position: fishery.details.position,
        })
      : null;
  return (
    <View style={{ gap: space.small }}>
      <ScrollView horizontal showsHorizontalScrollIndicator={false}>
        <View role="radiogroup" aria-label="Day" style={styles.days}>
          {days.map((day) => (
            <DayCell
              key={day}
              day={day}
              today={today}
              free={free(day)}
              chosen={day === choice.day}
              onChoose={() => change({ day, pegId: null, party: [] })}
            />
          ))}
          <Button label="Later" kind="quiet" onPress={() => setChoosing(!choosing)} />
        </View>
      </ScrollView>
      {choosing ? (
        <Field
          label="Another day"
          picker="date"
          value={choice.day ?? ''}
          onChange={(day) => {
            if (/^\d{4}-\d\d-\d\d$/.test(day) && day >= today) change({ day, pegId: null, party: [] });
          }}
        />
      ) : null}
    </View>
  );
}

/** The strip begins today, unless the chosen day lies beyond it. */
const stripFrom = ({ day }: Pick<FindChoice, 'day'>, today: string): string =>
  day !== null && day > addDays(today, DAYS - 1) ? addDays(day, -3) : today;

type CellProps = { day: string; today: string; free: number | null; chosen: boolean; onChoose: () => void };

function DayCell({ day, today, free, chosen, onChoose }: CellProps) {
  const styles = useStyles();
  const [weekday = '', date = '', month = ''] = dayName(day).split(' ');
  const count = free === null ? '' : free === 0 ? 'full' : `${String(free)} free`;
  return (
    <Pressable
      role="radio"
      aria-checked={chosen}
      aria-label={[dayName(day), count].filter(Boolean).join(', ')}
      onPress={onChoose}
      style={[styles.day, chosen && styles.chosen]}
    >
      <Text size="small" weight={chosen ? 'semibold' : 'regular'}>
        {day === today ? 'Today' : weekday}
      </Text>
      <Text weight="semibold">{`${date} ${month.slice(0, 3)}`}</Text>
      <Text size="tiny" tone={free === 0 ? 'inkSoft' : 'reed'}>
        {count === '' ? ' ' : count}
      </Text>
    </Pressable>
  );
}
