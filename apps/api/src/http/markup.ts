/** Text that is HTML already and goes into a page as it is. */
export class Markup {
  constructor(readonly text: string) {}
}

type Piece = Markup | string | number | null | false | readonly Piece[];

export const escapeHtml = (text: string): string =>
  text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');

function written(piece: Piece): string {
  if (piece instanceof Markup) return piece.text;
  if (piece === null || piece === false) return '';
  if (typeof piece === 'string') return escapeHtml(piece);
  return typeof piece === 'number' ? String(piece) : piece.map(written).join('');
}

/** HTML with whatever is put into it made harmless; null and false are nothing, lists are set one after the other. */
export const markup = (texts: TemplateStringsArray, ...pieces: readonly Piece[]): Markup =>
  new Markup(texts.reduce((page, text, i) => page + written(pieces[i - 1] ?? null) + text));
