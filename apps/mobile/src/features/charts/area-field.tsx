import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { space } from '@/constants/layout';
import { AreaCanvas } from '@/features/charts/area-canvas';
import { positionText } from '@/lib/position-text';
import { cornersOf } from '@/features/charts/event-draft';

type Props = {
  lake: LakeView;
  /** One corner a line, latitude first. */
  value: string;
  onChange: (value: string) => void;
  error?: string | undefined;
};

/** An area of the lake: drawn corner by corner or typed, one and the same value. */
export function AreaField({ lake, value, onChange, error }: Props) {
  const corners = cornersOf(value);
  const write = (places: readonly [number, number][]): void => onChange(places.map(positionText).join('\n'));
  return (
    <View style={{ gap: space.small }}>
      <AreaCanvas lake={lake} corners={corners} onCorners={write} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="Take the last corner away"
          disabled={corners.length === 0}
          onPress={() => write(corners.slice(0, -1))}
        />
      </View>
      <Field
        label="Corners"
        hint="Tap them on the lake in order, drag one to move it, or type them: latitude, longitude, one corner a line."
        value={value}
        onChange={onChange}
        lines={4}
        error={error}
      />
    </View>
  );
}
