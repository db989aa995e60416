import { castKernel, type FeltPlace } from './cast-kernel';
import type { GridFrame } from './grid';

/**
 * A cast's own answer about the bottom: a probability for each class, in the order of the class list, summing to 1; or to
 * less where what was seen has faded since. `worthCasts`: how many felt casts it counts for (default 1).
 */
export type BottomEvidence = FeltPlace & { shares: readonly number[]; worthCasts?: number | undefined };

/** Most likely class of each cell (its place in the class list; 255 unknown) and how likely, 0–1 (0 where unknown). */
export type ClassGrid = GridFrame & { classes: Uint8Array; confidence: Float64Array };

export const UNKNOWN_CLASS = 255;
/** Weight of the prior, in casts, spread evenly over the classes: half a cast that could be anything. */
export const PRIOR_CASTS = 0.5;
/** A class less likely than this is not told: the place stays unknown. */
export const LEAST_CONFIDENCE = 0.4;
const BANDWIDTHS_M = [2, 3, 4, 5, 6, 8, 10, 13] as const;
/** Used below ten casts, too few to score. Common practice, no published source. */
export const USUAL_BANDWIDTH_M = 5;
const FEWEST_TO_SCORE = 10;
const REACH = 3; // spreads beyond which a cast's weight, under 1.2 %, is left out

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
 * Kernel-weighted Dirichlet estimate at the given nodes: α_c = α₀ + Σ w p_c over the casts nearby, and P(c) = α_c / Σα, so
 * confidence falls with distance and the unvisited stays unknown. w falls with distance as `castKernel` says, smoothed by
 * how surely the cast is placed and along the line it was drawn. Distances and the bandwidth in metres.
 */
export function bottomMap(
  evidence: readonly BottomEvidence[],
  nodes: BottomNodes,
  bandwidthM: number,
): ClassGrid {
  return likeliestClasses(classWeights(evidence, nodes.frame, bandwidthM), nodes);
}

/** α_c of every node of a frame, all classes of a node side by side. */
export type ClassWeights = { classes: number; alpha: Float64Array };

/** The weights that `bottomMap` chooses from; null without evidence. */
export function classWeights(
  evidence: readonly BottomEvidence[],
  frame: GridFrame,
  bandwidthM: number,
): ClassWeights | null {
  const classes = evidence[0]?.shares.length;
  if (classes === undefined) return null;
  const alpha = new Float64Array(frame.columns * frame.rows * classes).fill(PRIOR_CASTS / classes);
  for (const cast of evidence) {
    requireClasses(cast, classes);
    spreadCast(alpha, frame, { cast, bandwidthM });
  }
  return { classes, alpha };
}

/** The likeliest class at each of the nodes, unknown where none is likely enough. */
export function likeliestClasses(weights: ClassWeights | null, nodes: BottomNodes): ClassGrid {
  const map = unknownBottom(nodes.frame);
  if (weights === null) return map;
  const { classes, alpha } = weights;
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

/** Adds one cast's weighted shares to every node within its reach. */
function spreadCast(
  alpha: Float64Array,
  frame: GridFrame,
  { cast, bandwidthM }: { cast: BottomEvidence; bandwidthM: number },
): void {
  const { columns, rows, cellM, originM } = frame;
  const { shares, xM, yM, worthCasts = 1 } = cast;
  const { weightAt, reachM } = castKernel(cast, { bandwidthM, reach: REACH });
  const south = Math.max(0, Math.ceil((yM - reachM - originM.yM) / cellM));
  const north = Math.min(rows - 1, Math.floor((yM + reachM - originM.yM) / cellM));
  for (let row = south; row <= north; row++) {
    const dy = originM.yM + row * cellM - yM;
    const halfM = Math.sqrt(Math.max(0, reachM * reachM - dy * dy));
    const west = Math.max(0, Math.ceil((xM - halfM - originM.xM) / cellM));
    const east = Math.min(columns - 1, Math.floor((xM + halfM - originM.xM) / cellM));
    let p = (row * columns + west) * shares.length;
    for (let column = west; column <= east; column++) {
      const weight = worthCasts * weightAt(originM.xM + column * cellM - xM, dy);
      for (let c = 0; c < shares.length; c++, p++) alpha[p] = alpha[p]! + weight * shares[c]!;
    }
  }
}

/** The nodes to estimate at, by their numbers in the frame. */
export type BottomNodes = { frame: GridFrame; nodes: Int32Array };

/** The bandwidth chosen and how well it foretells a cast left out: mean log score a cast, in nats; null below ten casts. */
export type ChosenBandwidth = { bandwidthM: number; logScore: number | null };

/**
 * The bandwidth with the best leave-one-out log score Σᵢ vᵢ Σ_c p_ic ln P₋ᵢ(c), vᵢ what each cast counts for; the usual one
 * below ten casts. A cast left out is foretold at the middle of its drag. Metres.
 */
export function chooseBandwidth(evidence: readonly BottomEvidence[]): ChosenBandwidth {
  if (evidence.length < FEWEST_TO_SCORE) return { bandwidthM: USUAL_BANDWIDTH_M, logScore: null };
  let best: ChosenBandwidth = { bandwidthM: USUAL_BANDWIDTH_M, logScore: -Infinity };
  for (const bandwidthM of BANDWIDTHS_M) {
    const logScore = leaveOneOutScore(evidence, bandwidthM);
    if (logScore > (best.logScore ?? -Infinity)) best = { bandwidthM, logScore };
  }
  return best;
}

/** Mean log score, in nats, of foretelling each cast from the others. */
export function leaveOneOutScore(evidence: readonly BottomEvidence[], bandwidthM: number): number {
  const classes = evidence[0]!.shares.length;
  const kernels = evidence.map((cast) => castKernel(cast, { bandwidthM, reach: REACH }));
  const alpha = new Float64Array(classes);
  let score = 0;
  let counted = 0;
  for (const [i, cast] of evidence.entries()) {
    requireClasses(cast, classes);
    const xM = cast.xM + (cast.track?.xM ?? 0) / 2;
    const yM = cast.yM + (cast.track?.yM ?? 0) / 2;
    alpha.fill(PRIOR_CASTS / classes);
    let total = PRIOR_CASTS;
    for (let j = 0; j < evidence.length; j++) {
      const other = evidence[j]!;
      const { weightAt, reachM } = kernels[j]!;
      const dx = xM - other.xM;
      const dy = yM - other.yM;
      if (j === i || dx * dx + dy * dy > reachM * reachM) continue;
      const weight = (other.worthCasts ?? 1) * weightAt(dx, dy);
      for (let c = 0; c < classes; c++) {
        alpha[c] = alpha[c]! + weight * other.shares[c]!;
        total += weight * other.shares[c]!;
      }
    }
    const worth = cast.worthCasts ?? 1;
    for (let c = 0; c < classes; c++) {
      score += worth * cast.shares[c]! * Math.log(alpha[c]! / total);
      counted += worth * cast.shares[c]!;
    }
  }
  return counted > 0 ? score / counted : 0;
}

function requireClasses({ shares }: BottomEvidence, classes: number): void {
  if (shares.length !== classes)
    throw new RangeError('Every cast must answer for the same classes of bottom.');
}
