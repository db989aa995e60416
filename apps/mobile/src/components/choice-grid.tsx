import { ChoiceCells } from '@/components/choice-cells';
import { turnedOver, type ChoiceGridProps, type ManyChoiceGridProps } from '@/components/choice-props';

/** One of a few, as big buttons side by side (radio buttons to a screen reader; arrow keys move between them). */
export function ChoiceGrid<K extends string>({ value, onChange, choices, ...frame }: ChoiceGridProps<K>) {
  return (
    <ChoiceCells
      {...frame}
      kind="radio"
      cells={choices.map((choice) => ({
        ...choice,
        chosen: choice.key === value,
        choose: () => onChange(choice.key),
      }))}
    />
  );
}

/** Any of a few, as big buttons side by side (checkboxes to a screen reader). */
export function ManyChoiceGrid<K extends string>({
  values,
  onChange,
  choices,
  ...frame
}: ManyChoiceGridProps<K>) {
  return (
    <ChoiceCells
      {...frame}
      kind="checkbox"
      cells={choices.map((choice) => ({
        ...choice,
        chosen: values.includes(choice.key),
        choose: () => onChange(turnedOver(choices, values, choice.key)),
      }))}
    />
  );
}
