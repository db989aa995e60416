import type { SpotView } from '@mereward/shared/charts/contract';
import type { DrawnCast } from '@mereward/shared/charts/drawing/cast-marks';
import { recastEllipse } from '@mereward/shared/charts/recast-ellipse';
import { distanceBetweenM, planeBearingDeg, type Point } from '@mereward/shared/geometry/point';
import { wrapRangesM } from './section-words';

/** The cast from a peg to one of its spots, for the map. */
export function spotCast(peg: Point, spot: SpotView, stickSpacingM: number): DrawnCast {
  const bearingDeg = planeBearingDeg(peg, spot);
  const rangeM = distanceBetweenM(peg, spot);
  return {
    from: peg,
    bearingDeg,
    rangeM,
    wrapRangesM: wrapRangesM(spot.section ?? [], stickSpacingM),
    ellipse: recastEllipse(bearingDeg, rangeM),
  };
}
