import type { SectionPoint } from './contract';

/** The point of a section that a count of line reaches; between two, by the straight line. */
export function pointAtLineOut(points: readonly SectionPoint[], lineOutM: number): SectionPoint | null {
  const after = points.findIndex((point) => point.lineOutM >= lineOutM);
  const b = points[after];
  if (!b) return null;
  const a = points[after - 1];
  if (!a || b.lineOutM === a.lineOutM) return b;
  const share = (lineOutM - a.lineOutM) / (b.lineOutM - a.lineOutM);
  const between = (from: number | null, to: number | null): number | null =>
    from === null || to === null ? null : from + (to - from) * share;
  const near = share < 0.5 ? a : b;
  return {
    rangeM: a.rangeM + (b.rangeM - a.rangeM) * share,
    lineOutM,
    depthM: between(a.depthM, b.depthM),
    sigmaM: between(a.sigmaM, b.sigmaM),
    bottom: near.bottom,
  };
}

/** Ground range of every whole wrap that the section reaches. */
export function wrapRangesM(points: readonly SectionPoint[], stickSpacingM: number): number[] {
  const ranges: number[] = [];
  for (let wraps = 1; ; wraps++) {
    const point = pointAtLineOut(points, wraps * stickSpacingM);
    if (!point) return ranges;
    ranges.push(point.rangeM);
  }
}
