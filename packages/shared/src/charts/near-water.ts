import type { Outline } from '../geometry/polygon';
import type { GridFrame } from './grid';
import { MOST_GAP_M } from './mask';
import { soundingDistancesM } from './samples';
import type { ChartSamples } from './samples';
import { placesOf, waterNodes } from './water-nodes';

/** The water near enough to some sounding to be drawn; the rest cannot count as surveyed and needs no kriging. */
export type NearWater = {
  water: Uint8Array; // 1 on water, near or not
  nodes: Int32Array; // of the near water, in row order
  xM: Float64Array;
  yM: Float64Array;
  soundingDistanceM: Float64Array; // from each to the nearest sounding
};

export type NearWaterInput = { outline: Outline; frame: GridFrame; samples: ChartSamples; maxGapM: number };

export function nearWater({ outline, frame, samples, maxGapM }: NearWaterInput): NearWater {
  const water = waterNodes(outline, frame);
  const all = placesOf(water, frame);
  const distanceM = soundingDistancesM(samples, all);
  const limitM = Math.min(maxGapM, MOST_GAP_M);
  const near = (_: number, t: number) => distanceM[t]! <= limitM;
  return {
    water,
    nodes: all.nodes.filter(near),
    xM: all.xM.filter(near),
    yM: all.yM.filter(near),
    soundingDistanceM: distanceM.filter(near),
  };
}
