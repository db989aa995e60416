import { pointAlong, type Point } from '../geometry/point';
import { readChart } from './chart-reading';
import type { ChartLayers, ChartReading } from './chart-reading';

/** A point of a section: its range from the stance, its place, what the chart says, and the 95 % band of depth. */
export type SectionReading = ChartReading & {
  rangeM: number;
  xM: number;
  yM: number;
  shallowestM: number | null; // depth − 1.96 σ, never above the surface
  deepestM: number | null;
};

export type SectionLine = { bearingDeg: number; toM: number; stepM?: number };

/**
 * Depth with its 95 % band and bottom along a bearing (degrees clockwise from the plane's north) from a stance out to
 * `toM` metres. Depths at datum; add gauge − datum for today's. Points are a cell apart unless a step is given; gaps in
 * the survey come back as null, never bridged.
 */
export function sectionAlong(chart: ChartLayers, stance: Point, line: SectionLine): SectionReading[] {
  const stepM = line.stepM ?? chart.depth.cellM;
  if (!(stepM > 0 && line.toM >= 0 && Number.isFinite(line.bearingDeg))) {
    throw new RangeError('A section needs a bearing, a length and a step of more than nothing.');
  }
  const count = Math.floor(line.toM / stepM + 1e-9);
  return Array.from({ length: count + 1 }, (_, i) => {
    const rangeM = i * stepM;
    const place = pointAlong(stance, line.bearingDeg, rangeM);
    const reading = readChart(chart, place);
    return { rangeM, ...place, ...reading, ...bandOf(reading) };
  });
}

function bandOf({ depthM, sigmaM }: ChartReading): { shallowestM: number | null; deepestM: number | null } {
  if (depthM === null || sigmaM === null) return { shallowestM: null, deepestM: null };
  return { shallowestM: Math.max(0, depthM - 1.96 * sigmaM), deepestM: depthM + 1.96 * sigmaM };
}
