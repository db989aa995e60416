import type { Units } from '../../accounts/contract';
import { dayRange } from '../../time/day-names';
import { length } from '../../units/length-words';
import { chartCaution } from '../cautions';
import type { ChartView } from '../contract';
import { isobathFigure, stepFor } from '../depth-words';
import { stickWords } from '../spot-words';
import { chartParts, type PartsWish } from './chart-parts';
import type { SheetInput } from './chart-sheet';

export type SheetWish = {
  units: Units;
  shown: PartsWish['shown'];
  /** Draws the water as it stands now, when that is known; `levelRead` is the reading's day and time in words. */
  today: boolean;
  levelRead: string;
};

/** Landscape, in the proportion of A paper. */
export const SHEET_PX = { widthPx: 1600, heightPx: 1131 } as const;

/** A chart as its sheet draws it, in the layers, level and units a reader chose. */
export function sheetOfChart(chart: ChartView, { units, shown, today, levelRead }: SheetWish): SheetInput {
  const { levelNow } = chart;
  const raisedM = today && levelNow ? levelNow.levelM - chart.datumM : 0;
  const stepM = stepFor(chart.contourStepM, units.length);
  const at =
    raisedM !== 0 && levelNow
      ? `the water of ${levelRead}, ${length(levelNow.boardReadsM, units, 2)} on ${levelNow.boardCode}`
      : `datum ${length(chart.datumM, units, 2)}`;
  return {
    parts: chartParts(chart, { raisedM, stepM, shown }),
    marks: chart.marks,
    places: chart.places,
    words: {
      lake: chart.lakeName,
      fishery: chart.fisheryName,
      version: chart.version === null ? 'Draft, not published' : `Chart ${chart.version}`,
      surveyed: `Surveyed ${dayRange(chart.surveyedFrom, chart.surveyedTo)}`,
      level: `Depths in ${units.length === 'm' ? 'metres' : 'feet'} below ${at}`,
      unit: units.length,
      cautions: ['Not for navigation or swimming.', chartCaution(chart)],
    },
    depthWords: (depthM) => isobathFigure(depthM, stepM, units.length),
    stickSpacingM: units.stickSpacingM,
    sticks: stickWords(units.stickSpacingM),
  };
}
