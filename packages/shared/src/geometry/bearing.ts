/** A compass bearing folded into 0 ≤ bearing < 360, degrees. */
export function normaliseBearing(bearingDeg: number): number {
  const folded = bearingDeg % 360;
  const positive = folded < 0 ? folded + 360 : folded;
  return positive >= 360 ? 0 : positive + 0; // + 0 turns −0 into 0; a tiny negative rounds up to 360
}

/** How far `toDeg` lies right (+) or left (−) of `fromDeg`, degrees, −180 < answer ≤ 180. */
export function bearingDifferenceDeg(fromDeg: number, toDeg: number): number {
  const turn = normaliseBearing(toDeg - fromDeg);
  return turn > 180 ? turn - 360 : turn;
}
