import { drawSheet } from '@mereward/shared/charts/drawing/chart-sheet';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { SHEET_PX, sheetOfChart } from '@mereward/shared/charts/drawing/sheet-of-chart';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import type { SvgAsked } from '@mereward/shared/charts/paper-contract';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { Ctx } from '../../ctx';
import { chartView } from '../chart-view';
import { fileName } from '../file-name';

/** A chart as one drawing: the same marks as the screen's, for whoever asks without one. */
export async function chartSvg(
  ctx: Ctx,
  chartId: string,
  asked: SvgAsked,
): Promise<{ filename: string; svg: string }> {
  const chart = await chartView(ctx, chartId);
  const sheet = sheetOfChart(chart, {
    units: { length: asked.in, stickSpacingM: asked.sticks },
    shown: { depth: true, bottom: true, soundings: asked.soundings === 'yes' },
    today: asked.today === 'yes',
    levelRead: chart.levelNow ? dayAndClock(chart.levelNow.at, chart.zone) : '',
  });
  return {
    filename: `${fileName(chart.lakeName, 'chart', chart.version ?? 'draft')}.svg`,
    svg: toSvg(drawSheet(sheet, SHEET_PX, palettes[asked.look]), {
      ...PLAIN_SVG,
      title: `Chart of ${chart.lakeName}`,
    }),
  };
}
