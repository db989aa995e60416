import type { Cover, Substrate } from '../../surveys/contract';

/** What is drawn as a pattern: every substrate, and every cover but a clear bottom. */
export type Patterned = Substrate | Exclude<Cover, 'clear'>;

/**
 * How a bottom is patterned: one small drawing on a lattice. `gapPx` is its usual spacing, `jitter` how far it may
 * stand from its lattice point as a share of that, `rows` whether every other row is set half a gap along.
 * Ours, and by texture alone, so that it prints in black and is told apart without colour.
 */
export type BottomGlyph = {
  glyph: string; // SVG path text, relative px
  solid: boolean;
  widthPx: number;
  gapPx: number;
  jitter: number;
  rows: boolean;
  abbreviation: string; // INT 1 section J, or the plain word where it has none
  words: string;
};

const ring = (r: number): string => `m${-r} 0a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0z`;

export const BOTTOM_GLYPHS: Readonly<Record<Patterned, BottomGlyph>> = {
  gravel: {
    glyph: `${ring(1.5)}m5.2 3.1a1.1 1.1 0 1 0 2.2 0a1.1 1.1 0 1 0 -2.2 0z`,
    solid: true,
    widthPx: 0,
    gapPx: 11,
    jitter: 0.24,
    rows: true,
    abbreviation: 'G',
    words: 'gravel',
  },
  stones: {
    glyph: 'm-3 1.6l1 -3.4l3.6 -0.7l1.8 2.6l-2 2.4z',
    solid: false,
    widthPx: 1,
    gapPx: 13,
    jitter: 0.3,
    rows: true,
    abbreviation: 'St',
    words: 'stones',
  },
  sand: {
    glyph: 'm0 0h.01m4 -2.6h.01m-1.2 4.6h.01m-5.4 -1.2h.01',
    solid: false,
    widthPx: 1.25,
    gapPx: 9.5,
    jitter: 0.38,
    rows: true,
    abbreviation: 'S',
    words: 'sand',
  },
  silt: {
    glyph: 'm-3 0h6',
    solid: false,
    widthPx: 1.15,
    gapPx: 13,
    jitter: 0.2,
    rows: true,
    abbreviation: 'Si',
    words: 'silt',
  },
  clay: {
    glyph: 'm-6.5 6.5l13 -13',
    solid: false,
    widthPx: 0.8,
    gapPx: 13,
    jitter: 0,
    rows: false,
    abbreviation: 'Cy',
    words: 'clay',
  },
  low_weed: {
    glyph: 'm-2.6 -2.6q.6 3.4 2.6 4.2q2 -.8 2.6 -4.2',
    solid: false,
    widthPx: 1.1,
    gapPx: 16,
    jitter: 0.3,
    rows: true,
    abbreviation: 'Wd',
    words: 'low weed',
  },
  tall_weed: {
    glyph: 'm-3.6 -3.4q.8 5.4 3.6 6.8q2.8 -1.4 3.6 -6.8m-3.6 6.8v-9',
    solid: false,
    widthPx: 1.2,
    gapPx: 16,
    jitter: 0.26,
    rows: true,
    abbreviation: 'Wd',
    words: 'tall weed',
  },
  leaf_litter: {
    glyph: 'm-2.8 1.4q1.6 -3.6 5.6 -2.8q-1.6 3.6 -5.6 2.8z',
    solid: false,
    widthPx: 1,
    gapPx: 15,
    jitter: 0.4,
    rows: true,
    abbreviation: 'leaf',
    words: 'leaf litter',
  },
  snag: {
    glyph: 'm-4 -3l8 6m-8 0l8 -6m-4 -2v10',
    solid: false,
    widthPx: 1.5,
    gapPx: 15,
    jitter: 0.1,
    rows: true,
    abbreviation: 'snag',
    words: 'snag',
  },
};

export const PATTERNED = Object.keys(BOTTOM_GLYPHS).filter((key): key is Patterned => key in BOTTOM_GLYPHS);
