import { ActivityIndicator, Pressable, View, type PressableProps } from 'react-native';
import { Text } from '@/components/text';
import { useButtonLook, type ButtonKind } from '@/components/button-look';

type Props = {
  label: string;
  onPress: () => void;
  kind?: ButtonKind | undefined;
  busy?: boolean | undefined;
  /** What is said while busy, such as "Keeping…". */
  busyLabel?: string | undefined;
  disabled?: boolean | undefined;
  /** Fills the room beside its neighbours. */
  grow?: boolean | undefined;
  /** 56 px high, for wet hands. */
  bank?: boolean | undefined;
  /** Said by a screen reader in place of the label, where the label alone is too short. */
  spoken?: string | undefined;
};

/** A button. `main` is the one main act of a screen; `plain` the others; `quiet` is bare words; `danger` undoes or closes. */
export function Button({ label, onPress, kind = 'plain', busy = false, busyLabel, ...rest }: Props) {
  const look = useButtonLook(kind, rest);
  const press: PressableProps['onPress'] = () => {
    if (!busy) onPress();
  };
  return (
    <Pressable
      role="button"
      onPress={press}
      disabled={rest.disabled ?? false}
      aria-busy={busy}
      aria-label={rest.spoken}
      style={({ pressed }) => look.box(pressed)}
    >
      {busy ? (
        <View aria-hidden>
          <ActivityIndicator size="small" color={look.ink} />
        </View>
      ) : null}
      <Text weight="semibold" style={look.words}>
        {busy ? (busyLabel ?? label) : label}
      </Text>
    </Pressable>
  );
}
