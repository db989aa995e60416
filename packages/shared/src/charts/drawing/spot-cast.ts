import type { SpotView } from '../contract';
import type { DrawnCast } from './cast-marks';
import { recastEllipse } from '../recast-ellipse';
import { distanceBetweenM, planeBearingDeg, type Point } from '../../geometry/point';
import { wrapRangesM } from '../section-line';

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
