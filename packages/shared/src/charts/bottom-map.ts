import type { GridFrame } from './grid';

/** A cast's own answer about the bottom: a probability for each class, in the order of the class list, summing to 1. */
export type BottomEvidence = { xM: number; yM: number; shares: readonly number[] };

/** Most likely class of each cell (its place in the class list; 255 unknown) and how likely, 0–1 (0 where unknown). */
export type ClassGrid = GridFrame & { classes: Uint8Array; confidence: Float64Array };

export const UNKNOWN_CLASS = 255;
/** Weight of the prior, in casts, spread evenly over the classes: half a cast that could be anything. */
const PRIOR_CASTS = 0.5;
/** A class less likely than this is not told: the place stays unknown. */
export const LEAST_CONFIDENCE = 0.4;
const BANDWIDTHS_M = [2, 3, 4, 5, 6, 8, 10, 13] as const;
/** Used below ten casts, too few to score. Common practice, no published source. */
export const USUAL_BANDWIDTH_M = 5;
const FEWEST_TO_SCORE = 10;
const REACH = 3; // bandwidths beyond which a cast's weight, under 1.2 %, is left out

/** Every node unknown. */
export function unknownBottom(frame: GridFrame): ClassGrid {
  const count = frame.columns * frame.rows;
  const { columns, rows, cellM, originM } = frame;
  return {
    columns,
    rows,
    cellM,
    originM,
    classes: new Uint8Array(count).fill(UNKNOWN_CLASS),
    confidence: new Float64Array(count),
  };
}

/**
 * Kernel-weighted Dirichlet estimate at the given nodes: α_c = α₀ + Σ w p_c with w = e^(−d²/2b²) over the casts nearby, and
 * P(c) = α_c / Σα, so confidence falls with distance and the unvisited stays unknown. Distances and b in metres.
 */
export function bottomMap(
  evidence: readonly BottomEvidence[],
  nodes: BottomNodes,
  bandwidthM: number,
): ClassGrid {
  const map = unknownBottom(nodes.frame);
  if (evidence.length === 0) return map;
  const classes = evidence[0]!.shares.length;
  const alpha = new Float64Array(nodes.frame.columns * nodes.frame.rows * classes).fill(
    PRIOR_CASTS / classes,
  );
  const table = shareTable(evidence);
  evidence.forEach((cast, i) =>
    spreadCast(alpha, nodes.frame, {
      ...cast,
      bandwidthM,
      shares: table.subarray(i * classes, (i + 1) * classes),
    }),
  );
  for (const node of nodes.nodes) {
    const from = node * classes;
    let best = from;
    let total = alpha[from]!;
    for (let c = from + 1; c < from + classes; c++) {
      total += alpha[c]!;
      if (alpha[c]! > alpha[best]!) best = c;
    }
    const confidence = alpha[best]! / total;
    if (confidence < LEAST_CONFIDENCE) continue;
    map.classes[node] = best - from;
    map.confidence[node] = confidence;
  }
  return map;
}

type SpreadingCast = { xM: number; yM: number; shares: Float64Array; bandwidthM: number };

/** Adds one cast's weighted shares to every node within its reach; the weight is a product of one factor a column and a row. */
function spreadCast(
  alpha: Float64Array,
  frame: GridFrame,
  { xM, yM, shares, bandwidthM }: SpreadingCast,
): void {
  const { columns, rows, cellM, originM } = frame;
  const reachM = REACH * bandwidthM;
  const perWidth2 = 1 / (2 * bandwidthM * bandwidthM);
  const across = Float64Array.from({ length: columns }, (_, column) =>
    Math.exp(-((originM.xM + column * cellM - xM) ** 2) * perWidth2),
  );
  const south = Math.max(0, Math.ceil((yM - reachM - originM.yM) / cellM));
  const north = Math.min(rows - 1, Math.floor((yM + reachM - originM.yM) / cellM));
  for (let row = south; row <= north; row++) {
    const dy = originM.yM + row * cellM - yM;
    const halfM = Math.sqrt(Math.max(0, reachM * reachM - dy * dy));
    const west = Math.max(0, Math.ceil((xM - halfM - originM.xM) / cellM));
    const east = Math.min(columns - 1, Math.floor((xM + halfM - originM.xM) / cellM));
    const down = Math.exp(-dy * dy * perWidth2);
    let p = (row * columns + west) * shares.length;
    for (let column = west; column <= east; column++) {
      const weight = down * across[column]!;
      for (let c = 0; c < shares.length; c++, p++) alpha[p] = alpha[p]! + weight * shares[c]!;
    }
  }
}

/** The nodes to estimate at, by their numbers in the frame. */
export type BottomNodes = { frame: GridFrame; nodes: Int32Array };

/** The bandwidth with the best leave-one-out log score Σᵢ Σ_c p_ic ln P₋ᵢ(c); the usual one below ten casts. Metres. */
export function chooseBandwidthM(evidence: readonly BottomEvidence[]): number {
  if (evidence.length < FEWEST_TO_SCORE) return USUAL_BANDWIDTH_M;
  let best: number = USUAL_BANDWIDTH_M;
  let bestScore = -Infinity;
  for (const bandwidthM of BANDWIDTHS_M) {
    const score = logScore(evidence, bandwidthM);
    if (score > bestScore) {
      best = bandwidthM;
      bestScore = score;
    }
  }
  return best;
}

function logScore(evidence: readonly BottomEvidence[], bandwidthM: number): number {
  const classes = evidence[0]!.shares.length;
  const table = shareTable(evidence);
  const alpha = new Float64Array(classes);
  const reach2 = (REACH * bandwidthM) ** 2;
  let score = 0;
  for (let i = 0; i < evidence.length; i++) {
    alpha.fill(PRIOR_CASTS / classes);
    let total = PRIOR_CASTS;
    for (let j = 0; j < evidence.length; j++) {
      if (j === i) continue;
      const d2 = (evidence[i]!.xM - evidence[j]!.xM) ** 2 + (evidence[i]!.yM - evidence[j]!.yM) ** 2;
      if (d2 > reach2) continue;
      const weight = Math.exp(-d2 / (2 * bandwidthM * bandwidthM));
      total += weight;
      for (let c = 0; c < classes; c++) alpha[c] = alpha[c]! + weight * table[j * classes + c]!;
    }
    for (let c = 0; c < classes; c++) score += table[i * classes + c]! * Math.log(alpha[c]! / total);
  }
  return score;
}

function shareTable(evidence: readonly BottomEvidence[]): Float64Array {
  const classes = evidence[0]!.shares.length;
  const table = new Float64Array(evidence.length * classes);
  evidence.forEach(({ shares }, i) => {
    if (shares.length !== classes)
      throw new RangeError('Every cast must answer for the same classes of bottom.');
    table.set(shares, i * classes);
  });
  return table;
}
