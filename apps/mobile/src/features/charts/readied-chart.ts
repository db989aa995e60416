import { readChart, type ChartLayers, type ChartReading } from '@mereward/shared/charts/chart-reading';
import type { ChartView } from '@mereward/shared/charts/contract';
import { groundOf, type Ground } from '@mereward/shared/charts/drawing/ground';
import { toPlane, type LonLat, type Point } from '@mereward/shared/geometry/plane';
import type { Outline } from '@mereward/shared/geometry/polygon';
import type { LakePolygon } from '@mereward/shared/lakes/contract';

/** A polygon of the globe laid on the lake's plane, its rings open. */
export function planeOutline(polygon: LakePolygon, origin: LonLat): Outline {
  const rings = polygon.coordinates.map((ring) => ring.slice(0, -1).map((place) => toPlane(origin, place)));
  const [shore = [], ...islands] = rings;
  return { shore, islands };
}

export type GroundTerms = { raisedM: number; stepM: number; showDepth: boolean };

/** The chart made ready for drawing at a water level. The published isobaths are drawn as they are where they fit. */
export function groundOfChart(chart: ChartView, layers: ChartLayers | null, terms: GroundTerms): Ground {
  const published = terms.stepM === chart.contourStepM;
  return groundOf({
    outline: planeOutline(chart.outline, chart.origin),
    depth: terms.showDepth && chart.depth && layers ? layers.depth : null,
    isobaths: published ? chart.isobaths : null,
    stepM: terms.stepM,
    raisedM: terms.raisedM,
  });
}

/** The water's level above the chart's datum now; null when nobody read the board. */
export const raisedNowM = (chart: Pick<ChartView, 'levelNow' | 'datumM'>): number | null =>
  chart.levelNow ? chart.levelNow.levelM - chart.datumM : null;

/** What the chart says of a place, or null off its grid. */
export const readingAt = (layers: ChartLayers | null, place: Point): ChartReading | null =>
  layers ? readChart(layers, place) : null;
