import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import type { SectionPoint } from '@mereward/shared/charts/contract';

export { pointAtLineOut, wrapRangesM } from '@mereward/shared/charts/section-line';

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
