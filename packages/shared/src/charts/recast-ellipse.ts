/** Where a cast to a given count comes down again, 95 %, as an ellipse about its end. Lengths in metres. */
export type RecastEllipse = { semiMajorM: number; semiMinorM: number; bearingDeg: number };

const ALONG_M = 1; // a good angler, the same rod, clipped up
const ASIDE_AT_M = 50;
const ASIDE_M = 1; // at 50 m in light wind, growing with range

/**
 * How closely a cast is repeated with the line clipped: 1 m along it, and 1 m aside at 50 m. Common practice, no
 * published source.
 */
export function recastEllipse(bearingDeg: number, rangeM: number): RecastEllipse {
  const asideM = Math.max(0.3, (rangeM / ASIDE_AT_M) * ASIDE_M);
  return asideM > ALONG_M
    ? { semiMajorM: asideM, semiMinorM: ALONG_M, bearingDeg: (bearingDeg + 90) % 360 }
    : { semiMajorM: ALONG_M, semiMinorM: asideM, bearingDeg };
}
