import { ChoiceGrid } from '@/components/choice-grid';
import type { SelectProps } from '@/components/select-props';

/** One of many. Use `ChoiceGrid` for up to about six. */
export function Select<K extends string>({ unset: _unset, ...rest }: SelectProps<K>) {
  return <ChoiceGrid {...rest} columns={1} />;
}
