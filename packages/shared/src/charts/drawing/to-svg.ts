import type { Stroke } from './mark';
import { stepsOf, type Page, type Step, type TextStep } from './page';

/** One glyph at every corner of a line that isn't drawn itself: fewer letters than the glyph said each time. */
export type GlyphsStep = {
  do: 'glyphs';
  d: string;
  glyph: string;
  fill: string | null;
  stroke: Stroke | null;
};

export type SvgWords = {
  title: string; // read out for the whole picture
  idPrefix: string; // keeps ids apart when several pictures share a document
  fontFamily: string;
  style: string; // extra CSS, for an @font-face in a file that stands alone
};

export const PLAIN_SVG: SvgWords = {
  title: '',
  idPrefix: 'm',
  fontFamily: "SourceSans, 'Source Sans 3', sans-serif",
  style: '',
};

const ESCAPES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (words: string): string => words.replace(/[&<>"]/g, (sign) => ESCAPES[sign] ?? sign);
const figure = (px: number): string => String(Math.round(px * 100) / 100);

/** The page as one SVG document. */
export const toSvg = (page: Page, words: SvgWords): string => svgOf(stepsOf(page), page, words);

/** Acts of drawing on a page of that size as one SVG document. */
export function svgOf(
  steps: readonly (Step | GlyphsStep)[],
  page: Pick<Page, 'widthPx' | 'heightPx'>,
  words: SvgWords,
): string {
  const size = `width="${figure(page.widthPx)}" height="${figure(page.heightPx)}"`;
  const box = `viewBox="0 0 ${figure(page.widthPx)} ${figure(page.heightPx)}"`;
  const naming = words.title ? `role="img"><title>${escaped(words.title)}</title>` : 'aria-hidden="true">';
  const style = words.style ? `<style>${words.style}</style>` : '';
  const font = `font-family="${escaped(words.fontFamily)}"`;
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" ${size} ${box} ${font} ` +
    `stroke-linecap="round" stroke-linejoin="round" ${naming}${style}${body(steps, words.idPrefix)}</svg>`
  );
}

function body(steps: readonly (Step | GlyphsStep)[], idPrefix: string): string {
  let out = '';
  let clips = 0;
  let glyphs = 0;
  for (const step of steps) {
    switch (step.do) {
      case 'path':
        out += pathElement(step);
        break;
      case 'text':
        out += textElement(step);
        break;
      case 'clip': {
        const id = `${idPrefix}-clip-${++clips}`;
        const rule = step.evenOdd ? ' clip-rule="evenodd"' : '';
        out += `<clipPath id="${id}"><path d="${step.d}"${rule}/></clipPath><g clip-path="url(#${id})">`;
        break;
      }
      case 'glyphs':
        out += glyphsElement(step, `${idPrefix}-glyph-${++glyphs}`);
        break;
      case 'unclip':
        out += '</g>';
        break;
    }
  }
  return out;
}

function glyphsElement({ d, glyph, fill, stroke }: GlyphsStep, id: string): string {
  const shape = pathElement({ d: `M0 0${glyph}`, fill, stroke });
  const at = ['start', 'mid', 'end'].map((place) => ` marker-${place}="url(#${id})"`).join('');
  return `<marker id="${id}" markerUnits="userSpaceOnUse" overflow="visible">${shape}</marker><path d="${d}" fill="none"${at}/>`;
}

function pathElement({ d, fill, stroke }: Omit<Extract<Step, { do: 'path' }>, 'do'>): string {
  const filling = fill ? `fill="${fill}" fill-rule="evenodd"` : 'fill="none"';
  if (!stroke) return `<path d="${d}" ${filling}/>`;
  const dash = stroke.dashPx ? ` stroke-dasharray="${stroke.dashPx.join(' ')}"` : '';
  return `<path d="${d}" ${filling} stroke="${stroke.colour}" stroke-width="${figure(stroke.widthPx)}"${dash}/>`;
}

/** Share of the size by which the baseline stands below the middle of the figures. */
export const BASELINE_SHARE = 0.33;

function textElement(step: TextStep): string {
  const { x, y, sizePx, turnDeg } = step;
  const anchor = step.anchor === 'start' ? '' : ` text-anchor="${step.anchor}"`;
  const weight = step.bold ? ' font-weight="600"' : '';
  const slant = step.slanted ? ' font-style="italic"' : '';
  const halo = step.halo
    ? ` stroke="${step.halo}" stroke-width="${figure(sizePx * 0.42)}" paint-order="stroke"`
    : '';
  const turn = turnDeg ? ` transform="rotate(${figure(turnDeg)} ${figure(x)} ${figure(y)})"` : '';
  return (
    `<text x="${figure(x)}" y="${figure(y + sizePx * BASELINE_SHARE)}" font-size="${figure(sizePx)}"` +
    `${anchor}${weight}${slant} fill="${step.colour}"${halo}${turn}>${escaped(step.words)}</text>`
  );
}
