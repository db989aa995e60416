import type { ChartView } from '@mereward/shared/charts/contract';
import { isobathFigure } from '@mereward/shared/charts/depth-words';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import { chartParts } from '@mereward/shared/charts/drawing/chart-parts';
import { placeMarks } from '@mereward/shared/charts/drawing/place-marks';
import { drawMap, farMarks, type MapParts } from '@mereward/shared/charts/drawing/draw-map';
import { northMarks, scaleBarMarks } from '@mereward/shared/charts/drawing/furniture';
import { stepsOf, type Page } from '@mereward/shared/charts/drawing/page';
import { palettes, type Palette } from '@mereward/shared/charts/drawing/palette';
import { swatchPage, unsurveyedSwatch } from '@mereward/shared/charts/drawing/swatch';
import { trueScale, type TrueScale } from '@mereward/shared/charts/drawing/true-scale';
import { toPage } from '@mereward/shared/charts/drawing/view';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';
import {
  scaleLine,
  sheetCaution,
  sheetFoot,
  sheetHead,
  sheetKey,
  versionWords,
  type SheetPeople,
} from './chart-sheet-words';
import { writePdf, type Doc } from '../../pdf/pdf-document';
import { paintSteps } from './pdf-steps';

export type PaperSize = 'a3' | 'a4';

export type ChartSheet = {
  chart: ChartView;
  people: SheetPeople | null; // null: not told on this copy
  printedOn: string;
  printedAt: Date;
  paper: PaperSize;
};

/** ISO 216, points, upright. */
const PAPER_PT = { a4: [595.28, 841.89], a3: [841.89, 1190.55] } as const;
const EDGE = 30; // most printers leave a centimetre
/** Px of the drawing to a point of the paper: letters of 13 px come out at 7.8 pt. */
const PX_A_POINT = 5 / 3;
const HEAD = 56;
const GAP = 8;
const INK = '#000000';

/** Black on white without any tint: lines, patterns and figures alone carry the depth. */
const INK_ONLY: Palette = {
  ...palettes.print,
  ramp: { shallowLightness: 1, deepLightness: 1, chromaShare: 0 },
};

type Layout = { size: [number, number]; footTop: number; room: Room; drawn: TrueScale };
type Room = { x: number; y: number; width: number; height: number };

/** A lake's chart on A3 or A4, upright or lying as its water does, drawn true to a round scale. */
export async function drawChartSheet(sheet: ChartSheet): Promise<Buffer> {
  const { chart, printedAt } = sheet;
  const parts = chartParts(chart, {
    raisedM: 0, // a print outlives the day's level
    stepM: chart.contourStepM,
    shown: { depth: true, bottom: true, soundings: true },
  });
  const layout = await layoutOf(sheet, parts);
  const options: PDFKit.PDFDocumentOptions = {
    size: layout.size,
    margin: EDGE,
    info: {
      Title: `${chart.lakeName}, ${versionWords(chart)}`,
      Subject: `Scale 1:${layout.drawn.scale} on ${sheet.paper.toUpperCase()}`,
      Author: chart.fisheryName,
      CreationDate: printedAt,
    },
  };
  return writePdf(options, (doc) => {
    drawHead(doc, chart, layout);
    drawChartMap(doc, { chart, parts }, layout);
    drawFoot(doc, { sheet, parts }, layout);
  });
}

/** Upright or lying, whichever shows the water at the larger scale; lying when both do. */
async function layoutOf(sheet: ChartSheet, parts: MapParts): Promise<Layout> {
  const [short, long] = PAPER_PT[sheet.paper];
  const lying = await layoutOn([long, short], sheet, parts);
  const upright = await layoutOn([short, long], sheet, parts);
  return upright.drawn.scale < lying.drawn.scale ? upright : lying;
}

/** How a sheet of that size is shared out; its words are measured on one that is thrown away. */
async function layoutOn(size: [number, number], sheet: ChartSheet, parts: MapParts): Promise<Layout> {
  const width = size[0] - 2 * EDGE;
  let footHeight = 0;
  await writePdf({ size, margin: EDGE }, (doc) => {
    footHeight = footOf({ doc, left: EDGE, width, draw: false }, { sheet, parts }, 25_000);
  });
  const footTop = size[1] - EDGE - footHeight;
  const room = { x: EDGE, y: EDGE + HEAD, width, height: footTop - GAP - EDGE - HEAD };
  return { size, footTop, room, drawn: trueScale(parts.ground.water, roomInPx(room)) };
}

const roomInPx = ({ width, height }: Room) => ({
  widthPx: width * PX_A_POINT,
  heightPx: height * PX_A_POINT,
  besidePx: 46, // pegs' numbers stand outside the water
  abovePx: 30,
  pxPerPoint: PX_A_POINT,
});

function drawHead(doc: Doc, chart: ChartView, { size: [width] }: Layout): void {
  const half = (width - 2 * EDGE) / 2;
  doc.fillColor(INK).font('regular').fontSize(10).text(chart.fisheryName, EDGE, EDGE, { width: half });
  doc.font('bold').fontSize(24).text(chart.lakeName, { width: half, lineGap: -4 });
  const right = { width: half, align: 'right' } as const;
  doc
    .font('bold')
    .fontSize(12)
    .text(versionWords(chart), EDGE + half, EDGE, right);
  doc.font('regular').fontSize(8.5);
  for (const line of sheetHead(chart)) doc.text(line, right);
}

type Drawn = { chart: ChartView; parts: MapParts };

function drawChartMap(doc: Doc, { chart, parts }: Drawn, { room, drawn: { view } }: Layout): void {
  const choice = {
    palette: INK_ONLY,
    view,
    depthWords: (depthM: number) => isobathFigure(depthM, chart.contourStepM, 'm'),
    selectedPegId: null,
    selectedSpotId: null,
  };
  const marks = chart.marks.filter(({ xM, yM }) => {
    const { x, y } = toPage(view, xM, yM);
    return x > 20 && x < view.widthPx - 20 && y > 20 && y < view.heightPx - 20;
  });
  const page: Page = {
    widthPx: view.widthPx,
    heightPx: view.heightPx,
    ground: null,
    layers: [
      {
        view,
        atPx: { x: 0, y: 0 },
        marks: [
          ...drawMap(parts, choice),
          ...placeMarks(chart.places ?? [], INK_ONLY, view),
          ...farMarks(marks, INK_ONLY),
        ],
      },
      { marks: northMarks(view, { x: view.widthPx - 26, y: 40 }, INK_ONLY) },
    ],
  };
  inPx(doc, room, () => {
    paintSteps(doc, stepsOf(page));
    doc.lineWidth(1).rect(0, 0, view.widthPx, view.heightPx).stroke(INK);
  });
}

function inPx(doc: Doc, { x, y }: { x: number; y: number }, draw: () => void): void {
  doc.save();
  doc.translate(x, y).scale(1 / PX_A_POINT);
  draw();
  doc.restore();
}

type Foot = { sheet: ChartSheet; parts: MapParts };

function drawFoot(doc: Doc, foot: Foot, { size: [width], footTop, drawn }: Layout): void {
  const bar = { x: 0.5, y: 4, mostPx: (width - 2 * EDGE) * PX_A_POINT * 0.5 };
  const sticks = { stickSpacingM: USUAL_SPACING_M, sticks: stickWords(USUAL_SPACING_M) };
  inPx(doc, { x: EDGE, y: footTop }, () =>
    paintSteps(
      doc,
      stepsOf({
        ...drawn.view,
        ground: null,
        layers: [{ marks: scaleBarMarks(drawn.view, { ...bar, ...sticks }, INK_ONLY) }],
      }),
    ),
  );
  doc.y = footTop;
  footOf({ doc, left: EDGE, width: width - 2 * EDGE, draw: true }, foot, drawn.scale);
}

type Column = { doc: Doc; left: number; width: number; draw: boolean };

const BAR_HEIGHT = 12;
const SWATCH_STEP = 96;
const SWATCH_HEIGHT = 20;

/** Everything below the scale bar, drawn at the document's height or only measured; answers how high it is. */
function footOf({ doc, left, width, draw }: Column, { sheet, parts }: Foot, scale: number): number {
  const top = draw ? doc.y : 0;
  let y = top + BAR_HEIGHT;
  const line = (words: string, font: 'bold' | 'regular'): void => {
    doc.font(font).fontSize(8).fillColor(INK);
    const height = doc.heightOfString(words, { width });
    if (draw) doc.text(words, left, y, { width });
    y += height + 2;
  };
  line(scaleLine(scale, sheet.paper.toUpperCase()), 'regular');
  y += drawSwatches({ doc, left, width, draw }, parts, y);
  line(sheetKey(sheet.chart).join(' '), 'regular');
  line(sheetCaution(sheet.chart), 'bold');
  line(sheetFoot(sheet), 'regular');
  return y - top;
}

type Patch = { page: Page; words: string };

/** Every pattern that stands on the map, the ruled paper of water nobody surveyed last. */
function patchesOf({ bottom, ground }: MapParts): Patch[] {
  const kinds = bottom.map(({ kind }): Patch => {
    const { words, abbreviation } = BOTTOM_GLYPHS[kind];
    const name = abbreviation === words ? words : `${words} (${abbreviation})`;
    return { page: swatchPage(kind, INK_ONLY), words: name };
  });
  if (ground.unsurveyed.length === 0) return kinds;
  return [...kinds, { page: unsurveyedSwatch(INK_ONLY), words: 'not surveyed' }];
}

/** The patterns with their names. Answers how high they are. */
function drawSwatches({ doc, left, width, draw }: Column, parts: MapParts, top: number): number {
  const patches = patchesOf(parts);
  const across = Math.max(1, Math.floor(width / SWATCH_STEP));
  for (const [i, { page, words }] of draw ? patches.entries() : []) {
    const [x, y] = [left + (i % across) * SWATCH_STEP, top + Math.floor(i / across) * SWATCH_HEIGHT];
    inPx(doc, { x, y }, () => {
      paintSteps(doc, stepsOf(page));
      doc.lineWidth(0.8).rect(0, 0, page.widthPx, page.heightPx).stroke(INK);
    });
    doc
      .font('regular')
      .fontSize(8)
      .fillColor(INK)
      .text(words, x + 30, y + 3, { width: SWATCH_STEP - 32, lineBreak: false });
  }
  return patches.length === 0 ? 0 : Math.ceil(patches.length / across) * SWATCH_HEIGHT + 2;
}
