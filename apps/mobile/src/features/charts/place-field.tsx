import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { useController, useFormContext } from 'react-hook-form';
import { Field } from '@/components/field';
import { space } from '@/constants/layout';
import { PlaceCanvas } from '@/features/charts/place-canvas';
import { positionText, readPosition } from '@/lib/position-text';

type Props = {
  lake: LakeView;
  /** What is placed: "M3". */
  label: string;
  exceptMarkId?: string | undefined;
};

/** Where something is: tapped on the lake or typed, one and the same value. */
export function PlaceField({ lake, label, exceptMarkId }: Props) {
  const { control } = useFormContext<{ details: { position: string } }>();
  const { field, fieldState } = useController({ control, name: 'details.position' });
  return (
    <View style={{ gap: space.small }}>
      <PlaceCanvas
        lake={lake}
        label={label}
        place={readPosition(field.value)}
        onPlace={(place) => field.onChange(positionText(place))}
        exceptMarkId={exceptMarkId}
      />
      <Field
        label="Latitude, longitude"
        hint="Tap the place on the lake, drag it, or type it in degrees (WGS 84)."
        value={field.value}
        onChange={field.onChange}
        onBlur={field.onBlur}
        error={fieldState.error?.message}
      />
    </View>
  );
}
