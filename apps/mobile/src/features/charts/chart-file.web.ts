import { toBase64 } from '@mereward/shared/charts/chart-encoding';
import { api } from '@/lib/api';
import { saveBlob, saveText } from '@/lib/save-file.web';
import { SHEET_PX, sheetSvg } from './chart-sheet';
import { chartFileName, type ChartFileTerms } from './chart-file-terms';

export type { ChartFileKind } from './chart-file-terms';

const FACE = '/fonts/source-sans-3-latin.woff2';
const PNG_SCALE = 2;

/** The face itself, so that the file looks the same where the face isn't installed. */
async function faceStyle(): Promise<string> {
  const response = await fetch(FACE);
  if (!response.ok) return '';
  const bytes = new Uint8Array(await response.arrayBuffer());
  return `@font-face{font-family:SourceSans;font-weight:200 900;src:url(data:font/woff2;base64,${toBase64(bytes)}) format('woff2')}`;
}

async function pngOf(svg: string): Promise<Blob> {
  const url = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = url;
    await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = SHEET_PX.widthPx * PNG_SCALE;
    canvas.height = SHEET_PX.heightPx * PNG_SCALE;
    canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await new Promise((resolve, reject) => {
      canvas.toBlob(
        (blob) => (blob ? resolve(blob) : reject(new Error('The picture could not be made'))),
        'image/png',
      );
    });
  } finally {
    URL.revokeObjectURL(url);
  }
}

/** Saves the chart as the file asked for. */
export async function chartFile(terms: ChartFileTerms): Promise<void> {
  const { chart, kind } = terms;
  const name = chartFileName(terms);
  switch (kind) {
    case 'geojson':
      return saveBlob(name, await api.file(`/charts/${chart.id}/geojson`));
    case 'svg':
      return saveText(name, sheetSvg(terms, await faceStyle()), 'image/svg+xml');
    case 'png':
      return saveBlob(name, await pngOf(sheetSvg(terms, await faceStyle())));
  }
}
