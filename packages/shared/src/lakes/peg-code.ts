/** What a peg's short code is written in: none is read as another (no 0 O, 1 I L, 2 Z, 5 S, 8 B, U V), no vowels. */
export const PEG_CODE_LETTERS = '34679CDFGHJKMNPQRTVWXY';
export const PEG_CODE_LENGTH = 6;

const CODE = new RegExp(`^[${PEG_CODE_LETTERS}]{${PEG_CODE_LENGTH}}$`);

/** A code as somebody typed it off a card, in any letters, with spaces or dashes; null when it can't be one. */
export function readPegCode(typed: string): string | null {
  const code = typed.toUpperCase().replace(/[\s-]+/g, '');
  return CODE.test(code) ? code : null;
}
