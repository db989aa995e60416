import type { Choice } from '@/components/choice-props';

export type SelectProps<K extends string> = {
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  choices: readonly Choice<K>[];
  value: K | null;
  onChange: (key: K) => void;
  /** What the empty choice says, such as "Choose a lake". */
  unset?: string | undefined;
  bank?: boolean | undefined;
};
