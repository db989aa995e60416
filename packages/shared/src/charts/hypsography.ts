import type { Grid } from './grid';
import { isSurveyed } from './grid';

/** Area at or deeper than a depth (m²) and the volume of water below it (m³). */
export type HypsographicStep = { depthM: number; areaM2: number; volumeM3: number };

/** Corner depths of triangles of a surface, three a triangle, and each triangle's area in the plane. */
export type SurfaceTriangles = { depthsM: Float64Array; areasM2: Float64Array };

/**
 * Every grid cell with four surveyed corners as four triangles about its middle, whose depth is the mean of the corners.
 */
export function gridTriangles({ values, columns, rows, cellM }: Grid): SurfaceTriangles {
  const whole: number[] = [];
  for (let row = 0; row < rows - 1; row++) {
    for (let i = row * columns, last = i + columns - 1; i < last; i++) {
      // One unsurveyed corner makes the sum unsurveyed.
      if (isSurveyed(values[i]! + values[i + 1]! + values[i + columns]! + values[i + columns + 1]!))
        whole.push(i);
    }
  }
  const depthsM = new Float64Array(whole.length * 12);
  whole.forEach((i, cell) => {
    const corners = [values[i]!, values[i + 1]!, values[i + columns + 1]!, values[i + columns]!];
    const middle = (corners[0]! + corners[1]! + corners[2]! + corners[3]!) / 4;
    for (let side = 0; side < 4; side++) {
      depthsM[cell * 12 + side * 3] = corners[side]!;
      depthsM[cell * 12 + side * 3 + 1] = corners[(side + 1) % 4]!;
      depthsM[cell * 12 + side * 3 + 2] = middle;
    }
  });
  return { depthsM, areasM2: new Float64Array(whole.length * 4).fill((cellM * cellM) / 4) };
}

/**
 * Exact area and volume of a piecewise linear surface below each depth. Parts above the depth asked for (dry parts, at
 * depth 0) count for nothing.
 */
export function hypsography(
  { depthsM, areasM2 }: SurfaceTriangles,
  depths: readonly number[],
): HypsographicStep[] {
  const areas = new Float64Array(depths.length);
  const volumes = new Float64Array(depths.length);
  for (let t = 0; t < areasM2.length; t++) {
    const a = depthsM[3 * t]!;
    const b = depthsM[3 * t + 1]!;
    const c = depthsM[3 * t + 2]!;
    const deep = Math.max(a, b, c);
    const shallow = Math.min(a, b, c);
    const middle = a + b + c - deep - shallow;
    const area = areasM2[t]!;
    for (let k = 0; k < depths.length; k++) {
      const level = depths[k]!;
      if (deep <= level) continue;
      if (shallow >= level) {
        areas[k] = areas[k]! + area;
        volumes[k] = volumes[k]! + area * ((a + b + c) / 3 - level);
        continue;
      }
      if (middle <= level) {
        // Only one corner is deeper: a triangle similar about that corner.
        const tip = deep - level;
        const share = (tip * tip) / ((deep - middle) * (deep - shallow));
        areas[k] = areas[k]! + area * share;
        volumes[k] = volumes[k]! + (area * share * tip) / 3;
      } else {
        // Two corners are deeper: the whole less the triangle about the shallow corner.
        const tip = level - shallow;
        const share = (tip * tip) / ((middle - shallow) * (deep - shallow));
        areas[k] = areas[k]! + area * (1 - share);
        volumes[k] = volumes[k]! + area * ((a + b + c) / 3 - level + (share * tip) / 3);
      }
    }
  }
  return depths.map((depthM, k) => ({ depthM, areaM2: areas[k]!, volumeM3: volumes[k]! }));
}

/** Volume of water between two depths, m³, upper < lower. */
export function volumeBetweenM3(triangles: SurfaceTriangles, upperM: number, lowerM: number): number {
  const [upper, lower] = hypsography(triangles, [upperM, lowerM]);
  return upper!.volumeM3 - lower!.volumeM3;
}

/** Volume from a table of depth and area by frustums, V = h/3 (A₁ + A₂ + √(A₁A₂)), m³. Source: Wetzel, Limnology, 2001. */
export function frustumVolumeM3(table: readonly { depthM: number; areaM2: number }[]): number {
  let volumeM3 = 0;
  for (let i = 1; i < table.length; i++) {
    const { depthM: top, areaM2: upper } = table[i - 1]!;
    const { depthM: bottom, areaM2: lower } = table[i]!;
    if (bottom < top) throw new RangeError('The depths of the table must rise.');
    volumeM3 += ((bottom - top) / 3) * (upper + lower + Math.sqrt(upper * lower));
  }
  return volumeM3;
}

/** Shore length over that of a circle of the same area; 1 for a circle. Source: Hutchinson 1957. */
export function shorelineDevelopment(shoreLengthM: number, areaM2: number): number {
  return shoreLengthM / (2 * Math.sqrt(Math.PI * areaM2));
}

/** Three times mean over greatest depth; 1 for a cone. Source: Hutchinson 1957. */
export function volumeDevelopment(meanDepthM: number, greatestDepthM: number): number {
  return (3 * meanDepthM) / greatestDepthM;
}
