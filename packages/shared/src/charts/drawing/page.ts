import type { Mark, Stroke } from './mark';
import { glyphsText, pathText, type Place } from './path-text';
import { toPage, type View } from './view';

/** What a page is made of: maps of the lake's plane, and marks placed in px right and down of the top left corner. */
export type Layer =
  { view: View; atPx: { x: number; y: number }; marks: readonly Mark[] } | { marks: readonly Mark[] };
export type Page = { widthPx: number; heightPx: number; ground: string | null; layers: readonly Layer[] };

export type TextStep = {
  words: string;
  x: number;
  y: number;
  sizePx: number;
  bold: boolean;
  slanted: boolean;
  anchor: 'start' | 'middle' | 'end';
  turnDeg: number;
  colour: string;
  halo: string | null;
};

/** One act of drawing, in px of the page; `d` is SVG path text, filled by the even-odd rule. */
export type Step =
  | { do: 'path'; d: string; fill: string | null; stroke: Stroke | null }
  | ({ do: 'text' } & TextStep)
  | { do: 'clip'; d: string; evenOdd: boolean }
  | { do: 'unclip' };

/** The page as a plain list of acts, which an SVG writer and a PDF writer both follow in order. */
export function stepsOf(page: Page): Step[] {
  const steps: Step[] = [];
  if (page.ground) {
    steps.push({ do: 'path', d: boxText(0, 0, page), fill: page.ground, stroke: null });
  }
  for (const layer of page.layers) {
    if (!('view' in layer)) {
      addMarks(steps, layer.marks, (x, y) => ({ x, y }));
      continue;
    }
    const { view, atPx } = layer;
    steps.push({ do: 'clip', d: boxText(atPx.x, atPx.y, view), evenOdd: true });
    addMarks(steps, layer.marks, (x, y) => {
      const point = toPage(view, x, y);
      return { x: point.x + atPx.x, y: point.y + atPx.y };
    });
    steps.push({ do: 'unclip' });
  }
  return steps;
}

const boxText = (x: number, y: number, size: { widthPx: number; heightPx: number }): string =>
  `M${x} ${y}h${size.widthPx}v${size.heightPx}h${-size.widthPx}Z`;

function addMarks(steps: Step[], marks: readonly Mark[], place: Place): void {
  for (const mark of marks) {
    switch (mark.kind) {
      case 'path': {
        const d = mark.lines.map((line) =>
          pathText(line, { place, closed: mark.closed, curved: mark.curved }),
        );
        const all = d.join('');
        if (all) steps.push({ do: 'path', d: all, fill: mark.fill, stroke: mark.stroke });
        break;
      }
      case 'glyphs': {
        const d = glyphsText(mark.at, mark.glyph, place);
        if (d) steps.push({ do: 'path', d, fill: mark.fill, stroke: mark.stroke });
        break;
      }
      case 'text': {
        const { x, y } = place(mark.x, mark.y);
        const { kind: _kind, dxPx, dyPx, ...rest } = mark;
        steps.push({ ...rest, do: 'text', x: x + dxPx, y: y + dyPx });
        break;
      }
      case 'clip': {
        const d = mark.lines.map((line) => pathText(line, { place, closed: true, curved: false })).join('');
        steps.push({ do: 'clip', d, evenOdd: true });
        addMarks(steps, mark.marks, place);
        steps.push({ do: 'unclip' });
        break;
      }
    }
  }
}
