import { api } from '@/lib/api';
import { saveText } from '@/lib/save-file';
import { sheetSvg } from './chart-sheet';
import { chartFileName, type ChartFileTerms } from './chart-file-terms';

export type { ChartFileKind } from './chart-file-terms';

/** Hands the chart's file to whatever the phone offers for it. Pictures are drawn by the phone from the drawing. */
export async function chartFile(terms: ChartFileTerms): Promise<void> {
  const { chart, kind } = terms;
  if (kind === 'geojson') {
    const layers = await api.file(`/charts/${chart.id}/geojson`);
    return saveText(chartFileName(terms), await layers.text(), 'application/geo+json');
  }
  return saveText(chartFileName({ ...terms, kind: 'svg' }), sheetSvg(terms, ''), 'image/svg+xml');
}
