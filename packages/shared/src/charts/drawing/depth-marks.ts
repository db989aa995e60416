import type { Ground } from './ground';
import { filled, ruled, stroked, text, type Line, type Mark, type PathMark } from './mark';
import type { Palette } from './palette';
import { thinned } from './path-text';
import { bandAt, bandsOf, lineInkOn } from './tint';
import { fromPage, toPage, type View } from './view';
import { isInside, turnOf, widestPlace } from './widest-place';

/** Every fifth isobath is drawn heavier. */
export const HEAVY_EVERY = 5;
const LEAST_STEP_PX = 3;

export const isHeavy = (levelM: number, stepM: number): boolean =>
  Math.round(levelM / stepM) % HEAVY_EVERY === 0;

/** Points closer on the page than the eye can use are left out; nothing is moved. */
export function thinnedFor(view: View, lines: readonly Line[], cellM: number): Line[] {
  const leastM = Math.max(LEAST_STEP_PX / view.pxPerM, cellM * 0.55);
  return lines.map((line) => thinned(line, leastM)).filter((line) => line.length >= 4);
}

/** Bands of tint from the surface down, the whole water first. */
export function tintMarks(ground: Ground, palette: Palette, view: View): Mark[] {
  const bands = bandsOf(ground.levelsM, palette.ramp);
  const surface = bands[0];
  if (!ground.depth || !surface) return [filled(ground.water, palette.paper)];
  const cellM = ground.depth.cellM;
  const deeper = ground.regions.map((region, i) =>
    filled(thinnedFor(view, region.lines, cellM), bands[i + 1]?.tint ?? surface.tint, true),
  );
  return [filled(ground.water, surface.tint), ...deeper];
}

/** Isobaths as ink hairlines, each fifth heavier. */
export function isobathMarks(ground: Ground, palette: Palette, view: View): Mark[] {
  const cellM = ground.depth?.cellM ?? 1;
  const bands = bandsOf(ground.levelsM, palette.ramp);
  return ground.isobaths.map(({ levelM, lines }): PathMark => {
    const widthPx = isHeavy(levelM, ground.stepM) ? 1.35 : 0.55;
    const colour = lineInkOn(bandAt(bands, levelM).tint, palette);
    const line = stroked(thinnedFor(view, lines, cellM), ruled(colour, widthPx));
    return { ...line, curved: true };
  });
}

/** Between the rules of paper that stands for water nobody surveyed. */
export const UNSURVEYED_GAP_PX = 11;

/** Bare paper with a soft diagonal rule and the words: nobody surveyed here. */
export function unsurveyedMarks(ground: Ground, palette: Palette, view: View): Mark[] {
  if (!ground.depth || ground.unsurveyed.length === 0) return [];
  const areas = thinnedFor(view, ground.unsurveyed, ground.depth.cellM);
  const edge: PathMark = {
    ...filled(areas, palette.paper, true),
    stroke: ruled(palette.inkSoft, 0.7, [1, 3]),
  };
  return [
    edge,
    { kind: 'clip', lines: areas, marks: [stroked(diagonals(areas, view), ruled(palette.rule, 1))] },
    ...wordsIn(areas, { words: 'not surveyed', palette, view, water: ground.water }),
  ];
}

const CHANGED_GAP_PX = 26;
const RAISED_PX = 26; // clear of the words of unsurveyed water, which stand in its middle

/** Water whose bottom has changed since it was surveyed: a wide broken hatch over all that is charted there, and the words. */
export function changedMarks(areas: readonly Line[], ground: Ground, { palette, view }: Pen): Mark[] {
  if (areas.length === 0) return [];
  const hatch = stroked(diagonals(areas, view, CHANGED_GAP_PX), ruled(palette.ink, 0.9, [7, 5]));
  return [
    { ...stroked([...areas], ruled(palette.ink, 1.1, [7, 5])), closed: true },
    { kind: 'clip', lines: [...areas], marks: [hatch] },
    ...wordsIn(areas, { words: 'changed since', palette, view, water: ground.water, raisedPx: RAISED_PX }),
  ];
}

type Pen = { palette: Palette; view: View };

/** Bed that stands out of the water at this level. */
export function dryMarks(ground: Ground, palette: Palette, view: View): Mark[] {
  if (!ground.depth || ground.dry.length === 0) return [];
  const areas = thinnedFor(view, ground.dry, ground.depth.cellM);
  const edge: PathMark = { ...filled(areas, palette.bed, true), stroke: ruled(palette.ink, 0.9, [4, 2]) };
  return [edge, ...wordsIn(areas, { words: 'dry bank', palette, view, water: ground.water })];
}

/**
 * Lines at 45° on the page, however the map is turned, over the areas' own box; fixed to the lake. They lean against
 * the hatch of clay, from which nothing else tells them in black and white.
 */
function diagonals(areas: readonly Line[], view: View, gapPx = UNSURVEYED_GAP_PX): Line[] {
  const gapM = gapPx / view.pxPerM;
  const turn = ((135 + view.turnDeg) * Math.PI) / 180; // of the lines, counter-clockwise from the plane's east
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  let [fromAlong, toAlong, fromAcross, toAcross] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const area of areas) {
    for (let i = 0; i + 1 < area.length; i += 2) {
      const along = area[i]! * cos + area[i + 1]! * sin;
      const across = area[i + 1]! * cos - area[i]! * sin;
      fromAlong = Math.min(fromAlong, along);
      toAlong = Math.max(toAlong, along);
      fromAcross = Math.min(fromAcross, across);
      toAcross = Math.max(toAcross, across);
    }
  }
  const at = (along: number, across: number) => [along * cos - across * sin, along * sin + across * cos];
  const lines: Line[] = [];
  for (let across = Math.ceil(fromAcross / gapM) * gapM; across <= toAcross; across += gapM) {
    lines.push([...at(fromAlong, across), ...at(toAlong, across)]);
  }
  return lines;
}

type WordsScene = {
  words: string;
  palette: Palette;
  view: View;
  water: readonly Line[];
  raisedPx?: number; // above the middle, where there is room
};

const WORDS_ACROSS_PX = 92;
const WORDS_ROOM_PX = 13;

/** The words in every area with room for them, level on the page however the map is turned, and never on land. */
function wordsIn(areas: readonly Line[], { words, palette, view, water, raisedPx = 0 }: WordsScene): Mark[] {
  const onPage = areas.map((area) => pageLine(area, view));
  const shores = water.map((ring) => pageLine(ring, view));
  const holes = onPage.filter((area) => turnOf(area) < 0);
  return onPage.flatMap((area) => {
    if (turnOf(area) <= 0) return [];
    const place = widestPlace(area, holes);
    if (!place || place.roomM < WORDS_ROOM_PX || place.acrossM < WORDS_ACROSS_PX) return [];
    const ends = [-0.45, 0, 0.45].map((share) => place.xM + share * WORDS_ACROSS_PX);
    if (!ends.every((x) => isInside(shores, x, place.yM))) return [];
    const { xM, yM } = fromPage(view, place.xM, -place.yM);
    const dyPx = place.roomM < raisedPx + WORDS_ROOM_PX ? 0 : -raisedPx;
    return [text({ words, x: xM, y: yM, dyPx, colour: palette.inkSoft, halo: palette.paper, slanted: true })];
  });
}

/** A line in px right and up of the page, so that rings keep their sense of turning. */
function pageLine(line: Line, view: View): number[] {
  const out: number[] = [];
  for (let i = 0; i + 1 < line.length; i += 2) {
    const { x, y } = toPage(view, line[i]!, line[i + 1]!);
    out.push(x, -y);
  }
  return out;
}
