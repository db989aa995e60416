import { columnXM, rowYM, type GridFrame } from './grid';

/** Size and lie of a region of cells, metres. */
export type RegionShape = {
  xM: number; // middle
  yM: number;
  areaM2: number;
  lengthM: number; // end to end along its axis
  widthM: number; // mean, so that length × width is the area
  axisDeg: number | null; // 0 ≤ axis < 180, clockwise from north; null when it is hardly longer than wide
};

/** Less long than this many times its width, a region has no axis to speak of. */
const LEAST_ELONGATION = 1.4;

/** The axis is that of least inertia of its cells; a region bent round a bank is measured straight from end to end. */
export function regionShape(nodes: readonly number[], frame: GridFrame): RegionShape {
  const x = nodes.map((node) => columnXM(frame, node % frame.columns));
  const y = nodes.map((node) => rowYM(frame, Math.floor(node / frame.columns)));
  const mean = (values: readonly number[]) => values.reduce((sum, v) => sum + v, 0) / values.length;
  const [mx, my] = [mean(x), mean(y)];
  let [xx, xy, yy] = [0, 0, 0];
  x.forEach((px, i) => {
    const [dx, dy] = [px - mx, y[i]! - my];
    xx += dx * dx;
    xy += dx * dy;
    yy += dy * dy;
  });
  const angle = 0.5 * Math.atan2(2 * xy, xx - yy); // of the long axis, from east
  const span = (c: number, s: number): number => {
    let [least, most] = [Infinity, -Infinity];
    x.forEach((px, i) => {
      const along = px * c + y[i]! * s;
      least = Math.min(least, along);
      most = Math.max(most, along);
    });
    return most - least + frame.cellM;
  };
  const areaM2 = nodes.length * frame.cellM ** 2;
  const lengthM = span(Math.cos(angle), Math.sin(angle));
  const widthM = areaM2 / lengthM;
  const degrees = 90 - (angle * 180) / Math.PI;
  const axisDeg = lengthM < LEAST_ELONGATION * widthM ? null : ((degrees % 180) + 180) % 180;
  return { xM: mx, yM: my, areaM2, lengthM, widthM, axisDeg };
}

/** The nodes of each region, by the region's number. */
export function nodesByRegion(of: Int32Array, count: number): number[][] {
  const nodes: number[][] = Array.from({ length: count }, () => []);
  of.forEach((region, node) => {
    if (region >= 0) nodes[region]!.push(node);
  });
  return nodes;
}
