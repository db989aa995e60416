import { useId } from 'react';
import { describedBy, FieldFrame } from '@/components/field-frame';
import type { SelectProps } from '@/components/select-props';
import { cssType } from '@/constants/css-type';
import { radius, space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

/** One of many, in the browser's own list. Use `ChoiceGrid` for up to about six. */
export function Select<K extends string>({ label, hint, error, choices, value, ...rest }: SelectProps<K>) {
  const id = useId();
  const { colours } = useTheme();
  const choose = (key: string): void => {
    const chosen = choices.find((choice) => choice.key === key);
    if (chosen) rest.onChange(chosen.key);
  };
  return (
    <FieldFrame id={id} label={label} hint={hint} error={error}>
      <select
        id={id}
        value={value ?? ''}
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy({ id, hint, error })}
        onChange={(event) => choose(event.currentTarget.value)}
        style={{
          ...cssType('body'),
          width: '100%',
          minHeight: rest.bank ? target.bank : target.plain,
          padding: `0 ${String(space.medium)}px`,
          color: colours.ink,
          backgroundColor: colours.sheet,
          border: `${error ? '2px' : '1px'} solid ${error ? colours.brick : colours.edge}`,
          borderRadius: radius.control,
        }}
      >
        {value === null ? <option value="">{rest.unset ?? 'Choose one'}</option> : null}
        {choices.map((choice) => (
          <option key={choice.key} value={choice.key}>
            {choice.note ? `${choice.label} · ${choice.note}` : choice.label}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}
