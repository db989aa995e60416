import { useEffect } from 'react';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { countdown } from '@/features/bookings/booking-words';
import { useClock } from '@/features/bookings/use-clock';
import { space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { clockTime } from '@/lib/format-time';

const useStyles = themed((c) => ({
  box: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    alignItems: 'baseline',
    columnGap: space.medium,
    padding: space.medium,
    borderLeftWidth: 4,
    borderLeftColor: c.amber,
    backgroundColor: c.amberTint,
  },
}));

/** Said aloud at these minutes before the end; every second would drown all else. */
const SPOKEN_MIN = [5, 2, 1] as const;

type Props = { until: string; zone: string; onOver: () => void };

/** How long the hold still runs, by the second. */
export function HoldClock({ until, zone, onOver }: Props) {
  const styles = useStyles();
  const nowMs = useClock(1000);
  const untilMs = Date.parse(until);
  const over = nowMs >= untilMs;
  useEffect(() => {
    if (over) onOver();
  }, [over, onOver]);
  const leftMin = Math.ceil((untilMs - nowMs) / 60_000);
  const spoken = SPOKEN_MIN.find((minutes) => minutes === leftMin);
  return (
    <View style={styles.box}>
      <Text role="timer" size="title" weight="semibold">
        {countdown(untilMs, nowMs)}
      </Text>
      <Text>{`held for you until ${clockTime(until, zone)}`}</Text>
      <View role="status" style={{ position: 'absolute', width: 1, height: 1, overflow: 'hidden' }}>
        {spoken === undefined ? null : (
          <Text>{`${String(spoken)} ${spoken === 1 ? 'minute' : 'minutes'} left`}</Text>
        )}
      </View>
    </View>
  );
}
