import type { Point } from '../../geometry/plane';
import type { Ground } from './ground';
import type { Taken } from './isobath-labels';
import { filled, ruled, stroked, text, type GlyphsMark, type Line, type Mark } from './mark';
import type { Palette } from './palette';
import { toPage, type View } from './view';

/** Shore and islands in ink; islands are land, so they're paper. */
export function shoreMarks(ground: Ground, palette: Palette): Mark[] {
  return [stroked(ground.shore, ruled(palette.ink, 1.9))];
}

export type DrawnPeg = Point & {
  id: string;
  number: string;
  facingDeg: number;
  status: 'open' | 'limited' | 'closed';
};

const BAR_WATER_PX = 4;
const HEAD_PX = 8;
const BAR_LAND_PX = 6;
const NUMBER_PX = 17; // from the shore to the middle of the number

const along = (from: Point, facingDeg: number, lengthM: number): Point => ({
  xM: from.xM + Math.sin((facingDeg * Math.PI) / 180) * lengthM,
  yM: from.yM + Math.cos((facingDeg * Math.PI) / 180) * lengthM,
});

type PegScene = { palette: Palette; view: View; selectedId: string | null; taken: Taken };

/** Pegs: a short bar across the bank with a head that points at the water, its number on the land side. */
export function pegMarks(pegs: readonly DrawnPeg[], scene: PegScene): Mark[] {
  // The selected peg is drawn last, over its neighbours.
  const order = [...pegs].sort(
    (a, b) => Number(a.id === scene.selectedId) - Number(b.id === scene.selectedId),
  );
  return order.flatMap((peg) => pegMark(peg, scene));
}

function pegMark(peg: DrawnPeg, { palette, view, selectedId, taken }: PegScene): Mark[] {
  const selected = peg.id === selectedId;
  const colour = selected ? palette.selected : peg.status === 'closed' ? palette.danger : palette.ink;
  const px = 1 / view.pxPerM;
  const land = along(peg, peg.facingDeg, -BAR_LAND_PX * px);
  const tip = along(peg, peg.facingDeg, BAR_WATER_PX * px);
  const place = along(peg, peg.facingDeg, -NUMBER_PX * px);
  const bar = stroked([[land.xM, land.yM, tip.xM, tip.yM]], ruled(colour, selected ? 3.6 : 2.6));
  const at = toPage(view, place.xM, place.yM);
  taken.push({ ...at, radiusPx: 11 });
  const number = text({
    words: peg.number,
    x: place.xM,
    y: place.yM,
    sizePx: 13,
    bold: true,
    colour: selected ? palette.onSelected : colour,
    halo: selected ? null : palette.paper,
  });
  return [
    bar,
    statusMark(peg, tip, { colour, palette, px }),
    ...(selected ? [disc(place, peg.number, palette)] : []),
    number,
  ];
}

type StatusScene = { colour: string; palette: Palette; px: number };

/** Open: a head pointing at the water. Limited: a ring. Closed: a cross. */
function statusMark({ facingDeg, status }: DrawnPeg, tip: Point, { colour, palette, px }: StatusScene): Mark {
  const at: Line = [tip.xM, tip.yM];
  switch (status) {
    case 'open': {
      const head = along(tip, facingDeg, HEAD_PX * px);
      const left = along(tip, facingDeg - 90, (HEAD_PX / 2) * px);
      const right = along(tip, facingDeg + 90, (HEAD_PX / 2) * px);
      return filled([[head.xM, head.yM, left.xM, left.yM, right.xM, right.yM]], colour);
    }
    case 'limited': {
      const glyph = 'm-3.4 0a3.4 3.4 0 1 0 6.8 0a3.4 3.4 0 1 0 -6.8 0z';
      return { kind: 'glyphs', at, glyph, fill: palette.paper, stroke: ruled(colour, 1.8) };
    }
    case 'closed':
      return { kind: 'glyphs', at, glyph: 'm-4 -4l8 8m0 -8l-8 8', fill: null, stroke: ruled(colour, 2.4) };
  }
}

function disc(place: Point, number: string, palette: Palette): GlyphsMark {
  const half = Math.max(11, 4 + number.length * 4);
  const over = half - 11;
  return {
    kind: 'glyphs',
    at: [place.xM, place.yM],
    glyph: `m${-over} -11h${2 * over}a11 11 0 0 1 0 22h${-2 * over}a11 11 0 0 1 0 -22z`,
    fill: palette.selected,
    stroke: ruled(palette.paper, 1.4),
  };
}
