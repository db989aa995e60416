import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import type { SectionPoint } from '@mereward/shared/charts/contract';

/** A stretch of a section that reads as one: the same bottom, from one count of line to another. */
export type SectionStretch = {
  fromLineOutM: number;
  toLineOutM: number;
  shallowestM: number | null; // null: nobody surveyed it
  deepestM: number | null;
  bottom: string | null;
};

const bottomOf = ({ bottom }: SectionPoint): string | null =>
  bottom === null ? null : bottom === 'clear' ? 'clear bottom' : BOTTOM_GLYPHS[bottom].words;

/** The section as a list: what a screen reader says in place of the drawing, and what a table shows. */
export function sectionStretches(points: readonly SectionPoint[], raisedM: number): SectionStretch[] {
  const stretches: SectionStretch[] = [];
  for (const point of points) {
    const depthM = point.depthM === null ? null : point.depthM + raisedM;
    const bottom = depthM === null ? null : bottomOf(point);
    const last = stretches.at(-1);
    const same = last && last.bottom === bottom && (last.deepestM === null) === (depthM === null);
    if (!same) {
      if (last) last.toLineOutM = point.lineOutM;
      stretches.push({
        fromLineOutM: point.lineOutM,
        toLineOutM: point.lineOutM,
        shallowestM: depthM,
        deepestM: depthM,
        bottom,
      });
      continue;
    }
    last.toLineOutM = point.lineOutM;
    if (depthM === null) continue;
    last.shallowestM = Math.min(last.shallowestM ?? depthM, depthM);
    last.deepestM = Math.max(last.deepestM ?? depthM, depthM);
  }
  return stretches;
}

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
