import type { BottomArea } from './bottom-areas';
import { bottomLabels, bottomMarks } from './bottom-marks';
import {
  castMarks,
  soundingMarks,
  spotMarks,
  type DrawnCast,
  type DrawnSounding,
  type DrawnSpot,
} from './cast-marks';
import { changedMarks, dryMarks, isobathMarks, tintMarks, unsurveyedMarks } from './depth-marks';
import type { Ground } from './ground';
import { isobathLabels, type Taken } from './isobath-labels';
import { filled, text, type Line, type Mark } from './mark';
import type { Palette } from './palette';
import { pegMarks, shoreMarks, type DrawnPeg } from './shore-marks';
import type { View } from './view';

/** All that a map of one lake can carry. Empty lists are simply not drawn. */
export type MapParts = {
  ground: Ground;
  bottom: readonly BottomArea[];
  soundings: readonly DrawnSounding[];
  pegs: readonly DrawnPeg[];
  spots: readonly DrawnSpot[];
  cast: DrawnCast | null;
  changed?: readonly Line[] | undefined; // rings of water that changed since it was surveyed
};

export type MapChoice = {
  palette: Palette;
  view: View;
  depthWords: (depthM: number) => string; // figures on isobaths and soundings, in the reader's unit
  selectedPegId: string | null;
  selectedSpotId: string | null;
};

/** The map, back to front, in lake-plane metres. Words take their places in the order they matter. */
export function drawMap(parts: MapParts, choice: MapChoice): Mark[] {
  const { ground, bottom } = parts;
  const { palette, view, depthWords } = choice;
  const taken: Taken = [];
  const pegs = pegMarks(parts.pegs, { palette, view, selectedId: choice.selectedPegId, taken });
  const letters = bottomLabels(bottom, { ground, palette, view, taken });
  const figures = isobathLabels(ground, palette, { view, words: depthWords, taken });
  const soundings = parts.soundings.length
    ? soundingMarks(parts.soundings, { palette, view, words: depthWords })
    : [];
  const water: Mark[] = [
    ...tintMarks(ground, palette, view),
    ...bottomMarks(bottom, { ground, palette, view }),
    ...isobathMarks(ground, palette, view),
    ...unsurveyedMarks(ground, palette, view),
    ...dryMarks(ground, palette, view),
    ...changedMarks(parts.changed ?? [], ground, { palette, view }),
    ...soundings,
    ...figures,
    ...letters,
  ];
  return [
    filled(ground.water, palette.paper),
    { kind: 'clip', lines: ground.water, marks: water },
    ...shoreMarks(ground, palette),
    ...spotMarks(parts.spots, palette, choice.selectedSpotId),
    ...(parts.cast ? castMarks(parts.cast, palette, view) : []),
    ...pegs,
  ];
}

/** Far-bank marks that stand in view, as a triangle with the code. */
export function farMarks(
  marks: readonly { code: string; xM: number; yM: number }[],
  palette: Palette,
): Mark[] {
  return marks.flatMap(({ code, xM, yM }): Mark[] => [
    {
      kind: 'glyphs',
      at: [xM, yM],
      glyph: 'm0 -5.5l5 9h-10z',
      fill: palette.paper,
      stroke: { colour: palette.ink, widthPx: 1.5, dashPx: null },
    },
    text({ words: code, x: xM, y: yM, dyPx: 12, sizePx: 12, colour: palette.ink, halo: palette.paper }),
  ]);
}
