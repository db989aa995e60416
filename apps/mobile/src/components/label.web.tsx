import { cssType } from '@/constants/css-type';
import { useTheme } from '@/hooks/use-theme';

type Props = { id: string; words: string; optional?: boolean | undefined };

/** The words above a control. `id` is the control's. */
export function Label({ id, words, optional = false }: Props) {
  const { colours } = useTheme();
  return (
    <label id={`${id}-label`} htmlFor={id} style={{ ...cssType('small', 'semibold'), color: colours.ink }}>
      {words}
      {optional ? <span style={{ ...cssType('small'), color: colours.inkSoft }}> (if you like)</span> : null}
    </label>
  );
}
