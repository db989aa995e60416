/**
 * A chart as a display list. Places are in a plane the view maps to the page (lake-plane metres east and north for a
 * map, px right and down for what stands round it); widths, sizes and offsets are px of the page, so they don't grow
 * with the map. One list makes the screen, the SVG, the PNG and the PDF.
 */

/** x, y, x, y … */
export type Line = ArrayLike<number>;

export type Stroke = { colour: string; widthPx: number; dashPx: readonly number[] | null };

/** Lines stroked, or areas filled by the even-odd rule. `curved` rounds the corners (never an outline's own). */
export type PathMark = {
  kind: 'path';
  lines: readonly Line[];
  closed: boolean;
  curved: boolean;
  fill: string | null;
  stroke: Stroke | null;
};

/** One small drawing repeated at many places: `glyph` is SVG path text in relative px, beginning with `m`. */
export type GlyphsMark = {
  kind: 'glyphs';
  at: Line;
  glyph: string;
  fill: string | null;
  stroke: Stroke | null;
};

export type Anchor = 'start' | 'middle' | 'end';

export type TextMark = {
  kind: 'text';
  words: string;
  x: number;
  y: number;
  dxPx: number;
  dyPx: number; // down; the words' middle height stands at y + dy
  sizePx: number;
  bold: boolean;
  slanted: boolean;
  anchor: Anchor;
  turnDeg: number; // clockwise on the page
  colour: string;
  halo: string | null;
};

/** Marks cut off at the edge of an area (even-odd). */
export type ClipMark = { kind: 'clip'; lines: readonly Line[]; marks: readonly Mark[] };

export type Mark = PathMark | GlyphsMark | TextMark | ClipMark;

export function filled(lines: readonly Line[], fill: string, curved = false): PathMark {
  return { kind: 'path', lines, closed: true, curved, fill, stroke: null };
}

export function ruled(colour: string, widthPx: number, dashPx: readonly number[] | null = null): Stroke {
  return { colour, widthPx, dashPx };
}

export function stroked(lines: readonly Line[], stroke: Stroke): PathMark {
  return { kind: 'path', lines, closed: false, curved: false, fill: null, stroke };
}

const PLAIN_TEXT: Omit<TextMark, 'words' | 'x' | 'y' | 'colour'> = {
  kind: 'text',
  dxPx: 0,
  dyPx: 0,
  sizePx: 13,
  bold: false,
  slanted: false,
  anchor: 'middle',
  turnDeg: 0,
  halo: null,
};

export function text(mark: Pick<TextMark, 'words' | 'x' | 'y' | 'colour'> & Partial<TextMark>): TextMark {
  return { ...PLAIN_TEXT, ...mark };
}
