import { bearingDifferenceDeg, geodesicBetween } from '../geometry/geodesic';
import type { LonLat } from '../geometry/plane';
import { metresToWraps, type Wraps } from '../units/wraps';
import type { Refusal } from './cast-site';
import type { Kit } from './contract';
import { lineForRange } from './ground-range';
import { lineAWrapM, stretchOf } from './line-out';

/** What an angler's own rod, line and sticks say of a count. */
export type SpotKit = Pick<
  Kit,
  | 'stickSpacingM'
  | 'stickMeasured'
  | 'stickDiameterM'
  | 'wrapReference'
  | 'lineAlongRodM'
  | 'reelHeightM'
  | 'rodElevationDeg'
  | 'lineType'
  | 'stretchShare'
  | 'stretchSigmaShare'
>;

/** How to cast to a spot from a stance. */
export type SameSpot = {
  ok: true;
  rangeM: number; // over the ground, from the stance
  bearingDeg: number; // true, at the stance
  lineOutM: number; // under a cast's pull
  woundM: number; // round the sticks
  wraps: Wraps;
};

/**
 * The exact inverse of the reduction: bearing, line out and count that put the lead on `spot` from `stance`, for any
 * sticks and either wrap reference, over water `depthM` deep (the depth of that hour, since a higher lake takes more line).
 * Refused when the spot lies under the rod itself. Observed → spot → observed comes back within 1 mm and 0.001°.
 */
export function sameSpot(
  [stance, spot]: readonly [LonLat, LonLat],
  kit: SpotKit,
  depthM: number,
): SameSpot | Refusal {
  const { distanceM: rangeM, bearingDeg } = geodesicBetween(stance, spot);
  const wound = windFor(rangeM, kit, depthM);
  return wound.ok ? { ...wound, rangeM, bearingDeg } : wound;
}

/** The count that reaches a ground range, metres, over water `depthM` deep. */
export function windFor(
  rangeM: number,
  kit: SpotKit,
  depthM: number,
): Omit<SameSpot, 'rangeM' | 'bearingDeg'> | Refusal {
  const line = lineForRange(rangeM, {
    reference: kit.wrapReference,
    lineAlongRodM: kit.lineAlongRodM,
    reelHeightM: kit.reelHeightM,
    rodElevationDeg: kit.rodElevationDeg,
    depthM,
  });
  if (!line.ok) return line;
  const woundM = line.lineOutM / (1 + stretchOf(kit).share);
  return { ok: true, lineOutM: line.lineOutM, woundM, wraps: metresToWraps(woundM, lineAWrapM(kit)) };
}

/** A mark as seen from a stance beside a line: aim this far right (+) or left (−) of it. */
export type MarkSeen<Mark> = { mark: Mark; offsetDeg: number; rangeM: number };

/**
 * Far-bank marks by the angle between each and a bearing, nearest first, none farther to the side than `widestDeg`.
 * Marks nearer to the stance than `nearestM` give no line and are left out.
 */
export function marksBeside<Mark extends { place: LonLat }>(
  marks: readonly Mark[],
  line: { stance: LonLat; bearingDeg: number },
  { widestDeg = 30, nearestM = 1 }: { widestDeg?: number; nearestM?: number } = {},
): MarkSeen<Mark>[] {
  return marks
    .map((mark) => {
      const seen = geodesicBetween(line.stance, mark.place);
      const offsetDeg = bearingDifferenceDeg(seen.bearingDeg, line.bearingDeg);
      return { mark, offsetDeg, rangeM: seen.distanceM };
    })
    .filter(({ offsetDeg, rangeM }) => Math.abs(offsetDeg) <= widestDeg && rangeM >= nearestM)
    .sort((a, b) => Math.abs(a.offsetDeg) - Math.abs(b.offsetDeg));
}
