import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import { readChart } from '@mereward/shared/charts/chart-reading';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import { pointAlong, type Point } from '@mereward/shared/geometry/point';

/** What lies straight out from a peg at one range. */
export type PegOutlook = { depthM: number | null; bottom: string | null };

/** Depth (at datum) and bottom so far straight out from a peg; null where nobody surveyed or it isn't this reader's. */
export function pegOutlook(
  layers: ChartLayers,
  peg: Point & { facingDeg: number },
  rangeM: number,
): PegOutlook {
  const { depthM, bottom } = readChart(layers, pointAlong(peg, peg.facingDeg, rangeM));
  return {
    depthM,
    bottom: bottom === null || bottom === 'clear' ? null : BOTTOM_GLYPHS[bottom].words,
  };
}
