import { TextInput } from 'react-native';
import type { FieldEntryProps } from '@/components/field-entry-props';
import { radius, space, target } from '@/constants/layout';
import { typeOf } from '@/constants/type';
import { useTheme } from '@/hooks/use-theme';

/** The box one types in. Screens use `Field`, which labels it. */
export function FieldEntry({ id, value, onChange, invalid, lines = 1, ...rest }: FieldEntryProps) {
  const { colours } = useTheme();
  return (
    <TextInput
      aria-labelledby={`${id}-label`}
      value={value}
      onChangeText={onChange}
      onBlur={() => rest.onBlur?.()}
      inputMode={rest.keypad ?? 'text'}
      secureTextEntry={rest.secret ?? false}
      autoCapitalize={rest.keypad === 'email' || rest.secret ? 'none' : 'sentences'}
      readOnly={rest.readOnly ?? false}
      multiline={lines > 1}
      placeholder={rest.placeholder}
      placeholderTextColor={colours.inkSoft}
      style={[
        typeOf('body'),
        {
          minHeight: (rest.bank ? target.bank : target.plain) + (lines - 1) * 24,
          paddingHorizontal: space.medium,
          borderWidth: invalid ? 2 : 1,
          borderColor: invalid ? colours.brick : colours.edge,
          borderRadius: radius.control,
          color: colours.ink,
          backgroundColor: colours.sheet,
        },
      ]}
    />
  );
}
