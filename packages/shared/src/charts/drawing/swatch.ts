import { UNSURVEYED_GAP_PX } from './depth-marks';
import { BOTTOM_GLYPHS, type Patterned } from './bottom-glyphs';
import { filled, ruled, stroked, type Mark } from './mark';
import type { Page } from './page';
import type { Palette } from './palette';
import { glyphInkOn, tintAt } from './tint';
import { PLAIN_SVG, toSvg } from './to-svg';

const WIDTH_PX = 44;
const HEIGHT_PX = 26;
const TINT_SHARE = 0.25;

/** A patch of one bottom's pattern on shallow water, for a key; its name stands beside it. */
export function swatchPage(kind: Patterned, palette: Palette): Page {
  const { glyph, solid, widthPx, gapPx, rows } = BOTTOM_GLYPHS[kind];
  const tint = tintAt(TINT_SHARE, palette.ramp);
  const ink = glyphInkOn(tint, palette);
  const box = [0, 0, WIDTH_PX, 0, WIDTH_PX, HEIGHT_PX, 0, HEIGHT_PX];
  const at: number[] = [];
  for (let j = 0; j * gapPx < HEIGHT_PX + gapPx; j++) {
    const along = rows && j % 2 !== 0 ? gapPx / 2 : 0;
    for (let i = 0; i * gapPx < WIDTH_PX + gapPx; i++) at.push(i * gapPx + along, j * gapPx + gapPx / 2);
  }
  const marks: Mark[] = [
    filled([box], tint),
    {
      kind: 'clip',
      lines: [box],
      marks: [
        { kind: 'glyphs', at, glyph, fill: solid ? ink : null, stroke: solid ? null : ruled(ink, widthPx) },
      ],
    },
  ];
  return { widthPx: WIDTH_PX, heightPx: HEIGHT_PX, ground: null, layers: [{ marks }] };
}

/** A patch of the paper that stands for water nobody surveyed, ruled as on the chart. */
export function unsurveyedSwatch(palette: Palette): Page {
  const box = [0, 0, WIDTH_PX, 0, WIDTH_PX, HEIGHT_PX, 0, HEIGHT_PX];
  const step = UNSURVEYED_GAP_PX * Math.SQRT2;
  const rules = Array.from({ length: Math.ceil((WIDTH_PX + HEIGHT_PX) / step) }, (_, i) => {
    const x = i * step - HEIGHT_PX;
    return [x, 0, x + HEIGHT_PX, HEIGHT_PX];
  });
  const marks: Mark[] = [
    filled([box], palette.paper),
    { kind: 'clip', lines: [box], marks: [stroked(rules, ruled(palette.rule, 1))] },
  ];
  return { widthPx: WIDTH_PX, heightPx: HEIGHT_PX, ground: null, layers: [{ marks }] };
}

export const swatchSvg = (kind: Patterned, palette: Palette): string =>
  toSvg(swatchPage(kind, palette), { ...PLAIN_SVG, idPrefix: `swatch-${kind}` });
