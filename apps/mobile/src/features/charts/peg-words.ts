export { pegTitle } from '@mereward/shared/lakes/peg-facts';

/** How a peg's state looks: shape, tone and word together. */
export const PEG_STATUS = {
  open: { shape: 'triangle', tone: 'reed', word: 'open' },
  limited: { shape: 'diamond', tone: 'amber', word: 'limited' },
  closed: { shape: 'cross', tone: 'brick', word: 'closed' },
} as const;

/** Small words at the head of a figure. */
export const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** The letters that every number of a lake's pegs begins with, such as "FO": a map is read more easily without. */
export function sharedLetters(numbers: readonly string[]): string {
  const [first = '', ...others] = numbers.map((number) => /^\D*/.exec(number)?.[0] ?? '');
  const shared = numbers.length > 1 && others.every((letters) => letters === first) ? first : '';
  return numbers.every((number) => number.length > shared.length) ? shared : '';
}
