import { cssType } from '@/constants/css-type';
import { MEASURE_PX, space, target } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

type Props = { label: string; checked: boolean; onChange: (checked: boolean) => void };

/** Yes or no, with its words beside it. */
export function Checkbox({ label, checked, onChange }: Props) {
  const { colours } = useTheme();
  return (
    <label
      style={{
        ...cssType('body'),
        color: colours.ink,
        display: 'flex',
        gap: space.medium,
        alignItems: 'center',
        minHeight: target.plain,
        maxWidth: MEASURE_PX,
        cursor: 'pointer',
      }}
    >
      <input
        type="checkbox"
        checked={checked}
        onChange={(event) => onChange(event.currentTarget.checked)}
        style={{ width: 24, height: 24, margin: 0, flexShrink: 0, accentColor: colours.water }}
      />
      <span>{label}</span>
    </label>
  );
}
