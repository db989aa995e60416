import type { DifferenceSystem, SoundedSide } from './difference-system';
import { indexSamples, NearestSearch } from './sample-index';

/** How much a bed varies: variance of what hangs together over some gaps between soundings, and of what doesn't, m². */
export type Roughness = { sillM2: number; nuggetM2: number };

/** From a level floor to metres between two casts. */
const TRIED: readonly Roughness[] = [0, 0.01, 0.04].flatMap((nuggetM2) =>
  [0.001, 0.005, 0.025, 0.125, 0.625, 3.125].map((sillM2) => ({ sillM2, nuggetM2 })),
);
const NEAREST = 16; // soundings whose foretelling decides at a place
const LAKE_WORTH = 2; // soundings that the lake as a whole counts for
const MOST_ASKED = 500; // soundings of one chart foretold from the others, an even share of more

type Places = { xM: Float64Array; yM: Float64Array };

/**
 * The roughness at each place under which the soundings round about, each foretold from the others of its own chart, are
 * likeliest: a Gaussian-weighted log likelihood a gap wide, and the lake's own mean for two soundings more.
 */
export function bedsRound(
  system: DifferenceSystem,
  sides: readonly SoundedSide[],
  { places, gapM }: { places: Places; gapM: number },
): Roughness[] {
  const told = foretold(system, sides);
  const count = told.xM.length;
  const lake = TRIED.map((_, way) => {
    let sum = 0;
    for (let i = 0; i < count; i++) sum += told.logDensity[way * count + i]!;
    return (LAKE_WORTH * sum) / count;
  });
  const search = new NearestSearch(indexSamples(told.xM, told.yM), Math.min(NEAREST, count));
  return Array.from(places.xM, (x, t) => {
    search.find(x, places.yM[t]!);
    let best = TRIED[0]!;
    let most = -Infinity;
    TRIED.forEach((tried, way) => {
      let sum = lake[way]!;
      for (let n = 0; n < search.found; n++)
        sum +=
          Math.exp(-search.squaredM2[n]! / (2 * gapM * gapM)) *
          told.logDensity[way * count + search.ids[n]!]!;
      if (sum > most) [best, most] = [tried, sum];
    });
    return best;
  });
}

/** Log density of each asked sounding given the others of its chart, a row of them for each way tried. */
function foretold(system: DifferenceSystem, sides: readonly SoundedSide[]) {
  const asked = sides.flatMap((side) => {
    const count = side.samples.xM.length;
    const step = Math.max(1, count / MOST_ASKED);
    return Array.from({ length: Math.floor(count / step) }, (_, i) => ({ side, id: Math.floor(i * step) }));
  });
  const logDensity = new Float64Array(TRIED.length * asked.length);
  TRIED.forEach((tried, way) => {
    asked.forEach(({ side, id }, i) => {
      const { xM, yM, valueM, errorVarianceM2 } = side.samples;
      const [x, y] = [xM[id]!, yM[id]!];
      system.begin(tried);
      system.addNearest(side, { x, y, without: id });
      const { value, varianceM2 } = system.bed(x, y);
      const variance = varianceM2 + tried.nuggetM2 + errorVarianceM2[id]! + 1e-6;
      const missM = valueM[id]! + side.shiftM - value;
      logDensity[way * asked.length + i] =
        -0.5 * (Math.log(2 * Math.PI * variance) + (missM * missM) / variance);
    });
  });
  return {
    xM: Float64Array.from(asked, ({ side, id }) => side.samples.xM[id]!),
    yM: Float64Array.from(asked, ({ side, id }) => side.samples.yM[id]!),
    logDensity,
  };
}
