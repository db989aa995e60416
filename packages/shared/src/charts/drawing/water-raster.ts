import { ringsOf, sidesOf, type Outline } from '../../geometry/polygon';
import { columnXM, rowYM, type GridFrame } from '../grid';

/** Which cells' centres lie on the water, 1 or 0, row-major; one scan line a row, even-odd over shore and islands. */
export function waterRaster(frame: GridFrame, outline: Outline): Uint8Array {
  const { columns, rows, cellM, originM } = frame;
  const water = new Uint8Array(columns * rows);
  const sides = ringsOf(outline).flatMap((ring) => [...sidesOf(ring)]);
  for (let row = 0; row < rows; row++) {
    const yM = rowYM(frame, row);
    const crossings: number[] = [];
    for (const [a, b] of sides) {
      if (a.yM > yM !== b.yM > yM) {
        crossings.push(a.xM + ((yM - a.yM) / (b.yM - a.yM)) * (b.xM - a.xM));
      }
    }
    crossings.sort((a, b) => a - b);
    for (let i = 0; i + 1 < crossings.length; i += 2) {
      const from = Math.max(0, Math.ceil((crossings[i]! - originM.xM) / cellM));
      for (let column = from; column < columns && columnXM(frame, column) < crossings[i + 1]!; column++) {
        water[row * columns + column] = 1;
      }
    }
  }
  return water;
}

/** Rows × columns of numbers, row-major. */
export type Field = { values: Float64Array; columns: number; rows: number };

/** Every NaN beside a number takes the mean of its numbers, once round by once round, `rounds` cells out. */
export function spreadInto(field: Field, rounds: number): void {
  const { values, columns, rows } = field;
  let edge: number[] = [];
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) edge.push(i);
  for (let round = 0; round < rounds && edge.length; round++) {
    const found: [number, number][] = [];
    const left: number[] = [];
    for (const cell of edge) {
      const mean = meanBeside(values, cell, { columns, rows });
      if (Number.isNaN(mean)) left.push(cell);
      else found.push([cell, mean]);
    }
    for (const [cell, mean] of found) values[cell] = mean;
    edge = left;
  }
}

function meanBeside(values: Float64Array, cell: number, { columns, rows }: Omit<Field, 'values'>): number {
  const column = cell % columns;
  const row = (cell - column) / columns;
  let sum = 0;
  let count = 0;
  const add = (value: number) => {
    if (Number.isNaN(value)) return;
    sum += value;
    count++;
  };
  if (column > 0) add(values[cell - 1]!);
  if (column < columns - 1) add(values[cell + 1]!);
  if (row > 0) add(values[cell - columns]!);
  if (row < rows - 1) add(values[cell + columns]!);
  return count ? sum / count : Number.NaN;
}

/** The field smoothed by a 3 × 3 mean, edges repeated, `times` over. */
export function softened(field: Field, times: number): Field {
  const { columns, rows } = field;
  let values = field.values;
  for (let time = 0; time < times; time++) values = across(down(values, columns, rows), columns, rows);
  return { values, columns, rows };
}

function across(values: Float64Array, columns: number, rows: number): Float64Array {
  const out = new Float64Array(values.length);
  for (let row = 0, i = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++, i++) {
      const west = column > 0 ? values[i - 1]! : values[i]!;
      const east = column < columns - 1 ? values[i + 1]! : values[i]!;
      out[i] = (west + values[i]! + east) / 3;
    }
  }
  return out;
}

function down(values: Float64Array, columns: number, rows: number): Float64Array {
  const out = new Float64Array(values.length);
  for (let row = 0, i = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++, i++) {
      const south = row > 0 ? values[i - columns]! : values[i]!;
      const north = row < rows - 1 ? values[i + columns]! : values[i]!;
      out[i] = (south + values[i]! + north) / 3;
    }
  }
  return out;
}

/** Value at a place by bilinear interpolation between cell centres; NaN outside the frame. */
export function valueAt(grid: GridFrame & { values: Float64Array }, xM: number, yM: number): number {
  const column = (xM - grid.originM.xM) / grid.cellM;
  const row = (yM - grid.originM.yM) / grid.cellM;
  const c = Math.floor(column);
  const r = Math.floor(row);
  if (c < 0 || r < 0 || c >= grid.columns - 1 || r >= grid.rows - 1) return Number.NaN;
  const i = r * grid.columns + c;
  const fx = column - c;
  const fy = row - r;
  const south = grid.values[i]! * (1 - fx) + grid.values[i + 1]! * fx;
  const north = grid.values[i + grid.columns]! * (1 - fx) + grid.values[i + grid.columns + 1]! * fx;
  return south * (1 - fy) + north * fy;
}
