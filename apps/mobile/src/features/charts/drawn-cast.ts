import type { SectionPoint } from '@mereward/shared/charts/contract';
import type { DrawnCast } from '@mereward/shared/charts/drawing/cast-marks';
import { recastEllipse } from '@mereward/shared/charts/recast-ellipse';
import { distanceBetweenM, planeBearingDeg, pointAlong, type Point } from '@mereward/shared/geometry/point';
import { insideOutline, type Outline } from '@mereward/shared/geometry/polygon';
import { pointAtLineOut, wrapRangesM } from './section-words';

/** A cast the reader draws: where to, and how much line. Bearing in whole and half degrees, so that it can be said. */
export type AimedCast = { bearingDeg: number; lineOutM: number };

const LEAST_M = 5;

/** A drag from a peg to a place, as a cast. Without a section yet the line is taken as long as the ground. */
export function aimedAt(from: Point, place: Point, mostM: number): AimedCast {
  return {
    bearingDeg: (Math.round(planeBearingDeg(from, place) * 2) / 2) % 360,
    lineOutM: Math.min(mostM, Math.max(LEAST_M, distanceBetweenM(from, place))),
  };
}

/** The count of line that reaches a range on this section. */
export function lineOutAt(points: readonly SectionPoint[], rangeM: number): number {
  const after = points.findIndex((point) => point.rangeM >= rangeM);
  const b = points[after];
  const a = points[after - 1];
  if (!b) return points.at(-1)?.lineOutM ?? rangeM;
  if (!a || b.rangeM === a.rangeM) return b.lineOutM;
  return a.lineOutM + ((rangeM - a.rangeM) / (b.rangeM - a.rangeM)) * (b.lineOutM - a.lineOutM);
}

/** The cast for the map; wrap ticks and the true range stand on the section once it is here. */
export function drawnCast(
  from: Point,
  aimed: AimedCast,
  { points, stickSpacingM }: { points: readonly SectionPoint[]; stickSpacingM: number },
): DrawnCast {
  const rangeM = pointAtLineOut(points, aimed.lineOutM)?.rangeM ?? aimed.lineOutM;
  return {
    from,
    bearingDeg: aimed.bearingDeg,
    rangeM,
    wrapRangesM: wrapRangesM(points, stickSpacingM),
    ellipse: recastEllipse(aimed.bearingDeg, rangeM),
  };
}

const LOOK_STEP_M = 0.5;
const STANCE_M = 8; // a stance may lie this far back from the water

/** How far a cast on a bearing goes before it meets land again, metres; `mostM` on open water. */
export function openWaterM(
  outline: Outline,
  from: Point,
  { bearingDeg, mostM }: { bearingDeg: number; mostM: number },
): number {
  let wet = false;
  for (let rangeM = 0; rangeM <= mostM; rangeM += LOOK_STEP_M) {
    const onWater = insideOutline(outline, pointAlong(from, bearingDeg, rangeM));
    if (wet && !onWater) return Math.max(LEAST_M, rangeM - LOOK_STEP_M);
    if (!wet && rangeM > STANCE_M && !onWater) return LEAST_M; // it points at the bank
    wet = onWater;
  }
  return mostM;
}
