import type { LakePlaceKind, ShownPlace } from '../../lakes/place-contract';
import { ruled, stroked, text, type Mark } from './mark';
import type { Palette } from './palette';
import { PLAIN_SVG, toSvg } from './to-svg';
import { fromPage, toPage, type View } from './view';

export type DrawnPlace = Pick<ShownPlace, 'kind' | 'name' | 'line'>;

/** A sign of its own shape for each kind, about the place; an overhead line is a line with bolts. */
const GLYPHS: Readonly<Record<LakePlaceKind, string>> = {
  parking: 'm-6.5 -6.5h13v13h-13z',
  gate: 'm-7 6v-12m14 12v-12m-14 2h14m-14 6h14',
  throw_line: 'm-6.5 0a6.5 6.5 0 1 0 13 0a6.5 6.5 0 1 0 -13 0m3.5 0a3 3 0 1 0 6 0a3 3 0 1 0 -6 0',
  hazard: 'm0 -7.5l7 7.5l-7 7.5l-7 -7.5z',
  overhead_line: 'm2 -7l-5 8h6l-5 7',
};
const LETTER: Partial<Record<LakePlaceKind, string>> = { parking: 'P', hazard: '!' };

const SWATCH_PX = 26;

/** The sign of a kind by itself, for a key; its name stands beside it. */
export function placeSwatchSvg(kind: LakePlaceKind, palette: Palette): string {
  const [x, y] = [SWATCH_PX / 2, SWATCH_PX / 2];
  const letter = LETTER[kind];
  const marks: Mark[] = [
    { kind: 'glyphs', at: [x, y], glyph: GLYPHS[kind], fill: null, stroke: ruled(palette.ink, 1.5) },
    ...(letter ? [text({ words: letter, x, y, sizePx: 11, bold: true, colour: palette.ink })] : []),
  ];
  const page = { widthPx: SWATCH_PX, heightPx: SWATCH_PX, ground: null, layers: [{ marks }] };
  return toSvg(page, { ...PLAIN_SVG, idPrefix: `place-${kind}` });
}

const EDGE_PX = 14;
const NAMED_FROM_PX_PER_M = 2.5; // nearer than this there is room for names
const WIRE_NAMED_FROM_PX_PER_M = 1.6; // farther off its name would lie on the pegs'; the key has it

/** What stands at a lake beside its pegs and marks, as far as it lies in view. */
export function placeMarks(places: readonly DrawnPlace[], palette: Palette, view: View): Mark[] {
  return places.flatMap((place) =>
    place.kind === 'overhead_line' ? wire(place, palette, view) : sign(place, palette, view),
  );
}

function sign({ kind, name, line: [x, y] }: DrawnPlace, palette: Palette, view: View): Mark[] {
  if (x === undefined || y === undefined || !inView(view, x, y)) return [];
  const letter = LETTER[kind];
  const words = { x, y, colour: palette.ink, halo: palette.paper };
  return [
    { kind: 'glyphs', at: [x, y], glyph: GLYPHS[kind], fill: palette.paper, stroke: ruled(palette.ink, 1.5) },
    ...(letter ? [text({ ...words, words: letter, dyPx: 0, sizePx: 11, bold: true })] : []),
    ...(view.pxPerM >= NAMED_FROM_PX_PER_M ? [text({ ...words, words: name, dyPx: 16, sizePx: 12 })] : []),
  ];
}

/** The line in short strokes, a bolt at each post, its name at its middle; cut at the edge of the page. */
function wire({ line }: DrawnPlace, palette: Palette, view: View): Mark[] {
  const posts: number[] = [];
  for (let i = 0; i + 1 < line.length; i += 2)
    if (inView(view, line[i]!, line[i + 1]!)) posts.push(line[i]!, line[i + 1]!);
  const label = view.pxPerM >= WIRE_NAMED_FROM_PX_PER_M ? labelled(line, view) : null;
  return [
    {
      kind: 'clip',
      lines: [page(view)],
      marks: [
        stroked([line], { colour: palette.paper, widthPx: 5, dashPx: null }),
        stroked([line], { colour: palette.ink, widthPx: 2, dashPx: [10, 4, 2, 4] }),
      ],
    },
    ...(posts.length > 0
      ? [
          {
            kind: 'glyphs' as const,
            at: posts,
            glyph: GLYPHS.overhead_line,
            fill: null,
            stroke: ruled(palette.ink, 2),
          },
        ]
      : []),
    ...(label
      ? [
          text({
            words: 'overhead line',
            ...label,
            dyPx: -10,
            sizePx: 12,
            bold: true,
            colour: palette.ink,
            halo: palette.paper,
          }),
        ]
      : []),
  ];
}

const STEPS = 24;

/** The middle of what is in view of the stretch between posts that shows longest: clear of the posts themselves. */
function labelled(line: readonly number[], view: View): { x: number; y: number } | null {
  let longest: { x: number; y: number }[] = [];
  let longestPx = 0;
  for (let i = 0; i + 3 < line.length; i += 2) {
    const stretch = Array.from({ length: STEPS + 1 }, (_, step) => ({
      x: line[i]! + (step / STEPS) * (line[i + 2]! - line[i]!),
      y: line[i + 1]! + (step / STEPS) * (line[i + 3]! - line[i + 1]!),
    }));
    const seen = stretch.filter((at) => {
      const { x, y } = toPage(view, at.x, at.y);
      const across = x > 5 * EDGE_PX && x < view.widthPx - 5 * EDGE_PX;
      return across && y > 2 * EDGE_PX && y < view.heightPx - EDGE_PX;
    });
    const stepPx = (Math.hypot(line[i + 2]! - line[i]!, line[i + 3]! - line[i + 1]!) / STEPS) * view.pxPerM;
    if (seen.length * stepPx > longestPx) [longest, longestPx] = [seen, seen.length * stepPx];
  }
  return longest[Math.floor(longest.length / 2)] ?? null;
}

function inView(view: View, xM: number, yM: number): boolean {
  const { x, y } = toPage(view, xM, yM);
  return x > EDGE_PX && x < view.widthPx - EDGE_PX && y > EDGE_PX && y < view.heightPx - EDGE_PX;
}

/** The edge of the page as a ring of the lake's plane. */
function page(view: View): number[] {
  const { widthPx, heightPx } = view;
  const corners = [
    [0, 0],
    [widthPx, 0],
    [widthPx, heightPx],
    [0, heightPx],
  ] as const;
  return corners.flatMap(([x, y]) => {
    const { xM, yM } = fromPage(view, x, y);
    return [xM, yM];
  });
}
