import type { CSSProperties } from 'react';
import type { FieldEntryProps } from '@/components/field-entry-props';
import { radius, space, target } from '@/constants/layout';
import { cssType } from '@/constants/css-type';
import type { Colours } from '@/constants/colours';
import { useTheme } from '@/hooks/use-theme';

const look = (c: Colours, { invalid, bank, readOnly }: FieldEntryProps): CSSProperties => ({
  ...cssType('body'),
  boxSizing: 'border-box',
  width: '100%',
  minHeight: bank ? target.bank : target.plain,
  padding: `${String(space.small)}px ${String(space.medium)}px`,
  border: `${invalid ? '2px' : '1px'} solid ${invalid ? c.brick : c.edge}`,
  borderRadius: radius.control,
  color: c.ink,
  backgroundColor: readOnly ? c.paper : c.sheet,
});

const typeAttribute = ({ picker, secret, keypad }: FieldEntryProps): string =>
  picker ??
  (secret ? 'password' : keypad === 'email' || keypad === 'tel' || keypad === 'search' ? keypad : 'text');

/** The box one types in. Screens use `Field`, which labels it. */
export function FieldEntry(props: FieldEntryProps) {
  const { colours } = useTheme();
  const shared = {
    id: props.id,
    name: props.id,
    value: props.value,
    onBlur: props.onBlur,
    placeholder: props.placeholder,
    readOnly: props.readOnly,
    autoComplete: props.autoComplete ?? 'off',
    'aria-invalid': props.invalid || undefined,
    'aria-describedby': props.describedBy,
    style: look(colours, props),
  };
  if ((props.lines ?? 1) > 1)
    return (
      <textarea
        {...shared}
        rows={props.lines}
        onChange={(event) => props.onChange(event.currentTarget.value)}
      />
    );
  return (
    <input
      {...shared}
      type={typeAttribute(props)}
      inputMode={props.keypad ?? 'text'}
      autoCapitalize={props.keypad === 'email' || props.secret ? 'none' : undefined}
      onChange={(event) => props.onChange(event.currentTarget.value)}
    />
  );
}
