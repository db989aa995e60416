import { View } from 'react-native';
import { Button } from '@/components/button';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  /** What is being done now: "Step 3 of 6: fitting the variogram". */
  label: string;
  /** The true share done, 0 to 1; null while it is not known. Never invented. */
  share: number | null;
  onCancel?: (() => void) | undefined;
};

/** How far along something long is. It can be left, and stopped when `onCancel` is given. */
export function Progress({ label, share, onCancel }: Props) {
  const { colours } = useTheme();
  const percent = share === null ? null : Math.round(Math.min(1, Math.max(0, share)) * 100);
  return (
    <View style={{ gap: space.small, maxWidth: MEASURE_PX }}>
      <View style={{ flexDirection: 'row', gap: space.medium }}>
        <Text role="status" style={{ flex: 1 }}>
          {label}
        </Text>
        {percent === null ? null : <Text weight="semibold">{percent} %</Text>}
      </View>
      <View
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        {...(percent === null ? {} : { 'aria-valuenow': percent })}
        style={{
          height: 10,
          borderRadius: 5,
          borderWidth: 1,
          borderColor: colours.edge,
          backgroundColor: colours.sheet,
        }}
      >
        <View
          style={{
            height: '100%',
            width: `${percent ?? 0}%`,
            borderRadius: 5,
            backgroundColor: colours.water,
          }}
        />
      </View>
      {onCancel ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="Stop" kind="quiet" onPress={onCancel} />
        </View>
      ) : null}
    </View>
  );
}
