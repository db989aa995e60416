import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { space } from '@/constants/layout';
import { AreaCanvas, type DrawnShape } from '@/features/charts/area-canvas';
import { positionText } from '@/lib/position-text';
import { cornersOf } from '@/features/charts/event-draft';

type Props = {
  lake: LakeView;
  shape?: DrawnShape | undefined; // an area unless said
  exceptPlaceId?: string | undefined;
  /** One corner a line, latitude first. */
  value: string;
  onChange: (value: string) => void;
  error?: string | undefined;
};

const WORDS: Readonly<Record<DrawnShape, { label: string; hint: string; undo: string }>> = {
  area: {
    label: 'Corners',
    hint: 'Tap them on the lake in order, drag one to move it, or type them: latitude, longitude, one corner a line.',
    undo: 'Take the last corner away',
  },
  line: {
    label: 'Posts',
    hint: 'Tap them in order, drag one to move it, or type them: latitude, longitude, one post a line.',
    undo: 'Take the last post away',
  },
  point: {
    label: 'Latitude, longitude',
    hint: 'Tap the place on the lake, drag it, or type it in degrees (WGS 84).',
    undo: 'Take it off the lake',
  },
};

/** An area of the lake, a line or a place: drawn corner by corner or typed, one and the same value. */
export function AreaField({ lake, shape = 'area', exceptPlaceId, value, onChange, error }: Props) {
  const words = WORDS[shape];
  const corners = cornersOf(value);
  const write = (places: readonly [number, number][]): void => onChange(places.map(positionText).join('\n'));
  return (
    <View style={{ gap: space.small }}>
      <AreaCanvas
        lake={lake}
        shape={shape}
        exceptPlaceId={exceptPlaceId}
        corners={corners}
        onCorners={write}
      />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label={words.undo}
          disabled={corners.length === 0}
          onPress={() => write(corners.slice(0, -1))}
        />
      </View>
      <Field
        label={words.label}
        hint={words.hint}
        value={value}
        onChange={onChange}
        lines={shape === 'point' ? 1 : 4}
        error={error}
      />
    </View>
  );
}
