import type { LeaveOneOut } from './cross-validation';
import { DEFAULT_NEIGHBOURS } from './kriging';
import { krigeRows, neighbourRows } from './kriging-neighbourhood';
import type { NeighbourRows } from './kriging-neighbourhood';
import type { KrigingSetup } from './kriging-setup';
import { indexSamples, NearestSearch } from './sample-index';
import type { SamplePoints } from './sample-points';

/** Soundings that are left out and foretold to tell ways of making the surface apart: all of them, or an even share of many. */
const MOST_ASKED = 1000;
const RINGS_SEEN = 48; // nearest others among which the distance to leave out is sought

/** The soundings asked, and from which others each is foretold. */
export type Asked = {
  rows: Int32Array; // sample numbers of the soundings asked, ascending
  alone: NeighbourRows; // each with itself left out
  apart: NeighbourRows; // each with those round it left out as well: as far from its nearest as places of the chart are
};

/**
 * Which soundings are left out, and how much round each. A sounding's nearest other lies nearer or farther than a place of
 * the chart has its nearest sounding, so the distances of both are sorted and matched, rank by rank.
 * `awayM`: from places drawn on the chart to their nearest sounding. Source: after Milà et al., Methods in Ecology and
 * Evolution 13, 2022, 1304–1316 (nearest neighbour distance matching).
 */
export function askedSoundings(points: SamplePoints, soundingCount: number, awayM: Float64Array): Asked {
  const step = Math.max(1, soundingCount / MOST_ASKED);
  const rows = Int32Array.from({ length: Math.floor(soundingCount / step) }, (_, i) => Math.floor(i * step));
  const xM = points.xM.subarray(0, soundingCount);
  const yM = points.yM.subarray(0, soundingCount);
  const seen = Math.min(RINGS_SEEN, soundingCount - 1);
  const search = new NearestSearch(indexSamples(xM, yM), Math.max(1, seen));
  const othersM = [...rows].map((row) => {
    search.without = row;
    search.find(xM[row]!, yM[row]!);
    return search.squaredM2.slice(0, search.found).map(Math.sqrt);
  });
  const wanted = awayM.slice().sort();
  const byNearest = [...rows.keys()].sort((a, b) => (othersM[a]![0] ?? 0) - (othersM[b]![0] ?? 0) || a - b);
  const apartM = new Float64Array(rows.length);
  byNearest.forEach((at, rank) => {
    const wantedM = wanted[Math.floor(((rank + 0.5) / rows.length) * wanted.length)] ?? 0;
    const others = othersM[at]!;
    let nearest = 0;
    for (let n = 1; n < others.length; n++)
      if (Math.abs(others[n]! - wantedM) < Math.abs(others[nearest]! - wantedM)) nearest = n;
    // Samples strictly nearer than the one wanted as nearest are left out.
    apartM[at] = nearest === 0 ? 0 : others[nearest]!;
  });
  const targets = { xM: picked(xM, rows), yM: picked(yM, rows) };
  const leaving = {
    neighbours: DEFAULT_NEIGHBOURS,
    by: 'octant',
    leaveOneOut: true,
    samplesOf: rows,
  } as const;
  const leaveNearOut = { withinM: apartM, count: soundingCount };
  return {
    rows,
    alone: neighbourRows(points, targets, leaving),
    apart: neighbourRows(points, targets, { ...leaving, leaveNearOut }),
  };
}

const picked = (column: Float64Array, rows: Int32Array) => Float64Array.from(rows, (row) => column[row]!);

/**
 * Each asked sounding from 24 others by octant: alone left out, or with those round it as well. Residual measured −
 * foretold, metres, and the variance of that difference.
 */
export function foretell(setup: KrigingSetup, asked: Asked, leftOut: 'alone' | 'apart'): LeaveOneOut {
  const { xM, yM, valueM, errorVarianceM2 } = setup.samples;
  const { rows } = asked;
  const places = { xM: picked(xM, rows), yM: picked(yM, rows) };
  const targets = setup.driftM === undefined ? places : { ...places, driftM: picked(setup.driftM, rows) };
  const found = krigeRows(setup, targets, asked[leftOut]);
  return {
    residualM: found.valuesM.map((value, i) => valueM[rows[i]!]! - value),
    varianceM2: found.varianceM2.map((v, i) => v + errorVarianceM2[rows[i]!]! + setup.variogram.nuggetM2),
  };
}

export function meanLogDensity({ residualM, varianceM2 }: LeaveOneOut): number {
  let sum = 0;
  for (let i = 0; i < residualM.length; i++) {
    const variance = Math.max(varianceM2[i]!, 1e-12);
    sum -= 0.5 * (Math.log(2 * Math.PI * variance) + (residualM[i]! * residualM[i]!) / variance);
  }
  return sum / residualM.length;
}
