export type StepTerms = { min: number; max: number; step?: number | undefined };

/** The next figure up or down, within bounds and free of floating dust; from nothing it starts at the least. */
export function stepped(value: number | null, direction: 1 | -1, { min, max, step = 1 }: StepTerms): number {
  if (value === null) return min;
  const next = Math.round((value + direction * step) * 1e6) / 1e6;
  return Math.min(max, Math.max(min, next));
}

/** A number as people type one, decimal comma allowed; null when it is not a number. */
export function typedNumber(text: string): number | null {
  const plain = text.trim().replace(',', '.').replace('−', '-');
  return /^-?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}
