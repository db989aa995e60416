export type Choice<K extends string> = {
  key: K;
  label: string;
  /** A second, smaller line under the label. */
  note?: string | undefined;
};

export type ChoiceFrame = {
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  /** Most columns on a phone; words decide when they are long. */
  columns?: 1 | 2 | 3 | 4 | undefined;
  /** 56 px and more, for wet hands. On unless `false`. */
  bank?: boolean | undefined;
};

export type ChoiceGridProps<K extends string> = ChoiceFrame & {
  choices: readonly Choice<K>[];
  value: K | null;
  onChange: (key: K) => void;
};

export type ManyChoiceGridProps<K extends string> = ChoiceFrame & {
  choices: readonly Choice<K>[];
  values: readonly K[];
  onChange: (keys: K[]) => void;
};

/** The chosen keys with one turned over, in the order the choices stand. */
export function turnedOver<K extends string>(
  choices: readonly Choice<K>[],
  values: readonly K[],
  key: K,
): K[] {
  const after = new Set(values);
  if (!after.delete(key)) after.add(key);
  return choices.map((choice) => choice.key).filter((k) => after.has(k));
}
