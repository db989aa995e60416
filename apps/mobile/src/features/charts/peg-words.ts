/** "Peg FO7, the Point" */
export const pegTitle = ({ number, name }: { number: string; name: string }): string =>
  name ? `Peg ${number}, ${name}` : `Peg ${number}`;

/** How a peg's state looks: shape, tone and word together. */
export const PEG_STATUS = {
  open: { shape: 'triangle', tone: 'reed', word: 'open' },
  limited: { shape: 'diamond', tone: 'amber', word: 'limited' },
  closed: { shape: 'cross', tone: 'brick', word: 'closed' },
} as const;
