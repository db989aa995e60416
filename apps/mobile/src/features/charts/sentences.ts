/** Parts told one after another, each a sentence with its full stop, none said twice. */
export const sentences = (parts: readonly string[]): string =>
  [...new Set(parts.map((part) => part.trim()).filter(Boolean))]
    .map((part) => (/[.!?]$/.test(part) ? part : `${part}.`))
    .join(' ');

/** Whose water it is, unless a warning says so already. */
export const waterUnlessWarned = (words: string, warnings: readonly string[]): string[] =>
  warnings.some((warning) => warning.startsWith(words)) ? [] : [words];
