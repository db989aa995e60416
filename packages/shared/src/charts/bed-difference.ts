import { bedsRound, type Roughness } from './bed-roughness';
import { DifferenceSystem, NEIGHBOURS, type SoundedSide } from './difference-system';
import { meanNearestM } from './nearest';
import { indexSamples, NearestSearch } from './sample-index';
import type { SamplePoints } from './sample-points';

/** Difference of two beds, the second read `shiftM` deeper, at the places asked: now less then, deeper positive, metres. */
export type BedDifference = { differenceM: Float64Array; sigmaM: Float64Array };

type Places = { xM: Float64Array; yM: Float64Array };

const CHANGE_SIGMA_M = 0.5; // of a change nobody knows of: wide, so that what was sounded speaks for itself
const CHANGE_GAPS = 4; // range of a change in mean gaps between soundings: silt, scour and weed come as areas
const LEAST_CHANGE_RANGE_M = 10;
const BED_GAPS = 3; // range of the bed in the same

/**
 * What of the difference between two charts is a difference of the bed, kriged from the soundings of both. A steep step
 * sounded at different places looks like a change when two charts are subtracted, for each draws it where its own soundings
 * let it. Here both charts' soundings see one bed Z and a change D between them,
 *
 *   now = Z + D/2,  then = Z − D/2,  Cov = C_Z(h) ± ¼·C_D(h) + nugget + σ²,
 *
 * with Z's mean unknown and D's nought, and D is foretold from the nearest dozen of each. How rough Z is goes from place to
 * place, as the soundings of each chart foretell one another (`bedsRound`): on a level bottom a decimetre is a change, beside a
 * step half a metre is not. σ is one standard deviation.
 * Source: cokriging of a shared and a differing part (linear model of coregionalisation), Chilès & Delfiner, Geostatistics,
 * 2012, chapter 5.
 */
export function bedDifference(
  [now, then]: readonly [SamplePoints, SamplePoints],
  shiftM: number,
  places: Places,
): BedDifference {
  const count = places.xM.length;
  const differenceM = new Float64Array(count);
  const sigmaM = new Float64Array(count).fill(CHANGE_SIGMA_M);
  if (Math.min(now.xM.length, then.xM.length) < 2) return { differenceM, sigmaM };
  const gapM = Math.max(meanNearestM(now), meanNearestM(then), 1);
  const ranges = {
    bedRangeM: BED_GAPS * gapM,
    changeRangeM: Math.max(LEAST_CHANGE_RANGE_M, CHANGE_GAPS * gapM),
    changeSigmaM: CHANGE_SIGMA_M,
  };
  const system = new DifferenceSystem(ranges);
  const sides = [sideOf(now, { shiftM: 0, sign: 1 }), sideOf(then, { shiftM, sign: -1 })] as const;
  const roughness: Roughness[] = bedsRound(system, sides, { places, gapM });
  for (let t = 0; t < count; t++) {
    const [x, y] = [places.xM[t]!, places.yM[t]!];
    system.begin(roughness[t]!);
    for (const side of sides) system.addNearest(side, { x, y, without: -1 });
    const { value, varianceM2 } = system.difference(x, y);
    differenceM[t] = value;
    sigmaM[t] = Math.sqrt(varianceM2);
  }
  return { differenceM, sigmaM };
}

function sideOf(samples: SamplePoints, { shiftM, sign }: { shiftM: number; sign: 1 | -1 }): SoundedSide {
  const most = Math.min(NEIGHBOURS, samples.xM.length - 1);
  return { samples, search: new NearestSearch(indexSamples(samples.xM, samples.yM), most), shiftM, sign };
}
