import { drawSheet } from '@mereward/shared/charts/drawing/chart-sheet';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { SHEET_PX, sheetOfChart } from '@mereward/shared/charts/drawing/sheet-of-chart';
import { PLAIN_SVG, toSvg } from '@mereward/shared/charts/drawing/to-svg';
import { dayAndTime } from '@/lib/format-time';
import type { ChartFileTerms } from './chart-file-terms';

export { SHEET_PX } from '@mereward/shared/charts/drawing/sheet-of-chart';

/** The chart as a sheet of its own, in the layers, level and units the reader chose. `style` brings the face along. */
export function sheetSvg({ chart, units, shown, blackAndWhite }: ChartFileTerms, style: string): string {
  const levelRead = chart.levelNow ? dayAndTime(chart.levelNow.at, chart.zone) : '';
  const sheet = sheetOfChart(chart, { units, shown, today: shown.today, levelRead });
  const page = drawSheet(sheet, SHEET_PX, palettes[blackAndWhite ? 'print' : 'light']);
  return toSvg(page, { ...PLAIN_SVG, title: `Chart of ${chart.lakeName}`, style });
}
