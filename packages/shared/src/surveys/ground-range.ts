import type { Kit, ReductionStep } from './contract';
import { refuse, type Refusal } from './cast-site';
import { SIGMA } from './error-budget';
import { degrees, metres, plusMinus, step } from './reduction-step';

const RADIANS = Math.PI / 180;

/** The triangle between rod tip, water and lead. Metres; `rodElevationDeg` above level while the count is true. */
export type Slope = {
  reference: Kit['wrapReference'];
  lineAlongRodM: number; // r
  reelHeightM: number; // h, above the water
  rodElevationDeg: number; // e
  depthM: number; // d, of the water of that hour
};

/** How far the lead lies below the rod tip, metres: h + r·sin e + d. */
export function belowTipM({ lineAlongRodM, reelHeightM, rodElevationDeg, depthM }: Slope): number {
  return reelHeightM + lineAlongRodM * Math.sin(rodElevationDeg * RADIANS) + depthM;
}

/** Line between rod tip and lead, metres: all of it when it was read to the tip, less r when to the clip. */
function beyondTipM(lineOutM: number, slope: Slope): number {
  return slope.reference === 'lead_to_rod_tip' ? lineOutM : lineOutM - slope.lineAlongRodM;
}

/**
 * Ground range P from the reel to the lead on a tight straight line, metres:
 * P = r·cos e + √(L² − (h + r·sin e + d)²), with L − r in place of L when the count was read to the clip.
 * A line too short to reach the bottom is refused in words.
 */
export function groundRange(lineOutM: number, slope: Slope): { ok: true; rangeM: number } | Refusal {
  const alongM = beyondTipM(lineOutM, slope);
  const downM = belowTipM(slope);
  if (!(alongM > downM)) {
    const needM = downM + (lineOutM - alongM);
    return refuse(
      `The line out, ${lineOutM.toFixed(2)} m, is too short: the bottom lies ${downM.toFixed(2)} m below the rod tip, so at least ${needM.toFixed(2)} m is needed`,
      'Check the wraps, the depth, and whether the count was read to the rod tip or to the clip',
    );
  }
  const acrossM = Math.sqrt(alongM * alongM - downM * downM);
  return { ok: true, rangeM: slope.lineAlongRodM * Math.cos(slope.rodElevationDeg * RADIANS) + acrossM };
}

/** The exact inverse: the line that reaches ground range P, metres; refused when P lies under the rod. */
export function lineForRange(rangeM: number, slope: Slope): { ok: true; lineOutM: number } | Refusal {
  const acrossM = rangeM - slope.lineAlongRodM * Math.cos(slope.rodElevationDeg * RADIANS);
  if (!(acrossM > 0)) {
    return refuse(
      `That spot is ${rangeM.toFixed(2)} m away, under the rod itself, so no count of wraps reaches it`,
      'Fish it by lowering the lead, not by casting',
    );
  }
  const alongM = Math.hypot(acrossM, belowTipM(slope));
  const extraM = slope.reference === 'lead_to_rod_tip' ? 0 : slope.lineAlongRodM;
  return { ok: true, lineOutM: alongM + extraM };
}

/**
 * σ of the ground range, metres, to first order: line out, rod angle, line along the rod, reel height and depth each
 * through its own slope, and the clip. Near in, where the line falls steeply, every one of them counts for more.
 */
export function rangeSigmaM(
  lineOutM: number,
  slope: Slope,
  sigma: { lineM: number; depthM: number },
): number {
  const alongM = beyondTipM(lineOutM, slope);
  const downM = belowTipM(slope);
  const acrossM = Math.sqrt(alongM * alongM - downM * downM);
  const r = slope.lineAlongRodM;
  const sin = Math.sin(slope.rodElevationDeg * RADIANS);
  const cos = Math.cos(slope.rodElevationDeg * RADIANS);
  const byLine = alongM / acrossM;
  const byDepth = -downM / acrossM;
  const byElevation = -r * sin + byDepth * r * cos;
  const byRod = cos + byDepth * sin - (slope.reference === 'lead_to_clip' ? byLine : 0);
  return Math.hypot(
    byLine * sigma.lineM,
    byLine * SIGMA.clipM,
    byDepth * sigma.depthM,
    byDepth * SIGMA.reelHeightM,
    byElevation * SIGMA.rodElevationDeg * RADIANS,
    byRod * SIGMA.lineAlongRodM,
  );
}

export function rangeStep(
  lineOutM: number,
  slope: Slope,
  result: { rangeM: number; sigmaM: number },
): ReductionStep {
  const clip = slope.reference === 'lead_to_clip';
  const formula = clip
    ? 'P = r·cos e + √((L − r)² − (h + r·sin e + d)²)'
    : 'P = r·cos e + √(L² − (h + r·sin e + d)²)';
  const inputs = [
    ['L', metres(lineOutM)],
    ['r, line along the rod', metres(slope.lineAlongRodM)],
    ['h, reel above the water', metres(slope.reelHeightM)],
    ['e, rod above level', degrees(slope.rodElevationDeg, 0)],
    ['d, depth', metres(slope.depthM)],
  ] as const;
  const value = metres(result.rangeM);
  return step(['range', 'Ground range', formula], inputs, { value, sigma: plusMinus(result.sigmaM, 'm') });
}
