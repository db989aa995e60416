/** How the depth tint runs: lightness from the shore down to the deepest water, and how strong its colour is. */
export type Ramp = { shallowLightness: number; deepLightness: number; chromaShare: number };

/** Every colour a chart is drawn with. */
export type Palette = {
  paper: string;
  ink: string;
  inkSoft: string;
  rule: string; // soft diagonal of water nobody surveyed
  bed: string; // ground under the water in a section
  band: string; // 95 % band of a section
  waterLine: string;
  selected: string; // "you are here"
  onSelected: string;
  danger: string; // closed pegs, snags
  labelDark: string; // dark ink on light water
  labelLight: string; // light ink on dark water
  ramp: Ramp;
};

const light: Palette = {
  paper: '#FAF7F0',
  ink: '#1B2423',
  inkSoft: '#55605D',
  rule: '#CFC7B5',
  bed: '#EDE4D0',
  band: '#D3C6A6',
  waterLine: '#1F5661',
  selected: '#C8451B',
  onSelected: '#FFFFFF',
  danger: '#9B2226',
  labelDark: '#121A19',
  labelLight: '#FDFBF5',
  ramp: { shallowLightness: 0.955, deepLightness: 0.355, chromaShare: 1 },
};

/** The same ramp with its light end lowered, so that a shallow margin doesn't dazzle on a dark bank. */
const dusk: Palette = {
  paper: '#12181A',
  ink: '#EDE8DC',
  inkSoft: '#A9B3AE',
  rule: '#3A474B',
  bed: '#2B302B',
  band: '#454D43',
  waterLine: '#7FB9C2',
  selected: '#FF8A5C',
  onSelected: '#12181A',
  danger: '#FF8C86',
  labelDark: '#0A0F10',
  labelLight: '#F6F2E8',
  ramp: { shallowLightness: 0.68, deepLightness: 0.26, chromaShare: 0.9 },
};

/** For black-and-white printing: greys light enough to carry black ink all the way down. */
const print: Palette = {
  paper: '#FFFFFF',
  ink: '#000000',
  inkSoft: '#3C3C3C',
  rule: '#A8A8A8',
  bed: '#E4E4E4',
  band: '#C4C4C4',
  waterLine: '#000000',
  selected: '#000000',
  onSelected: '#FFFFFF',
  danger: '#000000',
  labelDark: '#000000',
  labelLight: '#FFFFFF',
  ramp: { shallowLightness: 0.985, deepLightness: 0.66, chromaShare: 0 },
};

export type PaletteName = 'light' | 'dusk' | 'print';
export const palettes: Readonly<Record<PaletteName, Palette>> = { light, dusk, print };
