import { create } from 'qrcode';

/**
 * The most one code may hold, letters: version 30 at the lowest correction (ISO/IEC 18004, table of capacities, byte
 * mode). A larger one has modules too small to be read off a phone.
 */
export const CODE_HOLDS = 1732;

/** Modules of bare paper a reader needs round a code. */
const QUIET = 4;

/** A QR code as an SVG text, black on white in every theme; null when the words don't fit one that a phone can read. */
export function qrDrawing(words: string, sidePx: number): string | null {
  if (words.length > CODE_HOLDS) return null;
  const { size, data } = create(words, { errorCorrectionLevel: 'L' }).modules;
  const side = String(size + 2 * QUIET);
  const dark = Array.from(data, (on, i) =>
    on ? `M${String((i % size) + QUIET)} ${String(Math.floor(i / size) + QUIET)}h1v1h-1z` : '',
  ).join('');
  const px = String(sidePx);
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${px}" height="${px}" viewBox="0 0 ${side} ${side}" shape-rendering="crispEdges"><rect width="${side}" height="${side}" fill="#fff"/><path d="${dark}" fill="#000"/></svg>`;
}
