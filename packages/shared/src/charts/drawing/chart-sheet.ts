import { BOTTOM_GLYPHS } from './bottom-glyphs';
import { drawMap, farMarks, type MapParts } from './draw-map';
import { northMarks, scaleBarMarks } from './furniture';
import { filled, ruled, stroked, text, type Mark } from './mark';
import type { Layer, Page } from './page';
import type { Palette } from './palette';
import { placeMarks, type DrawnPlace } from './place-marks';
import { swatchPage } from './swatch';
import { bandsOf } from './tint';
import { bestFit, toPage, type View } from './view';

/** What is written round a chart on its sheet. Lines come ready in words. */
export type SheetWords = {
  lake: string;
  fishery: string;
  version: string; // "Chart 2027.1"
  surveyed: string; // "Surveyed 3 to 11 April 2027"
  level: string; // "Depths in metres below datum 0.62 m"
  unit: string; // "m"
  cautions: readonly string[];
};

export type SheetInput = {
  parts: MapParts;
  marks: readonly { code: string; xM: number; yM: number }[];
  places?: readonly DrawnPlace[] | undefined;
  words: SheetWords;
  depthWords: (depthM: number) => string;
  stickSpacingM: number;
  sticks: string;
};

export type SheetSize = { widthPx: number; heightPx: number };

const EDGE_PX = 40;
const HEAD_PX = 92;
const FOOT_PX = 198;

/** A lake's chart as a sheet to keep or print: title, map, key, scale in metres and wraps, north, datum, cautions. */
export function drawSheet(input: SheetInput, { widthPx, heightPx }: SheetSize, palette: Palette): Page {
  const mapSize = { widthPx: widthPx - 2 * EDGE_PX, heightPx: heightPx - HEAD_PX - FOOT_PX };
  const view = bestFit(input.parts.ground.water, { ...mapSize, marginPx: 44 });
  const choice = {
    palette,
    view,
    depthWords: input.depthWords,
    selectedPegId: null,
    selectedSpotId: null,
  };
  const map: Layer = {
    view,
    atPx: { x: EDGE_PX, y: HEAD_PX },
    marks: [
      ...drawMap(input.parts, choice),
      ...placeMarks(input.places ?? [], palette, view),
      ...farMarks(marksInView(input, view), palette),
    ],
  };
  const bar = {
    x: EDGE_PX,
    y: heightPx - FOOT_PX + 14,
    mostPx: widthPx / 5,
    stickSpacingM: input.stickSpacingM,
    sticks: input.sticks,
  };
  const round: Mark[] = [
    ...headMarks(input.words, widthPx, palette),
    ...northMarks(view, { x: widthPx - EDGE_PX - 16, y: HEAD_PX + 34 }, palette),
    ...scaleBarMarks(view, bar, palette),
    ...tintKey(input, { x: EDGE_PX, y: heightPx - FOOT_PX + 44 }, palette),
    ...cautionMarks(input.words, { x: EDGE_PX, y: heightPx - EDGE_PX - 22 }, palette),
  ];
  const key = bottomKey(input, { x: EDGE_PX, y: heightPx - FOOT_PX + 84 }, palette);
  return { widthPx, heightPx, ground: palette.paper, layers: [map, { marks: [...round, ...key] }] };
}

const MARK_ROOM_PX = 24;

/** Far-bank marks that stand on the sheet with their code. */
function marksInView({ marks }: SheetInput, view: View): SheetInput['marks'] {
  return marks.filter(({ xM, yM }) => {
    const { x, y } = toPage(view, xM, yM);
    const across = x > MARK_ROOM_PX && x < view.widthPx - MARK_ROOM_PX;
    return across && y > MARK_ROOM_PX && y < view.heightPx - MARK_ROOM_PX;
  });
}

function headMarks(words: SheetWords, widthPx: number, palette: Palette): Mark[] {
  const right = { x: widthPx - EDGE_PX, anchor: 'end' as const };
  const left = { x: EDGE_PX, anchor: 'start' as const };
  return [
    text({ ...left, words: words.fishery, y: 34, sizePx: 16, colour: palette.inkSoft }),
    text({ ...left, words: words.lake, y: 62, sizePx: 32, bold: true, colour: palette.ink }),
    text({ ...right, words: words.version, y: 34, sizePx: 18, bold: true, colour: palette.ink }),
    text({ ...right, words: words.surveyed, y: 56, sizePx: 15, colour: palette.ink }),
    text({ ...right, words: words.level, y: 76, sizePx: 15, colour: palette.ink }),
    stroked([[EDGE_PX, HEAD_PX - 4, widthPx - EDGE_PX, HEAD_PX - 4]], ruled(palette.rule, 1)),
  ];
}

const BAND_PX = 44;

function tintKey(
  { parts, depthWords, words }: SheetInput,
  at: { x: number; y: number },
  palette: Palette,
): Mark[] {
  if (!parts.ground.depth) return [];
  const bands = bandsOf(parts.ground.levelsM, palette.ramp);
  const boxes = bands.flatMap(({ fromM, tint }, i): Mark[] => {
    const x = at.x + i * BAND_PX;
    return [
      filled([[x, at.y, x + BAND_PX, at.y, x + BAND_PX, at.y + 12, x, at.y + 12]], tint),
      text({
        words: depthWords(fromM),
        x,
        y: at.y + 22,
        anchor: i ? 'middle' : 'start',
        colour: palette.inkSoft,
      }),
    ];
  });
  const end = at.x + bands.length * BAND_PX;
  const rim = [at.x, at.y, end, at.y, end, at.y + 12, at.x, at.y + 12];
  return [
    ...boxes,
    {
      kind: 'path',
      lines: [rim],
      closed: true,
      curved: false,
      fill: null,
      stroke: ruled(palette.inkSoft, 0.8),
    },
    text({ words: words.unit, x: end, y: at.y + 22, colour: palette.inkSoft }),
  ];
}

const SWATCH_STEP_PX = 158;

function bottomKey({ parts }: SheetInput, at: { x: number; y: number }, palette: Palette): Mark[] {
  return parts.bottom.flatMap(({ kind }, i): Mark[] => {
    const x = at.x + i * SWATCH_STEP_PX;
    const { words, abbreviation } = BOTTOM_GLYPHS[kind];
    const swatch = swatchPage(kind, palette).layers.flatMap((layer) => shifted(layer.marks, x, at.y));
    const name = abbreviation === words ? words : `${words} (${abbreviation})`;
    return [
      ...swatch,
      text({ words: name, x: x + 52, y: at.y + 13, anchor: 'start', sizePx: 14, colour: palette.ink }),
    ];
  });
}

/** Marks of a px plane moved right and down. */
function shifted(marks: readonly Mark[], right: number, down: number): Mark[] {
  const line = (points: ArrayLike<number>) =>
    Array.from(points, (value, i) => value + (i % 2 ? down : right));
  return marks.map((mark): Mark => {
    switch (mark.kind) {
      case 'path':
        return { ...mark, lines: mark.lines.map(line) };
      case 'glyphs':
        return { ...mark, at: line(mark.at) };
      case 'text':
        return { ...mark, x: mark.x + right, y: mark.y + down };
      case 'clip':
        return { ...mark, lines: mark.lines.map(line), marks: shifted(mark.marks, right, down) };
    }
  });
}

function cautionMarks({ cautions }: SheetWords, at: { x: number; y: number }, palette: Palette): Mark[] {
  return cautions.map((words, i) =>
    text({
      words,
      x: at.x,
      y: at.y + i * 20,
      anchor: 'start',
      sizePx: 14,
      bold: i === 0,
      colour: palette.ink,
    }),
  );
}
