import { drawChartSheet, type ChartSheet } from './chart-sheet-pdf';
import { drawPages, type PaperDocument } from '../../pdf/paper-pages';

/** What the thread is given to draw; the only thing that gives it anything is draw-paper. */
export type PaperGiven = { kind: 'sheet'; sheet: ChartSheet } | { kind: 'pages'; paper: PaperDocument };

export default async function drawGiven(given: PaperGiven): Promise<Uint8Array> {
  return given.kind === 'sheet' ? drawChartSheet(given.sheet) : drawPages(given.paper);
}
