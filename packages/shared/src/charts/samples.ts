import type { Point } from '../geometry/plane';
import type { Outline } from '../geometry/polygon';
import { ringLengthM, ringsOf } from '../geometry/polygon';
import type { LeaveOneOut } from './cross-validation';
import { nearestDistancesM } from './nearest';
import type { SamplePoints } from './sample-points';
import { indexSamples, NearestSearch } from './sample-index';

/** A sounding at datum: plane metres, depth below datum, σ of that depth. */
export type Sounding = { id: string; xM: number; yM: number; depthM: number; sigmaM: number };

/** Soundings nearer one another than this are one place: well inside how well a cast's place is known. */
export const ONE_PLACE_M = 0.3;
/** No sounding is taken to be better than this: a float is read to a centimetre or two at best. */
const LEAST_SIGMA_M = 0.02;
const SHORE_SPACING_LIMITS_M = [1.5, 15] as const;
/** More shore points than this would only slow the solve; the spacing widens instead. */
const MOST_SHORE_POINTS = 300;

export type ChartSamples = {
  points: SamplePoints; // merged soundings first, then the shore at depth 0
  soundingIds: string[][]; // ids merged into each of the first rows
  gapM: number; // mean distance from a sounding to its nearest other
  shoreSpacingM: number;
};

/**
 * The samples of a surface: soundings, those at one place merged by inverse variance, and the shoreline, islands' too, at
 * depth 0 no wider apart than the mean gap between soundings. Where the shore's line itself is unsure (`shoreSigmaM`, across
 * it) its depth is as unsure as the bed falls there: σ times the fall to the nearest sounding. Soundings are taken in the
 * order of their ids, so the order they are given in does not matter.
 */
export function chartSamples(
  soundings: readonly Sounding[],
  outline: Outline,
  shoreSigmaM = 0,
): ChartSamples {
  const places = mergePlaces([...soundings].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0)));
  const gapM = places.length > 1 ? meanGapM(places) : SHORE_SPACING_LIMITS_M[1];
  const shoreSpacingM = shoreSpacing(gapM, outline);
  const shore = ringsOf(outline).flatMap((ring) => alongRing(ring, shoreSpacingM));
  const column = (of: (place: Place) => number, shoreOf: (point: Point) => number) =>
    Float64Array.from([...places.map(of), ...shore.map(shoreOf)]);
  return {
    points: {
      xM: column(
        (p) => p.xM,
        (s) => s.xM,
      ),
      yM: column(
        (p) => p.yM,
        (s) => s.yM,
      ),
      valueM: column(
        (p) => p.depthM,
        () => 0,
      ),
      errorVarianceM2: column((p) => p.varianceM2, shoreVariance(places, shoreSigmaM)),
    },
    soundingIds: places.map((place) => place.ids),
    gapM,
    shoreSpacingM,
  };
}

/** Of a shore point's depth, m²: (σ × depth / distance of the nearest place sounded)², the distance never below σ. */
function shoreVariance(places: readonly Place[], sigmaM: number): (point: Point) => number {
  if (sigmaM === 0 || places.length === 0) return () => 0;
  const sounded = indexSamples(
    Float64Array.from(places, (p) => p.xM),
    Float64Array.from(places, (p) => p.yM),
  );
  const search = new NearestSearch(sounded, 1);
  return ({ xM, yM }) => {
    search.find(xM, yM);
    const awayM = Math.max(sigmaM, Math.sqrt(search.squaredM2[0]!));
    return ((sigmaM * (places[search.ids[0]!]?.depthM ?? 0)) / awayM) ** 2;
  };
}

type Place = { ids: string[]; xM: number; yM: number; depthM: number; varianceM2: number };

function mergePlaces(sorted: readonly Sounding[]): Place[] {
  const groups: Sounding[][] = [];
  const byCell = new Map<string, Sounding[][]>();
  for (const sounding of sorted) {
    const home = nearbyGroup(byCell, sounding);
    if (home !== undefined) {
      home.push(sounding);
      continue;
    }
    const group = [sounding];
    groups.push(group);
    const key = cellKey(sounding, 0, 0);
    byCell.set(key, [...(byCell.get(key) ?? []), group]);
  }
  return groups.map(mergeGroup);
}

function cellKey({ xM, yM }: Sounding, dx: number, dy: number): string {
  return `${Math.floor(xM / ONE_PLACE_M) + dx},${Math.floor(yM / ONE_PLACE_M) + dy}`;
}

function nearbyGroup(byCell: Map<string, Sounding[][]>, sounding: Sounding): Sounding[] | undefined {
  for (let dx = -1; dx <= 1; dx++) {
    for (let dy = -1; dy <= 1; dy++) {
      for (const group of byCell.get(cellKey(sounding, dx, dy)) ?? []) {
        const first = group[0]!;
        if (Math.hypot(first.xM - sounding.xM, first.yM - sounding.yM) < ONE_PLACE_M) return group;
      }
    }
  }
  return undefined;
}

/**
 * Weighted mean of readings at one place. Readings that disagree beyond their stated σ widen it by the Birge ratio.
 * Source: Birge, Physical Review 40, 1932, 207–227.
 */
function mergeGroup(group: readonly Sounding[]): Place {
  const variances = group.map((s) => Math.max(LEAST_SIGMA_M, s.sigmaM) ** 2);
  const weight = variances.reduce((sum, v) => sum + 1 / v, 0);
  const mean = (of: (s: Sounding) => number) =>
    group.reduce((sum, s, i) => sum + of(s) / variances[i]!, 0) / weight;
  const depthM = mean((s) => s.depthM);
  const chi2 = group.reduce((sum, s, i) => sum + (s.depthM - depthM) ** 2 / variances[i]!, 0);
  const birge = group.length > 1 ? Math.max(1, chi2 / (group.length - 1)) : 1;
  return {
    ids: group.map((s) => s.id),
    xM: mean((s) => s.xM),
    yM: mean((s) => s.yM),
    depthM,
    varianceM2: birge / weight,
  };
}

function shoreSpacing(gapM: number, outline: Outline): number {
  const lengthM = ringsOf(outline).reduce((sum, ring) => sum + ringLengthM(ring), 0);
  const [least, most] = SHORE_SPACING_LIMITS_M;
  return Math.max(Math.min(most, Math.max(least, gapM)), lengthM / MOST_SHORE_POINTS);
}

/** Mean distance from a sounding to its nearest other. */
function meanGapM(places: readonly Place[]): number {
  const xM = Float64Array.from(places, (p) => p.xM);
  const yM = Float64Array.from(places, (p) => p.yM);
  const search = new NearestSearch(indexSamples(xM, yM), 1);
  let sum = 0;
  for (let i = 0; i < xM.length; i++) {
    search.without = i;
    search.find(xM[i]!, yM[i]!);
    sum += Math.sqrt(search.squaredM2[0]!);
  }
  return sum / xM.length;
}

/** Corner by corner, with points between so that no two are further apart than the spacing. Repeated corners are dropped. */
function alongRing(ring: readonly Point[], spacingM: number): Point[] {
  const points: Point[] = [];
  let sinceM = Infinity;
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i]!;
    const b = ring[(i + 1) % ring.length]!;
    const lengthM = Math.hypot(b.xM - a.xM, b.yM - a.yM);
    if (lengthM === 0) continue;
    // A corner close behind the last point is passed over: a finely drawn shore must not outweigh the casts.
    if (sinceM >= spacingM / 2) {
      points.push({ xM: a.xM, yM: a.yM });
      sinceM = 0;
    }
    const pieces = Math.ceil((sinceM + lengthM) / spacingM);
    const stepM = (sinceM + lengthM) / pieces;
    for (let piece = 1; piece < pieces; piece++) {
      const share = (piece * stepM - sinceM) / lengthM;
      if (share <= 0) continue;
      points.push({ xM: a.xM + share * (b.xM - a.xM), yM: a.yM + share * (b.yM - a.yM) });
    }
    sinceM = stepM;
  }
  return points;
}

/**
 * Soundings off by more than 3.5 robust σ in cross-validation, for a person to look at; nothing is dropped. The residuals
 * are standardised by their own kriging σ, and their spread is 1.4826 × the median absolute deviation.
 * Returns rows of the samples (the first `count` are soundings), ascending.
 */
export function flagOutliers({ residualM, varianceM2 }: LeaveOneOut, count: number): number[] {
  const scores = Float64Array.from({ length: count }, (_, i) => residualM[i]! / Math.sqrt(varianceM2[i]!));
  const centre = median(scores);
  const spread = 1.4826 * median(scores.map((score) => Math.abs(score - centre)));
  if (!(spread > 0)) return [];
  return [...scores.keys()].filter((i) => Math.abs(scores[i]! - centre) > 3.5 * spread);
}

function median(values: Float64Array): number {
  const sorted = values.slice().sort();
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** Distance from each place to the nearest sounding (shore points left aside), metres. */
export function soundingDistancesM(
  samples: ChartSamples,
  places: { xM: Float64Array; yM: Float64Array },
): Float64Array {
  const count = samples.soundingIds.length;
  const { xM, yM, valueM, errorVarianceM2 } = samples.points;
  return nearestDistancesM(
    {
      xM: xM.slice(0, count),
      yM: yM.slice(0, count),
      valueM: valueM.slice(0, count),
      errorVarianceM2: errorVarianceM2.slice(0, count),
    },
    places,
  );
}
