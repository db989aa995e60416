import { outlineInPlane } from '../../geometry/outline';
import type { ChartView } from '../contract';
import { bottomOf, changedWater, layersOf, pointsOf } from './chart-part';
import type { MapParts } from './draw-map';
import { groundOf } from './ground';

export type PartsWish = {
  raisedM: number; // water level above datum; 0 draws the chart as published
  stepM: number; // between isobaths
  shown: { depth: boolean; bottom: boolean; soundings: boolean };
};

/** A chart made ready for a map, in the layers that came and are wished for. */
export function chartParts(chart: ChartView, { raisedM, stepM, shown }: PartsWish): MapParts {
  const layers = layersOf(chart);
  const ground = groundOf({
    outline: outlineInPlane(chart.origin, chart.outline),
    depth: shown.depth && chart.depth && layers ? layers.depth : null,
    isobaths: stepM === chart.contourStepM ? chart.isobaths : null,
    stepM,
    raisedM,
  });
  return {
    ground,
    bottom: shown.bottom ? bottomOf(chart, layers) : [],
    soundings: shown.soundings ? pointsOf(chart) : [],
    changed: changedWater(chart, ground.water),
    pegs: chart.pegs,
    spots: [],
    cast: null,
  };
}
