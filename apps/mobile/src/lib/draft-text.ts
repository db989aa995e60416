const PREFIX = 'mereward.draft.';

/** Where one person's draft of one form is kept. */
export const draftKey = (accountId: string | null, form: string): string =>
  `${PREFIX}${accountId ?? 'stranger'}.${form}`;

type Values = Readonly<Record<string, unknown>>;

const sameSort = (one: unknown, other: unknown): boolean =>
  typeof one === typeof other && Array.isArray(one) === Array.isArray(other);

/**
 * What a kept draft says for the fields a form has now. A field that has since changed its sort of value, or is gone,
 * is left out, as is a text that is no draft at all. Null when nothing useful is left.
 */
export function readDraft(text: string | null, start: Values): Values | null {
  if (text === null) return null;
  let parsed: unknown;
  try {
    parsed = JSON.parse(text);
  } catch {
    return null;
  }
  if (typeof parsed !== 'object' || parsed === null) return null;
  const known = Object.entries(parsed).filter(
    ([name, value]) => name in start && (start[name] === null || sameSort(value, start[name])),
  );
  return known.length > 0 ? Object.fromEntries(known) : null;
}

/** The text to keep; null when nothing differs from the start. Fields in `leaveOut`, such as passwords, are never kept. */
export function writeDraft(values: Values, start: Values, leaveOut: readonly string[]): string | null {
  const kept = Object.entries(values).filter(
    ([name, value]) =>
      name in start && !leaveOut.includes(name) && JSON.stringify(value) !== JSON.stringify(start[name]),
  );
  return kept.length > 0 ? JSON.stringify(Object.fromEntries(kept)) : null;
}
