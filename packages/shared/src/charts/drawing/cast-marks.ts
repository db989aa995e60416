import { pointAlong, type Point } from '../../geometry/point';
import { BOTTOM_ABBREVIATION } from '../../surveys/bottom-abbreviation';
import type { Bottom, Grade } from '../../surveys/contract';
import { ruled, stroked, text, type GlyphsMark, type Line, type Mark, type PathMark } from './mark';
import type { Palette } from './palette';
import { toPage, type View } from './view';

/** A cast drawn on the chart. Bearings are the plane's, degrees clockwise from north. */
export type DrawnCast = {
  from: Point;
  bearingDeg: number;
  rangeM: number;
  wrapRangesM: readonly number[]; // ground range of every whole wrap, the first first
  ellipse: { semiMajorM: number; semiMinorM: number; bearingDeg: number } | null; // 95 %
};

const TICK_PX = 3.5;
const LONG_TICK_PX = 6;
const LONG_EVERY = 4;

/** A fine line from the peg with a tick at every wrap, longer at every fourth; its end carries the 95 % ellipse. */
export function castMarks(cast: DrawnCast, palette: Palette, view: View): Mark[] {
  const end = pointAlong(cast.from, cast.bearingDeg, cast.rangeM);
  const line: Line = [cast.from.xM, cast.from.yM, end.xM, end.yM];
  const ticks = cast.wrapRangesM
    .filter((rangeM) => rangeM < cast.rangeM - 0.5)
    .map((rangeM) => {
      const whole = cast.wrapRangesM.indexOf(rangeM) + 1;
      return tickAt(cast, rangeM, (whole % LONG_EVERY === 0 ? LONG_TICK_PX : TICK_PX) / view.pxPerM);
    });
  const dot: GlyphsMark = {
    kind: 'glyphs',
    at: [end.xM, end.yM],
    glyph: 'm-2.6 0a2.6 2.6 0 1 0 5.2 0a2.6 2.6 0 1 0 -5.2 0z',
    fill: palette.selected,
    stroke: null,
  };
  return [
    stroked([line], ruled(palette.paper, 4.4)),
    stroked(ticks, ruled(palette.paper, 3.6)),
    stroked([line], ruled(palette.selected, 1.8)),
    stroked(ticks, ruled(palette.selected, 1.6)),
    ...(cast.ellipse ? [ellipseMark(end, cast.ellipse, palette)] : []),
    dot,
  ];
}

function tickAt(cast: DrawnCast, rangeM: number, halfM: number): Line {
  const middle = pointAlong(cast.from, cast.bearingDeg, rangeM);
  const left = pointAlong(middle, cast.bearingDeg - 90, halfM);
  const right = pointAlong(middle, cast.bearingDeg + 90, halfM);
  return [left.xM, left.yM, right.xM, right.yM];
}

const ELLIPSE_POINTS = 40;

function ellipseMark(
  centre: Point,
  ellipse: { semiMajorM: number; semiMinorM: number; bearingDeg: number },
  palette: Palette,
): PathMark {
  const turn = (ellipse.bearingDeg * Math.PI) / 180;
  const ring = Array.from({ length: ELLIPSE_POINTS }, (_, i) => {
    const angle = (2 * Math.PI * i) / ELLIPSE_POINTS;
    const major = ellipse.semiMajorM * Math.cos(angle);
    const minor = ellipse.semiMinorM * Math.sin(angle);
    return [
      centre.xM + major * Math.sin(turn) + minor * Math.cos(turn),
      centre.yM + major * Math.cos(turn) - minor * Math.sin(turn),
    ];
  }).flat();
  return {
    kind: 'path',
    lines: [ring],
    closed: true,
    curved: true,
    fill: null,
    stroke: ruled(palette.selected, 1.8),
  };
}

/** A cast on the sheet; without a depth it tells of the bottom only. */
export type DrawnSounding = Point & { depthM: number | null; bottom: Bottom; grade: Grade };

const FIGURES_FROM_PX_PER_M = 3.2;

/**
 * Soundings as points: filled where the isobaths lean on them, hollow where they only stand as points, a hollow square with
 * the bottom's letters where no depth was read.
 */
export function soundingMarks(soundings: readonly DrawnSounding[], scene: SoundingScene): Mark[] {
  const { palette, view, words } = scene;
  const read = soundings.filter(({ depthM }) => depthM !== null);
  const leantOn = read.filter(({ grade }) => grade === 'A' || grade === 'B');
  const others = read.filter(({ grade }) => grade === 'C' || grade === 'D');
  const felt = soundings.filter(({ depthM }) => depthM === null);
  const marks: Mark[] = [
    dots(leantOn, palette, true),
    dots(others, palette, false),
    ...(felt.length > 0 ? [{ ...dots(felt, palette, false), glyph: SQUARE }] : []),
  ];
  if (view.pxPerM < FIGURES_FROM_PX_PER_M) return marks;
  const figures = withRoom([...felt, ...leantOn, ...others], view).map(({ xM, yM, depthM, bottom }) =>
    text({
      words: depthM === null ? lettersOf(bottom) : words(depthM),
      x: xM,
      y: yM,
      dyPx: -9,
      sizePx: 11,
      colour: palette.labelDark,
      halo: palette.labelLight,
    }),
  );
  return [...marks, ...figures];
}

const SQUARE = 'm-2.3 -2.3h4.6v4.6h-4.6z';

/** An open standard's letters where it has any, else the word. */
const lettersOf = (bottom: Bottom): string =>
  BOTTOM_ABBREVIATION[bottom] ?? (bottom === 'unknown' ? '?' : bottom);

const FIGURE_ACROSS_PX = 24;
const FIGURE_UP_PX = 12;

/** Those whose figures have room beside the ones before them; a figure under another is read as neither. */
function withRoom(soundings: readonly DrawnSounding[], view: View): DrawnSounding[] {
  const taken = new Map<string, { x: number; y: number }[]>(); // by boxes of a figure's size
  return soundings.filter(({ xM, yM }) => {
    const { x, y } = toPage(view, xM, yM);
    const [column, row] = [Math.floor(x / FIGURE_ACROSS_PX), Math.floor(y / FIGURE_UP_PX)];
    for (let i = column - 1; i <= column + 1; i++)
      for (let j = row - 1; j <= row + 1; j++)
        for (const other of taken.get(`${i} ${j}`) ?? [])
          if (Math.abs(other.x - x) < FIGURE_ACROSS_PX && Math.abs(other.y - y) < FIGURE_UP_PX) return false;
    const key = `${column} ${row}`;
    taken.set(key, [...(taken.get(key) ?? []), { x, y }]);
    return true;
  });
}

export type SoundingScene = { palette: Palette; view: View; words: (depthM: number) => string };

function dots(soundings: readonly DrawnSounding[], palette: Palette, solid: boolean): GlyphsMark {
  return {
    kind: 'glyphs',
    at: soundings.flatMap(({ xM, yM }) => [xM, yM]),
    glyph: 'm-2.1 0a2.1 2.1 0 1 0 4.2 0a2.1 2.1 0 1 0 -4.2 0z',
    fill: solid ? palette.labelDark : palette.labelLight,
    stroke: ruled(solid ? palette.labelLight : palette.labelDark, solid ? 0.8 : 1.2),
  };
}

export type DrawnSpot = Point & { id: string; name: string };

/** Spots worth coming back to: a small diamond each, the chosen one float-coloured. */
export function spotMarks(spots: readonly DrawnSpot[], palette: Palette, selectedId: string | null): Mark[] {
  return spots.map((spot): GlyphsMark => {
    const selected = spot.id === selectedId;
    return {
      kind: 'glyphs',
      at: [spot.xM, spot.yM],
      glyph: 'm0 -5.2l5.2 5.2l-5.2 5.2l-5.2 -5.2z',
      fill: selected ? palette.selected : palette.labelLight,
      stroke: ruled(selected ? palette.labelLight : palette.labelDark, 1.4),
    };
  });
}
