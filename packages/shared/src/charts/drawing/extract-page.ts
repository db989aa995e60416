import type { Units } from '../../accounts/contract';
import type { PegPageView, SpotView } from '../contract';
import { isobathFigure } from '../depth-words';
import { stickWords } from '../spot-words';
import { castMarks, spotMarks } from './cast-marks';
import { drawMap, type MapParts } from './draw-map';
import { outlookView, type Extract } from './extract-parts';
import { northMarks, scaleBarMarks } from './furniture';
import { ruled, text, type Mark } from './mark';
import type { Page } from './page';
import type { Palette } from './palette';
import { spotCast } from './spot-cast';

/** The water before a peg, as a screen or a page of words shows it. */
export type ExtractTerms = {
  page: Pick<PegPageView, 'id' | 'number'>;
  extract: Extract;
  parts: MapParts; // `extractParts` of the same extract
  spots: readonly SpotView[];
  /** The one spot shown with its cast; `numbered` gives each its number in the list instead. */
  chosen: SpotView | 'numbered' | null;
  units: Units;
  widthPx: number;
  heightPx: number;
};

const LEAST_REACH_M = 45;
const PAST_SPOT_M = 14;
const BEHIND_PX = 74; // for the peg's number and the scale

/** How far a picture looks out from a peg so that every spot lies well within it, metres. */
export function extractReachM({ originM }: Extract, spots: readonly SpotView[]): number {
  const farthestM = Math.max(0, ...spots.map(({ xM, yM }) => Math.hypot(xM - originM.xM, yM - originM.yM)));
  return Math.max(LEAST_REACH_M, farthestM + PAST_SPOT_M);
}

/** The peg stands at the foot and its casts go up the page; scale in metres and wraps, and north, on it. */
export function drawExtract(terms: ExtractTerms, palette: Palette): Page {
  const { page, extract, parts, spots, chosen, units, widthPx, heightPx } = terms;
  const outlook = { towards: 'up', reachM: extractReachM(extract, spots), behindPx: BEHIND_PX } as const;
  const view = outlookView(extract, outlook, { widthPx, heightPx });
  const marks = drawMap(
    { ...parts, spots: chosen === 'numbered' ? [] : [...spots] },
    {
      palette,
      view,
      depthWords: (depthM) => isobathFigure(depthM, extract.contourStepM, units.length),
      selectedPegId: page.id,
      selectedSpotId: null,
    },
  );
  const shown = chosen === 'numbered' ? spots.flatMap((spot, i) => numberedSpot(spot, i + 1, palette)) : [];
  const cast =
    chosen && chosen !== 'numbered'
      ? [
          ...castMarks(spotCast(extract.originM, chosen, units.stickSpacingM), palette, view),
          ...spotMarks([chosen], palette, chosen.id),
        ]
      : [];
  const bar = {
    x: 14,
    y: heightPx - 20,
    mostPx: view.widthPx * 0.28,
    stickSpacingM: units.stickSpacingM,
    sticks: stickWords(units.stickSpacingM),
  };
  const round = [
    ...scaleBarMarks(view, bar, palette),
    ...northMarks(view, { x: view.widthPx - 42, y: 42 }, palette),
  ];
  const layers = [{ view, atPx: { x: 0, y: 0 }, marks: [...marks, ...shown, ...cast] }, { marks: round }];
  return { widthPx: view.widthPx, heightPx, ground: palette.paper, layers };
}

/** A spot's own number in the list beside the map, in a ring. */
export function numberedSpot(
  { xM, yM }: Pick<SpotView, 'xM' | 'yM'>,
  number: number,
  palette: Pick<Palette, 'paper' | 'ink'>,
): Mark[] {
  return [
    {
      kind: 'glyphs',
      at: [xM, yM],
      glyph: 'm-9 0a9 9 0 1 0 18 0a9 9 0 1 0 -18 0z',
      fill: palette.paper,
      stroke: ruled(palette.ink, 1.8),
    },
    text({ words: String(number), x: xM, y: yM, bold: true, colour: palette.ink }),
  ];
}
