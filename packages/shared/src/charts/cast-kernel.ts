import type { Covariance } from '../surveys/covariance';
import { errorFunction } from './error-function';

/** Where a cast felt the bottom: where the lead landed, how surely, and how far and which way it was drawn. Metres. */
export type FeltPlace = {
  xM: number;
  yM: number;
  spread?: Covariance | undefined; // of the place, m²; none: taken as exact
  track?: { xM: number; yM: number } | undefined; // from the landing to where the drag ended
};

/** How much one cast weighs at a place `dxM` east and `dyM` north of where it landed: 1 at most, and never below 0. */
export type CastKernel = { weightAt: (dxM: number, dyM: number) => number; reachM: number };

const SHORT_TRACK = 1e-6; // in bandwidths squared: so short a drag is a dot

/**
 * The weight e^(−d²/2b²) of a cast, as it is on average over where the lead may truly have lain and over the line it was
 * drawn along. With M = (b²I + Σ)⁻¹ and δ the way from the landing,
 *
 *   a dot:   w = b²/√|b²I + Σ| · e^(−½ δᵀMδ)
 *   a line t: w = b²/√|b²I + Σ| · e^(−½(γ − β²/α)) · √(π/2α) · [erf((1 − β/α)·√(α/2)) + erf((β/α)·√(α/2))]
 *
 * with α = tᵀMt, β = tᵀMδ, γ = δᵀMδ: both are Gaussian integrals in closed form. A place known badly therefore weighs
 * less where it was thought to be and reaches further; a long drag is spread along its line and counts no more than a dot.
 * `reach` is in spreads, beyond which nothing is counted.
 */
export function castKernel(
  { spread, track }: FeltPlace,
  { bandwidthM, reach }: { bandwidthM: number; reach: number },
): CastKernel {
  const b2 = bandwidthM * bandwidthM;
  const xx = b2 + (spread?.xx ?? 0);
  const yy = b2 + (spread?.yy ?? 0);
  const xy = spread?.xy ?? 0;
  const det = xx * yy - xy * xy;
  const m = { xx: yy / det, xy: -xy / det, yy: xx / det };
  const top = b2 / Math.sqrt(det);
  const widest = Math.sqrt((xx + yy) / 2 + Math.hypot((xx - yy) / 2, xy));
  const square = (x: number, y: number): number => m.xx * x * x + 2 * m.xy * x * y + m.yy * y * y;
  const alpha = track ? square(track.xM, track.yM) : 0;
  if (!track || alpha < SHORT_TRACK)
    return { weightAt: (dxM, dyM) => top * Math.exp(-square(dxM, dyM) / 2), reachM: reach * widest };
  const tx = m.xx * track.xM + m.xy * track.yM;
  const ty = m.xy * track.xM + m.yy * track.yM;
  const half = Math.sqrt(alpha / 2);
  const spanned = top * Math.sqrt(Math.PI / (2 * alpha));
  return {
    weightAt: (dxM, dyM) => {
      const beta = tx * dxM + ty * dyM;
      const along = beta / alpha;
      const across = Math.exp(-(square(dxM, dyM) - beta * along) / 2);
      const share = errorFunction((1 - along) * half) + errorFunction(along * half);
      return spanned * across * Math.max(0, share);
    },
    reachM: reach * widest + Math.hypot(track.xM, track.yM),
  };
}
