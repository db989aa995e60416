import type { Point } from '../../geometry/point';
import type { BottomArea } from './bottom-areas';
import { confidenceAt } from './bottom-areas';
import { BOTTOM_GLYPHS } from './bottom-glyphs';
import { thinnedFor } from './depth-marks';
import { isWellSurveyed, type Ground } from './ground';
import type { Taken } from './isobath-labels';
import { ruled, text, type GlyphsMark, type Mark, type PathMark } from './mark';
import type { Palette } from './palette';
import { bandAt, bandsOf, glyphInkOn, labelInkOn, type Band } from './tint';
import { fromPage, toPage, type PagePoint, type View } from './view';
import { valueAt } from './water-raster';

/** Below this the chart is guessing more than telling: the pattern thins out to a hint. */
export const SPARSE_BELOW = 0.55;
const SPARSE_KEPT = 0.4;

/** Places of the lattice in view, spaced so that zooming keeps them where they are: the gap is a power of two metres. */
function* latticeIn(view: View, gapPx: number, shape: { jitter: number; rows: boolean }) {
  const gapM = 2 ** (Math.round(4 * Math.log2(gapPx / view.pxPerM)) / 4);
  const corners = [
    fromPage(view, 0, 0),
    fromPage(view, view.widthPx, 0),
    fromPage(view, 0, view.heightPx),
    fromPage(view, view.widthPx, view.heightPx),
  ];
  const [west, east] = [Math.min(...corners.map((c) => c.xM)), Math.max(...corners.map((c) => c.xM))];
  const [south, north] = [Math.min(...corners.map((c) => c.yM)), Math.max(...corners.map((c) => c.yM))];
  for (let j = Math.floor(south / gapM); j * gapM <= north; j++) {
    const along = shape.rows && j % 2 !== 0 ? 0.5 : 0;
    for (let i = Math.floor(west / gapM) - 1; i * gapM <= east; i++) {
      const [u, v, chance] = [scatter(i, j, 1), scatter(i, j, 2), scatter(i, j, 3)];
      yield {
        xM: (i + along + (u - 0.5) * 2 * shape.jitter) * gapM,
        yM: (j + (v - 0.5) * 2 * shape.jitter) * gapM,
        chance,
      };
    }
  }
}

/** A number in 0–1 that belongs to a lattice point: the same on every redraw. Mixing after Wellons' 32-bit hash. */
export function scatter(i: number, j: number, salt: number): number {
  let h = Math.imul(i, 0x9e3779b1) ^ Math.imul(j, 0x85ebca6b) ^ Math.imul(salt, 0xc2b2ae35);
  h = Math.imul(h ^ (h >>> 16), 0x7feb352d);
  h = Math.imul(h ^ (h >>> 15), 0x846ca68b);
  return ((h ^ (h >>> 16)) >>> 0) / 2 ** 32;
}

type Scene = { ground: Ground; palette: Palette; view: View };

/** The bottom as patterns, each glyph in the ink its own water calls for, with a dotted limit round every area. */
export function bottomMarks(areas: readonly BottomArea[], scene: Scene): Mark[] {
  const bands = bandsOf(scene.ground.levelsM, scene.palette.ramp);
  return areas.flatMap((area) => [...patternOf(area, scene, bands), limitOf(area, scene)]);
}

function patternOf(area: BottomArea, scene: Scene, bands: readonly Band[]): Mark[] {
  const style = BOTTOM_GLYPHS[area.kind];
  const byTint = new Map<string, number[]>();
  for (const { xM, yM, chance } of latticeIn(scene.view, style.gapPx, style)) {
    const sure = confidenceAt(area, xM, yM);
    if (sure === 0 || (sure < SPARSE_BELOW && chance > SPARSE_KEPT)) continue;
    const tint = tintUnder({ xM, yM }, scene, bands);
    const places = byTint.get(tint);
    if (places) places.push(xM, yM);
    else byTint.set(tint, [xM, yM]);
  }
  return [...byTint].map(([tint, at]): GlyphsMark => {
    const ink = glyphInkOn(tint, scene.palette);
    const stroke = style.solid ? null : ruled(ink, style.widthPx);
    return { kind: 'glyphs', at, glyph: style.glyph, fill: style.solid ? ink : null, stroke };
  });
}

function tintUnder({ xM, yM }: Point, { ground, palette }: Scene, bands: readonly Band[]): string {
  if (!ground.depth) return palette.paper;
  const depthM = valueAt(ground.depth, xM, yM);
  return bandAt(bands, Number.isNaN(depthM) ? 0 : depthM).tint;
}

function limitOf(area: BottomArea, { palette, view, ground }: Scene): PathMark {
  const colour = ground.depth ? palette.labelDark : palette.ink;
  return {
    kind: 'path',
    lines: thinnedFor(view, area.edges, area.soft.cellM),
    closed: true,
    curved: true,
    fill: null,
    stroke: ruled(colour, 1.1, [0.1, 3.2]),
  };
}

const LABEL_PX = 13;
const SAME_LETTERS_APART_PX = 130;
const LEAST_ROOM_PX = 11;

/** Abbreviations in the middle of each area large enough to carry them. */
export function bottomLabels(areas: readonly BottomArea[], scene: Scene & { taken: Taken }): Mark[] {
  const { palette, view, taken } = scene;
  const bands = bandsOf(scene.ground.levelsM, palette.ramp);
  return areas.flatMap((area) => {
    const own: PagePoint[] = [];
    return area.labels.flatMap(({ xM, yM, roomM }) => {
      if (roomM * view.pxPerM < LEAST_ROOM_PX && area.kind !== 'snag') return [];
      if (scene.ground.depth && !isWellSurveyed(scene.ground, { xM, yM })) return [];
      const at = toPage(view, xM, yM);
      if (own.some((other) => Math.hypot(at.x - other.x, at.y - other.y) < SAME_LETTERS_APART_PX)) return [];
      if (taken.some((other) => Math.hypot(at.x - other.x, at.y - other.y) < other.radiusPx + LABEL_PX))
        return [];
      taken.push({ ...at, radiusPx: LABEL_PX });
      own.push(at);
      const { ink, halo } = labelInkOn(tintUnder({ xM, yM }, scene, bands), palette);
      const { abbreviation } = BOTTOM_GLYPHS[area.kind];
      return [text({ words: abbreviation, x: xM, y: yM, sizePx: LABEL_PX, bold: true, colour: ink, halo })];
    });
  });
}
