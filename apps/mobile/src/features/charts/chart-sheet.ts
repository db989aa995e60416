import { chartCaution } from '@mereward/shared/charts/cautions';
import { drawSheet } from '@mereward/shared/charts/drawing/chart-sheet';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { length } from '@/lib/format';
import { dayAndTime, dayRange } from '@/lib/format-time';
import type { ChartFileTerms } from './chart-file-terms';
import { isobathFigure, stepFor } from '@mereward/shared/charts/depth-words';
import { bottomOf, layersOf } from '@mereward/shared/charts/drawing/chart-part';
import { groundOfChart, raisedNowM } from './readied-chart';

/** Landscape, in the proportion of A paper. */
export const SHEET_PX = { widthPx: 1600, heightPx: 1131 } as const;

/** The chart as a sheet of its own, in the layers, level and units the reader chose. `style` brings the face along. */
export function sheetSvg({ chart, units, shown, blackAndWhite }: ChartFileTerms, style: string): string {
  const layers = layersOf(chart);
  const nowM = raisedNowM(chart);
  const raisedM = shown.today && nowM !== null ? nowM : 0;
  const stepM = stepFor(chart.contourStepM, units.length);
  const ground = groundOfChart(chart, layers, { raisedM, stepM, showDepth: shown.depth });
  const { levelNow, zone } = chart;
  const at =
    raisedM !== 0 && levelNow
      ? `the water of ${dayAndTime(levelNow.at, zone)}, ${length(levelNow.boardReadsM, units, 2)} on ${levelNow.boardCode}`
      : `datum ${length(chart.datumM, units, 2)}`;
  const page = drawSheet(
    {
      parts: {
        ground,
        bottom: shown.bottom ? bottomOf(chart, layers) : [],
        soundings: shown.soundings ? (chart.soundings ?? []) : [],
        pegs: chart.pegs,
        spots: [],
        cast: null,
      },
      marks: chart.marks,
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
    },
    SHEET_PX,
    palettes[blackAndWhite ? 'print' : 'light'],
  );
  return toSvg(page, { ...PLAIN_SVG, title: `Chart of ${chart.lakeName}`, style });
}
