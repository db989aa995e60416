import { Cover, Substrate } from '../../surveys/contract';
import { UNKNOWN_CLASS, type ClassGrid } from '../bottom-map';
import type { GridFrame } from '../grid';
import { deeperRegions } from '../isobaths';
import { BOTTOM_GLYPHS, type Patterned } from './bottom-glyphs';
import type { Line } from './mark';
import { softened, valueAt } from './water-raster';

/** Where one kind of bottom lies, soft-edged, and how sure the chart is of it. */
export type BottomArea = {
  kind: Patterned;
  edges: Line[];
  soft: GridFrame & { values: Float64Array }; // share of the kind round a cell, 0–1
  confidence: Float64Array;
  labels: { xM: number; yM: number; roomM: number }[];
};

/** Half the cells round a place are of the kind: there its edge runs. */
export const EDGE_SHARE = 0.5;
const SOFTENED_TIMES = 3;
const SNAG_SHARE = 0.8;

/** Every patterned area of the bottom's two maps; readied once, whatever the scale. */
export function bottomAreas(substrate: ClassGrid | null, cover: ClassGrid | null): BottomArea[] {
  const kinds = [...areasOf(substrate, Substrate.options), ...areasOf(cover, Cover.options)];
  return kinds.filter((area) => area !== null);
}

function areasOf(grid: ClassGrid | null, names: readonly (Substrate | Cover)[]): (BottomArea | null)[] {
  if (!grid) return [];
  return names.map((name, code) =>
    name in BOTTOM_GLYPHS && isPatterned(name) ? areaOf(grid, code, name) : null,
  );
}

const isPatterned = (name: Substrate | Cover): name is Patterned => name !== 'clear';

function areaOf(grid: ClassGrid, code: number, kind: Patterned): BottomArea | null {
  if (code === UNKNOWN_CLASS || !grid.classes.includes(code)) return null;
  const { columns, rows, cellM, originM } = grid;
  const own = Float64Array.from(grid.classes, (cell) => (cell === code ? 1 : 0));
  const soft = {
    columns,
    rows,
    cellM,
    originM,
    values: softened({ values: own, columns, rows }, SOFTENED_TIMES).values,
  };
  if (kind === 'snag')
    // a thing, however few its cells: softening must not wipe it off
    soft.values = soft.values.map((share, cell) => (own[cell] === 1 ? Math.max(share, SNAG_SHARE) : share));
  return {
    kind,
    edges: deeperRegions(soft, [EDGE_SHARE])[1]?.lines ?? [],
    soft,
    confidence: grid.confidence,
    labels: labelPlaces(soft),
  };
}

/** Is the kind at this place, and how surely? 0 where it isn't. */
export function confidenceAt(area: BottomArea, xM: number, yM: number): number {
  const share = valueAt(area.soft, xM, yM);
  if (Number.isNaN(share) || share < EDGE_SHARE) return 0;
  const { columns, rows, cellM, originM } = area.soft;
  const column = Math.min(columns - 1, Math.max(0, Math.round((xM - originM.xM) / cellM)));
  const row = Math.min(rows - 1, Math.max(0, Math.round((yM - originM.yM) / cellM)));
  const own = area.confidence[row * columns + column]!;
  return own > 0 ? own : share;
}

/** In every separate patch the cell farthest from its edge, by steps from cell to cell. */
function labelPlaces({ values, columns, rows, cellM, originM }: BottomArea['soft']): BottomArea['labels'] {
  const steps = stepsFromEdge(values, columns, rows);
  const seen = new Uint8Array(values.length);
  const places: BottomArea['labels'] = [];
  for (let start = 0; start < values.length; start++) {
    if (seen[start] || steps[start] === 0) continue;
    const best = deepestOf(steps, seen, { start, columns });
    places.push({
      xM: originM.xM + (best % columns) * cellM,
      yM: originM.yM + Math.floor(best / columns) * cellM,
      roomM: steps[best]! * cellM,
    });
  }
  return places.sort((a, b) => b.roomM - a.roomM);
}

/** City-block steps to the nearest cell outside, by two sweeps; 0 outside. */
function stepsFromEdge(values: Float64Array, columns: number, rows: number): Int32Array {
  const steps = Int32Array.from(values, (value) => (value >= EDGE_SHARE ? columns + rows : 0));
  const at = (column: number, row: number): number =>
    column < 0 || row < 0 || column >= columns || row >= rows ? 0 : steps[row * columns + column]!;
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const i = row * columns + column;
      if (steps[i]) steps[i] = Math.min(steps[i]!, 1 + Math.min(at(column - 1, row), at(column, row - 1)));
    }
  }
  for (let row = rows - 1; row >= 0; row--) {
    for (let column = columns - 1; column >= 0; column--) {
      const i = row * columns + column;
      if (steps[i]) steps[i] = Math.min(steps[i]!, 1 + Math.min(at(column + 1, row), at(column, row + 1)));
    }
  }
  return steps;
}

function deepestOf(
  steps: Int32Array,
  seen: Uint8Array,
  { start, columns }: { start: number; columns: number },
): number {
  const waiting = [start];
  seen[start] = 1;
  let best = start;
  for (let cell = waiting.pop(); cell !== undefined; cell = waiting.pop()) {
    if (steps[cell]! > steps[best]!) best = cell;
    for (const beside of [cell - 1, cell + 1, cell - columns, cell + columns]) {
      if (beside >= 0 && beside < steps.length && !seen[beside] && steps[beside]! > 0) {
        seen[beside] = 1;
        waiting.push(beside);
      }
    }
  }
  return best;
}
