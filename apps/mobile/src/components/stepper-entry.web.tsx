import { cssType } from '@/constants/css-type';
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
    <input
      id={id}
      name={id}
      inputMode="decimal"
      autoComplete="off"
      value={text}
      aria-invalid={invalid || undefined}
      aria-describedby={invalid ? `${id}-error` : undefined}
      onChange={(event) => onChange(event.currentTarget.value)}
      onFocus={(event) => event.currentTarget.select()}
      onBlur={onBlur}
      style={{
        ...cssType('figure', 'semibold'),
        width: `${String(Math.max(2, text.length) + 0.5)}ch`,
        minHeight: 48,
        padding: 0,
        border: 'none',
        borderBottom: `1px solid ${invalid ? colours.brick : colours.edge}`,
        background: 'transparent',
        color: invalid ? colours.brick : colours.ink,
      }}
    />
  );
}
