const RADIANS = Math.PI / 180;

/** Half-axes of a two-dimensional normal's 95 % ellipse, in σ: √(−2 ln 0.05), rounded as surveys round it. */
export const ELLIPSE_95 = 2.4477;
/** Half-width of a normal's 95 % band, in σ, rounded as surveys round it. */
export const BAND_95 = 1.96;

/** East-east, east-north and north-north parts, m². */
export type Covariance = { xx: number; xy: number; yy: number };

/** Error along the line, across it, and of the stance each way: one σ, metres. */
export type PositionSigma = { alongM: number; acrossM: number; stanceM: number };

/**
 * Covariance of a spot: the parts along and across a line at `bearingDeg` turned into east and north, and the
 * stance's own part added whole (pegs and marks are mostly fixed off one plan, so an error they share moves all).
 */
export function spotCovariance(bearingDeg: number, { alongM, acrossM, stanceM }: PositionSigma): Covariance {
  const sin = Math.sin(bearingDeg * RADIANS);
  const cos = Math.cos(bearingDeg * RADIANS);
  const along = alongM * alongM;
  const across = acrossM * acrossM;
  const stance = stanceM * stanceM;
  return {
    xx: along * sin * sin + across * cos * cos + stance,
    xy: (along - across) * sin * cos,
    yy: along * cos * cos + across * sin * sin + stance,
  };
}

/** One-σ half-axes, metres, and the bearing of the longer, 0 ≤ bearing < 180. */
export function principalAxes({ xx, xy, yy }: Covariance): {
  majorM: number;
  minorM: number;
  bearingDeg: number;
} {
  const mean = (xx + yy) / 2;
  const spread = Math.hypot((xx - yy) / 2, xy);
  const fromEastDeg = Math.atan2(2 * xy, xx - yy) / 2 / RADIANS;
  const bearingDeg = (90 - fromEastDeg + 360) % 180;
  return { majorM: Math.sqrt(mean + spread), minorM: Math.sqrt(Math.max(0, mean - spread)), bearingDeg };
}

/** The ellipse that holds the spot 95 times in a hundred. */
export function ellipse95(covariance: Covariance): {
  semiMajorM: number;
  semiMinorM: number;
  bearingDeg: number;
} {
  const { majorM, minorM, bearingDeg } = principalAxes(covariance);
  return { semiMajorM: majorM * ELLIPSE_95, semiMinorM: minorM * ELLIPSE_95, bearingDeg };
}

/** Several readings of one depth as one, weighted by 1/σ²; `chi2` over `freedom` tells whether they agree. */
export function combineDepths(readings: readonly { depthM: number; sigmaM: number }[]): {
  depthM: number;
  sigmaM: number;
  chi2: number;
  freedom: number;
} {
  if (readings.length === 0) throw new RangeError('At least one depth is needed');
  let weights = 0;
  let weighted = 0;
  for (const { depthM, sigmaM } of readings) {
    weights += 1 / (sigmaM * sigmaM);
    weighted += depthM / (sigmaM * sigmaM);
  }
  const mean = weighted / weights;
  const chi2 = readings.reduce((sum, { depthM, sigmaM }) => sum + ((depthM - mean) / sigmaM) ** 2, 0);
  return { depthM: mean, sigmaM: Math.sqrt(1 / weights), chi2, freedom: readings.length - 1 };
}
