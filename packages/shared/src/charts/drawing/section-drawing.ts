import type { Cover, Substrate } from '../../surveys/contract';
import { BOTTOM_GLYPHS } from './bottom-glyphs';
import { filled, ruled, stroked, text, type GlyphsMark, type Mark, type PathMark } from './mark';
import type { Page } from './page';
import type { Palette } from './palette';

/** One place of the bed along a cast; depth now (negative: out of the water), null where nobody surveyed. */
export type SectionPlace = {
  lineOutM: number;
  depthM: number | null;
  sigmaM: number | null;
  bottom: Substrate | Cover | null;
};

export type SectionInput = {
  places: readonly SectionPlace[]; // lineOutM rises
  stickSpacingM: number;
  markLineOutM: number | null; // where the chosen spot lies
  depthWords: (depthM: number) => string;
  unitM: number; // what depths are read in, metres: 1, or a foot's 0.3048
};

export type SectionPage = { widthPx: number; heightPx: number; palette: Palette };

const TOP_PX = 34;
const FOOT_PX = 26;
const LEFT_PX = 30;
const RIGHT_PX = 8;
const LEAST_DEPTH_M = 1;
const SIDE_WAYS = 1.96;

type Scale = {
  x: (lineOutM: number) => number;
  y: (depthM: number) => number;
  bottomY: number;
  deepM: number;
};

/** The bed along a cast: water line with ticks in wraps, 95 % band, bed, bottom in words, and a mark that ends on it. */
export function drawSection(input: SectionInput, page: SectionPage): Page {
  const scale = scaleOf(input, page);
  const { palette } = page;
  const runs = surveyedRuns(input.places);
  const marks: Mark[] = [
    ...depthRules(scale, input, page),
    ...runs.flatMap((run) => bedMarks(run, scale, palette)),
    ...gapMarks(input.places, scale, palette),
    waterLine(scale, page),
    ...wrapTicks(input, scale, palette),
    ...bottomWords(input.places, scale, page),
    ...spotMark(input, scale, palette),
  ];
  return { widthPx: page.widthPx, heightPx: page.heightPx, ground: null, layers: [{ marks }] };
}

function scaleOf({ places }: SectionInput, page: SectionPage): Scale {
  const farM = places.at(-1)?.lineOutM ?? 1;
  const depths = places.map(({ depthM, sigmaM }) => (depthM ?? 0) + SIDE_WAYS * (sigmaM ?? 0));
  const deepM = Math.max(LEAST_DEPTH_M, ...depths) * 1.08;
  const bottomY = page.heightPx - FOOT_PX;
  return {
    x: (lineOutM) => LEFT_PX + (lineOutM / farM) * (page.widthPx - LEFT_PX - RIGHT_PX),
    y: (depthM) => TOP_PX + (depthM / deepM) * (bottomY - TOP_PX),
    bottomY,
    deepM,
  };
}

type Surveyed = SectionPlace & { depthM: number };

/** Unbroken stretches of surveyed bed. */
function surveyedRuns(places: readonly SectionPlace[]): Surveyed[][] {
  const runs: Surveyed[][] = [];
  let run: Surveyed[] = [];
  for (const place of places) {
    if (place.depthM !== null) run.push({ ...place, depthM: place.depthM });
    else if (run.length) {
      runs.push(run);
      run = [];
    }
  }
  if (run.length) runs.push(run);
  return runs.filter((stretch) => stretch.length > 1);
}

function bedMarks(run: readonly Surveyed[], scale: Scale, palette: Palette): Mark[] {
  const bed = run.flatMap(({ lineOutM, depthM }) => [scale.x(lineOutM), scale.y(depthM)]);
  const upper = run.flatMap((place) => [scale.x(place.lineOutM), scale.y(place.depthM - bandOf(place))]);
  const lower = run.map((place) => [scale.x(place.lineOutM), scale.y(place.depthM + bandOf(place))] as const);
  const [from, to] = [bed[0] ?? 0, bed[bed.length - 2] ?? 0];
  const ground = [...bed, to, scale.bottomY, from, scale.bottomY];
  const band = [...upper, ...lower.reverse().flat()];
  const line: PathMark = { ...stroked([bed], ruled(palette.ink, 2)), curved: true };
  return [filled([ground], palette.bed), filled([band], palette.band), line];
}

const bandOf = ({ sigmaM }: SectionPlace): number => SIDE_WAYS * (sigmaM ?? 0);

/** Where nobody surveyed: soft rule and words, no bed. */
function gapMarks(places: readonly SectionPlace[], scale: Scale, palette: Palette): Mark[] {
  const marks: Mark[] = [];
  let from: number | null = null;
  places.forEach((place, i) => {
    const open = place.depthM === null;
    if (open && from === null) from = (places[i - 1] ?? place).lineOutM;
    const last = i === places.length - 1;
    if (from === null || (open && !last)) return;
    const isBank = from === places[0]?.lineOutM && place.lineOutM - from < BANK_M;
    if (!isBank) marks.push(...gapMark(scale.x(from), scale.x(place.lineOutM), { scale, palette }));
    from = null;
  });
  return marks;
}

const GAP_RULE_PX = 9;
/** A gap at the start shorter than this is the bank the angler stands on, not water that nobody surveyed. */
const BANK_M = 4;

function gapMark(
  left: number,
  right: number,
  { scale, palette }: { scale: Scale; palette: Palette },
): Mark[] {
  const top = scale.y(0);
  const high = scale.bottomY - top;
  const box = [left, top, right, top, right, scale.bottomY, left, scale.bottomY];
  const lines: number[][] = [];
  for (let x = left - high; x < right; x += GAP_RULE_PX) lines.push([x, scale.bottomY, x + high, top]);
  const words =
    right - left < 84
      ? []
      : [
          text({
            words: 'not surveyed',
            x: (left + right) / 2,
            y: top + high / 2,
            colour: palette.inkSoft,
            halo: palette.paper,
            slanted: true,
          }),
        ];
  return [{ kind: 'clip', lines: [box], marks: [stroked(lines, ruled(palette.rule, 1))] }, ...words];
}

function waterLine(scale: Scale, page: SectionPage): Mark {
  const y = scale.y(0);
  return stroked([[LEFT_PX, y, page.widthPx - RIGHT_PX, y]], ruled(page.palette.waterLine, 1.8));
}

const RULE_STEPS = [0.5, 1, 2, 5, 10] as const;
const MOST_RULES = 4.5;

/** Level rules at round depths with figures at the left. */
function depthRules(scale: Scale, { depthWords, unitM }: SectionInput, page: SectionPage): Mark[] {
  const units = RULE_STEPS.find((step) => scale.deepM / unitM / step <= MOST_RULES) ?? 10;
  const stepM = units * unitM;
  const marks: Mark[] = [];
  for (let depthM = 0; depthM < scale.deepM; depthM += stepM) {
    const y = scale.y(depthM);
    if (depthM > 0) {
      marks.push(stroked([[LEFT_PX, y, page.widthPx - RIGHT_PX, y]], ruled(page.palette.rule, 0.7)));
    }
    marks.push(
      text({
        words: depthWords(depthM),
        x: LEFT_PX - 5,
        y,
        sizePx: 12,
        anchor: 'end',
        colour: page.palette.inkSoft,
      }),
    );
  }
  return marks;
}

/** A tick at every wrap of the stated sticks, a long one with its count at every fourth (second on a short cast). */
function wrapTicks({ places, stickSpacingM }: SectionInput, scale: Scale, palette: Palette): Mark[] {
  const farM = places.at(-1)?.lineOutM ?? 0;
  const count = Math.floor(farM / stickSpacingM + 1e-6);
  const every = count > 10 ? 4 : 2;
  const y = scale.y(0);
  const marks: Mark[] = [];
  for (let wraps = 1; wraps <= count; wraps++) {
    const x = scale.x(wraps * stickSpacingM);
    const long = wraps % every === 0;
    marks.push(stroked([[x, y - (long ? 7 : 4), x, y]], ruled(palette.inkSoft, long ? 1.4 : 1)));
    if (long) {
      marks.push(text({ words: String(wraps), x, y: y - 16, sizePx: 13, colour: palette.inkSoft }));
    }
  }
  return marks;
}

const WORD_WIDTH_PX = 6.4; // of a letter at 13 px
const STRIP_PX = 13;

/** Under the bed: each stretch's own pattern and its name where there's room. */
function bottomWords(places: readonly SectionPlace[], scale: Scale, { palette }: SectionPage): Mark[] {
  return stretches(places).flatMap(({ bottom, fromM, toM }): Mark[] => {
    if (bottom === null || bottom === 'clear') return [];
    const { words, glyph, solid, widthPx, gapPx } = BOTTOM_GLYPHS[bottom];
    const [left, right] = [scale.x(fromM), scale.x(toM)];
    const at: number[] = [];
    for (let x = left + gapPx / 2; x < right - 2; x += gapPx) at.push(x, scale.bottomY - STRIP_PX / 2 - 2);
    const pattern: GlyphsMark = {
      kind: 'glyphs',
      at,
      glyph,
      fill: solid ? palette.inkSoft : null,
      stroke: solid ? null : ruled(palette.inkSoft, widthPx),
    };
    if (right - left < words.length * WORD_WIDTH_PX + 6) return [pattern];
    const edge =
      fromM > 0 ? [stroked([[left, scale.bottomY, left, scale.bottomY + 6]], ruled(palette.inkSoft, 1))] : [];
    const name = text({
      words,
      x: left + 4,
      y: scale.bottomY + 13,
      anchor: 'start',
      colour: palette.inkSoft,
    });
    return [pattern, ...edge, name];
  });
}

type Stretch = { bottom: SectionPlace['bottom']; fromM: number; toM: number };

function stretches(places: readonly SectionPlace[]): Stretch[] {
  const found: Stretch[] = [];
  for (const { bottom, lineOutM } of places) {
    const last = found.at(-1);
    if (last && last.bottom === bottom) last.toM = lineOutM;
    else {
      if (last) last.toM = lineOutM;
      found.push({ bottom, fromM: lineOutM, toM: lineOutM });
    }
  }
  return found;
}

/** From the water's surface down, ending on the bed. */
function spotMark({ places, markLineOutM }: SectionInput, scale: Scale, palette: Palette): Mark[] {
  if (markLineOutM === null) return [];
  const depthM = depthAt(places, markLineOutM);
  if (depthM === null) return [];
  const [x, y] = [scale.x(markLineOutM), scale.y(depthM)];
  const dot: GlyphsMark = {
    kind: 'glyphs',
    at: [x, y],
    glyph: 'm-5 0a5 5 0 1 0 10 0a5 5 0 1 0 -10 0z',
    fill: palette.selected,
    stroke: ruled(palette.paper, 1.4),
  };
  return [stroked([[x, scale.y(0) - 10, x, y]], ruled(palette.selected, 2.2)), dot];
}

/** Depth between the two places either side; null in a gap or past the end. */
export function depthAt(places: readonly SectionPlace[], lineOutM: number): number | null {
  const after = places.findIndex((place) => place.lineOutM >= lineOutM);
  const b = places[after];
  if (!b) return null;
  const a = places[after - 1] ?? b;
  if (a.depthM === null || b.depthM === null) return b.lineOutM === lineOutM ? b.depthM : null;
  const share = b.lineOutM > a.lineOutM ? (lineOutM - a.lineOutM) / (b.lineOutM - a.lineOutM) : 1;
  return a.depthM + (b.depthM - a.depthM) * share;
}
