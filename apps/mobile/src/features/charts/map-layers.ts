import {
  castMarks,
  spotMarks,
  type DrawnCast,
  type DrawnSounding,
  type DrawnSpot,
} from '@mereward/shared/charts/drawing/cast-marks';
import type { BottomArea } from '@mereward/shared/charts/drawing/bottom-areas';
import { drawMap, farMarks } from '@mereward/shared/charts/drawing/draw-map';
import { northMarks, scaleBarMarks } from '@mereward/shared/charts/drawing/furniture';
import type { Ground } from '@mereward/shared/charts/drawing/ground';
import type { Line, Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { placeMarks, type DrawnPlace } from '@mereward/shared/charts/drawing/place-marks';
import { pegMarks, type DrawnPeg } from '@mereward/shared/charts/drawing/shore-marks';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { toPage, type View } from '@mereward/shared/charts/drawing/view';
import { grownView } from '@mereward/shared/charts/drawing/view-moves';
import { distanceBetweenM } from '@mereward/shared/geometry/point';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { isobathFigure } from '@mereward/shared/charts/depth-words';
import { OVERSCAN } from './map-surface-props';

/** What stands on a map, whatever is chosen on it. */
export type MapContent = {
  ground: Ground;
  bottom: readonly BottomArea[];
  soundings: readonly DrawnSounding[];
  pegs: readonly DrawnPeg[];
  marks: readonly { code: string; xM: number; yM: number }[];
  spots: readonly DrawnSpot[];
  places?: readonly DrawnPlace[] | undefined;
  changed?: readonly Line[] | undefined; // rings of water that changed since it was surveyed
};

/** What is chosen on it: drawn over the rest, so that choosing draws little anew. */
export type MapChosen = { pegId: string | null; spotId: string | null; cast: DrawnCast | null };

export type Pen = { view: View; palette: Palette; unit: 'm' | 'ft' };

/** Marks of the lake's plane as they look in a view. */
export function svgOf(view: View, marks: readonly Mark[], idPrefix: string): string {
  const { widthPx, heightPx } = view;
  return toSvg(
    { widthPx, heightPx, ground: null, layers: [{ view, atPx: { x: 0, y: 0 }, marks }] },
    { ...PLAIN_SVG, idPrefix },
  );
}

export function baseLayer(content: MapContent, { view, palette, unit }: Pen): string {
  const grown = grownView(view, OVERSCAN);
  const marks = drawMap(
    { ...content, cast: null },
    {
      palette,
      view: grown,
      depthWords: (depthM) => isobathFigure(depthM, content.ground.stepM, unit),
      selectedPegId: null,
      selectedSpotId: null,
    },
  );
  return svgOf(
    grown,
    [
      ...marks,
      ...placeMarks(content.places ?? [], palette, grown),
      ...farMarks(freeMarks(content, view), palette),
    ],
    'base',
  );
}

const CROWDED_PX = 34;

/** Far-bank marks that stand neither on a peg's number nor under the scale bar. */
function freeMarks({ marks, pegs }: MapContent, view: View): MapContent['marks'] {
  const crowdedM = CROWDED_PX / view.pxPerM;
  const underScale = ({ xM, yM }: { xM: number; yM: number }): boolean => {
    const { x, y } = toPage(view, xM, yM);
    return y > view.heightPx - 2 * CROWDED_PX && x < view.widthPx * 0.7;
  };
  return marks.filter(
    (mark) => !underScale(mark) && pegs.every((peg) => distanceBetweenM(peg, mark) > crowdedM),
  );
}

export function chosenLayer(content: MapContent, chosen: MapChosen, { view, palette }: Pen): string {
  const grown = grownView(view, OVERSCAN);
  const pegs = content.pegs.filter(({ id }) => id === chosen.pegId);
  const spots = content.spots.filter(({ id }) => id === chosen.spotId);
  return svgOf(
    grown,
    [
      ...(chosen.cast ? castMarks(chosen.cast, palette, grown) : []),
      ...spotMarks(spots, palette, chosen.spotId),
      ...pegMarks(pegs, { palette, view: grown, selectedId: chosen.pegId, taken: [] }),
    ],
    'chosen',
  );
}

const SCALE_SHARE = 0.3;

/** Scale bar in metres and wraps, and north: they stand still. */
export function fixedLayer({ view, palette }: Pen, stickSpacingM: number): string {
  const { widthPx, heightPx } = view;
  const bar = {
    x: 14,
    y: heightPx - 24,
    mostPx: Math.min(180, widthPx * SCALE_SHARE),
    stickSpacingM,
    sticks: stickWords(stickSpacingM),
  };
  const marks = [...scaleBarMarks(view, bar, palette), ...northMarks(view, { x: 40, y: 42 }, palette)];
  return toSvg({ widthPx, heightPx, ground: null, layers: [{ marks }] }, { ...PLAIN_SVG, idPrefix: 'fixed' });
}
