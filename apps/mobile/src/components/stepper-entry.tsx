import { TextInput } from 'react-native';
import { typeOf } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

type Props = {
  id: string;
  text: string;
  onChange: (text: string) => void;
  onBlur: () => void;
  invalid: boolean;
};

/** The big figure of a `Stepper`, which can be typed over. */
export function StepperEntry({ id, text, onChange, onBlur, invalid }: Props) {
  const { colours } = useTheme();
  return (
    <TextInput
      aria-labelledby={`${id}-label`}
      inputMode="decimal"
      value={text}
      onChangeText={onChange}
      onBlur={onBlur}
      selectTextOnFocus
      style={[typeOf('figure', 'semibold'), { color: invalid ? colours.brick : colours.ink, minWidth: 56 }]}
    />
  );
}
