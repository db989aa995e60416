import { useMemo } from 'react';
import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import type { ChartView } from '@mereward/shared/charts/contract';
import type { BottomArea } from '@mereward/shared/charts/drawing/bottom-areas';
import { useChartUnits } from './use-chart-units';
import type { ShownLayers } from './chart-layers';
import { stepFor } from '@mereward/shared/charts/depth-words';
import type { MapContent } from './map-layers';
import { sharedLetters } from './peg-words';
import { bottomOf, changedWater, layersOf, pointsOf } from '@mereward/shared/charts/drawing/chart-part';
import { groundOfChart, raisedNowM } from './readied-chart';

/** Pegs as a map numbers them. */
export function pegsForMap<P extends { number: string }>(pegs: readonly P[]): P[] {
  const letters = sharedLetters(pegs.map(({ number }) => number));
  return pegs.map((peg) => ({ ...peg, number: peg.number.slice(letters.length) }));
}

export type ChartContent = {
  content: MapContent;
  layers: ChartLayers | null;
  raisedM: number; // the level depths are shown for, above datum
  isToday: boolean;
};

const NO_AREAS: BottomArea[] = [];
const NO_SPOTS: MapContent['spots'] = [];

/** A chart made ready for its map. Each part is made again only when what it stands on changes. */
export function useChartContent(
  chart: ChartView,
  shown: ShownLayers,
  spots: MapContent['spots'] = NO_SPOTS,
): ChartContent {
  const units = useChartUnits();
  const layers = useMemo(() => layersOf(chart), [chart]);
  const nowM = raisedNowM(chart);
  const isToday = shown.today && nowM !== null;
  const raisedM = isToday ? nowM : 0;
  const stepM = stepFor(chart.contourStepM, units.length);
  const ground = useMemo(
    () => groundOfChart(chart, layers, { raisedM, stepM, showDepth: shown.depth }),
    [chart, layers, raisedM, stepM, shown.depth],
  );
  const allBottom = useMemo(
    () => (shown.bottom ? bottomOf(chart, layers) : NO_AREAS),
    [chart, layers, shown.bottom],
  );
  const content = useMemo(
    (): MapContent => ({
      ground,
      bottom: allBottom,
      soundings: shown.soundings ? pointsOf(chart) : [],
      changed: changedWater(chart, ground.water),
      pegs: pegsForMap(chart.pegs),
      marks: chart.marks,
      places: chart.places,
      spots,
    }),
    [ground, allBottom, shown.soundings, chart, spots],
  );
  return { content, layers, raisedM, isToday };
}
