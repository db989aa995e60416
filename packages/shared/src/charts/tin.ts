import Delaunator from 'delaunator';
import { emptyGrid } from './grid';
import type { Grid, GridFrame } from './grid';
import type { SurfaceTriangles } from './hypsography';
import type { SamplePoints, Targets } from './sample-points';
import type { Point } from '../geometry/plane';

/** Delaunay triangulation of the samples: corners three by three, clockwise as seen with north up. */
export type Tin = {
  samples: SamplePoints;
  corners: Uint32Array; // sample numbers, length 3 × triangles
  halfEdges: Int32Array; // the twin of each corner's edge, −1 on the hull
};

export function triangulate(samples: SamplePoints): Tin {
  const count = samples.xM.length;
  const coordinates = new Float64Array(2 * count);
  for (let i = 0; i < count; i++) {
    coordinates[2 * i] = samples.xM[i]!;
    coordinates[2 * i + 1] = samples.yM[i]!;
  }
  const { triangles, halfedges } = new Delaunator(coordinates);
  if (triangles.length === 0)
    throw new RangeError('At least three samples, not all on one line, are needed for a surface.');
  return { samples, corners: Uint32Array.from(triangles), halfEdges: Int32Array.from(halfedges) };
}

/** Linear interpolation at each target, metres; NaN outside the samples' hull. Walks from the last target's triangle. */
export function interpolateTin(tin: Tin, targets: Targets): Float64Array {
  const valuesM = new Float64Array(targets.xM.length);
  let triangle = 0;
  for (let t = 0; t < valuesM.length; t++) {
    const x = targets.xM[t]!;
    const y = targets.yM[t]!;
    const found = walkTo(tin, triangle, { x, y });
    valuesM[t] = found < 0 ? Number.NaN : planeAt(tin, found, { x, y });
    if (found >= 0) triangle = found;
  }
  return valuesM;
}

type Place = { x: number; y: number };

function planeAt({ samples, corners }: Tin, triangle: number, { x, y }: Place): number {
  const { xM, yM, valueM } = samples;
  const a = corners[3 * triangle]!;
  const b = corners[3 * triangle + 1]!;
  const c = corners[3 * triangle + 2]!;
  const twice = (xM[b]! - xM[a]!) * (yM[c]! - yM[a]!) - (xM[c]! - xM[a]!) * (yM[b]! - yM[a]!);
  const u = ((x - xM[a]!) * (yM[c]! - yM[a]!) - (xM[c]! - xM[a]!) * (y - yM[a]!)) / twice;
  const v = ((xM[b]! - xM[a]!) * (y - yM[a]!) - (x - xM[a]!) * (yM[b]! - yM[a]!)) / twice;
  return valueM[a]! + u * (valueM[b]! - valueM[a]!) + v * (valueM[c]! - valueM[a]!);
}

/** Triangle that holds the place, or −1 outside the hull. Crosses the edge the place lies furthest beyond, each step. */
function walkTo({ samples, corners, halfEdges }: Tin, from: number, { x, y }: Place): number {
  const { xM, yM } = samples;
  let triangle = from;
  for (let step = 0; step <= corners.length; step++) {
    let worst = 1e-12;
    let through = -1;
    for (let e = 3 * triangle; e < 3 * triangle + 3; e++) {
      const a = corners[e]!;
      const b = corners[e % 3 === 2 ? e - 2 : e + 1]!;
      const ex = xM[b]! - xM[a]!;
      const ey = yM[b]! - yM[a]!;
      const beyond = (ex * (y - yM[a]!) - ey * (x - xM[a]!)) / Math.hypot(ex, ey);
      // Delaunator's triangles are clockwise with y up, so a place outside an edge lies on its left.
      if (beyond > worst) {
        worst = beyond;
        through = e;
      }
    }
    if (through < 0) return triangle;
    const twin = halfEdges[through]!;
    if (twin < 0) return -1;
    triangle = Math.floor(twin / 3);
  }
  return -1;
}

/** Triangles whose middle the test keeps, as corner depths and plane areas, for area and volume. */
export function tinTriangles({ samples, corners }: Tin, keeps: (middle: Point) => boolean): SurfaceTriangles {
  const { xM, yM, valueM } = samples;
  const depths: number[] = [];
  const areas: number[] = [];
  for (let t = 0; t < corners.length; t += 3) {
    const a = corners[t]!;
    const b = corners[t + 1]!;
    const c = corners[t + 2]!;
    const middle = { xM: (xM[a]! + xM[b]! + xM[c]!) / 3, yM: (yM[a]! + yM[b]! + yM[c]!) / 3 };
    if (!keeps(middle)) continue;
    depths.push(valueM[a]!, valueM[b]!, valueM[c]!);
    areas.push(Math.abs((xM[b]! - xM[a]!) * (yM[c]! - yM[a]!) - (xM[c]! - xM[a]!) * (yM[b]! - yM[a]!)) / 2);
  }
  return { depthsM: Float64Array.from(depths), areasM2: Float64Array.from(areas) };
}

/** Linear surface over a grid, triangle by triangle along the grid's rows; NaN outside the samples' hull. */
export function tinGrid({ samples, corners }: Tin, frame: GridFrame): Grid {
  const grid = emptyGrid(frame);
  const { xM, yM, valueM } = samples;
  const { columns, rows, cellM, originM } = frame;
  const { values } = grid;
  for (let t = 0; t < corners.length; t += 3) {
    const a = corners[t]!;
    const b = corners[t + 1]!;
    const c = corners[t + 2]!;
    // In cells from the south-west corner, so that rows and columns are whole numbers.
    const ax = (xM[a]! - originM.xM) / cellM;
    const ay = (yM[a]! - originM.yM) / cellM;
    const bx = (xM[b]! - originM.xM) / cellM;
    const by = (yM[b]! - originM.yM) / cellM;
    const cx = (xM[c]! - originM.xM) / cellM;
    const cy = (yM[c]! - originM.yM) / cellM;
    const twice = (bx - ax) * (cy - ay) - (cx - ax) * (by - ay);
    if (twice === 0) continue;
    const dx = ((valueM[b]! - valueM[a]!) * (cy - ay) - (valueM[c]! - valueM[a]!) * (by - ay)) / twice;
    const dy = ((valueM[c]! - valueM[a]!) * (bx - ax) - (valueM[b]! - valueM[a]!) * (cx - ax)) / twice;
    const low = Math.max(0, Math.ceil(Math.min(ay, by, cy) - 1e-9));
    const high = Math.min(rows - 1, Math.floor(Math.max(ay, by, cy) + 1e-9));
    for (let row = low; row <= high; row++) {
      let west = Infinity;
      let east = -Infinity;
      for (let side = 0; side < 3; side++) {
        const px = side === 0 ? ax : side === 1 ? bx : cx;
        const py = side === 0 ? ay : side === 1 ? by : cy;
        const qx = side === 0 ? bx : side === 1 ? cx : ax;
        const qy = side === 0 ? by : side === 1 ? cy : ay;
        if (row < Math.min(py, qy) - 1e-9 || row > Math.max(py, qy) + 1e-9) continue;
        const share = py === qy ? 0 : Math.min(1, Math.max(0, (row - py) / (qy - py)));
        const x = px + share * (qx - px);
        west = Math.min(west, x, py === qy ? qx : x);
        east = Math.max(east, x, py === qy ? qx : x);
      }
      const first = Math.max(0, Math.ceil(west - 1e-9));
      const last = Math.min(columns - 1, Math.floor(east + 1e-9));
      let value = valueM[a]! + dy * (row - ay) + dx * (first - ax);
      for (let p = row * columns + first, end = row * columns + last; p <= end; p++, value += dx)
        values[p] = value;
    }
  }
  return grid;
}
