import type { ClassGrid } from '@mereward/shared/charts/bottom-map';
import { encodeClasses, encodeDepth, toBase64 } from '@mereward/shared/charts/chart-encoding';
import { gridAt, type ChartLayers } from '@mereward/shared/charts/chart-reading';
import type { ExtractGrid } from '@mereward/shared/charts/contract';
import { UNKNOWN_CLASS } from '@mereward/shared/charts/bottom-map';
import type { GridFrame } from '@mereward/shared/charts/grid';
import type { Box } from '@mereward/shared/charts/line-thinning';

/** Cells of the extract: the page is read on a bank with one bar of signal. */
const MOST_CELLS = 1500;

type Sees = { depth: boolean; bottom: boolean };

/** The chart before a peg on a coarse grid, in the layers this reader may see; null when that is none. */
export function extractGrid(layers: ChartLayers, box: Box, sees: Sees): ExtractGrid | null {
  if (!sees.depth && !sees.bottom) return null;
  const frame = coarseFrame(box, layers.depth.cellM);
  return {
    frame,
    depth: sees.depth ? toBase64(encodeDepth({ ...frame, values: depthsOn(layers, frame) })) : null,
    substrate: sees.bottom ? toBase64(encodeClasses(classesOn(layers.substrate, frame))) : null,
    cover: sees.bottom ? toBase64(encodeClasses(classesOn(layers.cover, frame))) : null,
  };
}

function coarseFrame(box: Box, finestM: number): GridFrame {
  const [acrossM, upM] = [box.eastM - box.westM, box.northM - box.southM];
  const cellM = Math.max(finestM, Math.ceil(Math.sqrt((acrossM * upM) / MOST_CELLS) * 20) / 20);
  return {
    columns: Math.floor(acrossM / cellM) + 1,
    rows: Math.floor(upM / cellM) + 1,
    cellM,
    originM: { xM: Math.round(box.westM * 100) / 100, yM: Math.round(box.southM * 100) / 100 },
  };
}

function placesOf({ columns, rows, cellM, originM }: GridFrame) {
  return Array.from({ length: columns * rows }, (_, i) => ({
    xM: originM.xM + (i % columns) * cellM,
    yM: originM.yM + Math.floor(i / columns) * cellM,
  }));
}

const depthsOn = (layers: ChartLayers, frame: GridFrame): Float64Array =>
  Float64Array.from(placesOf(frame), (place) => gridAt(layers.depth, place) ?? Number.NaN);

function classesOn(grid: ClassGrid, frame: GridFrame): ClassGrid {
  const places = placesOf(frame);
  const classes = new Uint8Array(places.length).fill(UNKNOWN_CLASS);
  const confidence = new Float64Array(places.length);
  places.forEach(({ xM, yM }, i) => {
    const column = Math.round((xM - grid.originM.xM) / grid.cellM);
    const row = Math.round((yM - grid.originM.yM) / grid.cellM);
    if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) return;
    const node = row * grid.columns + column;
    classes[i] = grid.classes[node] ?? UNKNOWN_CLASS;
    confidence[i] = grid.confidence[node] ?? 0;
  });
  return { ...frame, classes, confidence };
}
