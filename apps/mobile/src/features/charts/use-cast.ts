import { useMemo, useState } from 'react';
import type { ChartView, SectionPoint } from '@mereward/shared/charts/contract';
import type { Point } from '@mereward/shared/geometry/plane';
import { useChartUnits } from './use-chart-units';
import { useSection } from './api';
import { aimedAt, drawnCast, lineOutAt, openWaterM, type AimedCast } from './drawn-cast';
import { planeOutline } from './readied-chart';

const USUAL_WRAPS = 10;
/** How far a section is read, metres: the longest cast a fishery may allow is a good deal less. */
const SECTION_TO_M = 100;
const NO_POINTS: readonly SectionPoint[] = [];

type Peg = ChartView['pegs'][number];

/** A cast drawn from the chosen peg, as far as land: by a drag on the map, or by choosing bearing and wraps. */
export function useCast(chart: ChartView, peg: Peg | null) {
  const { stickSpacingM } = useChartUnits();
  const outline = useMemo(() => planeOutline(chart.outline, chart.origin), [chart]);
  const [aims, setAims] = useState<Record<string, AimedCast>>({});
  const [dragged, setDragged] = useState<AimedCast | null>(null);
  const own = peg ? aims[peg.id] : undefined;
  const bearingDeg = own?.bearingDeg ?? Math.round(peg?.facingDeg ?? 0) % 360;
  const toM = useMemo(
    () => (peg ? openWaterM(outline, peg, { bearingDeg, mostM: SECTION_TO_M }) : 0),
    [outline, peg, bearingDeg],
  );
  const section = useSection(peg ? { pegId: peg.id, bearingDeg, toM } : null);
  const points = section.data?.points ?? NO_POINTS;
  const settled = useMemo((): AimedCast | null => {
    if (!peg) return null;
    const mostM = points.at(-1)?.lineOutM ?? toM;
    return { bearingDeg, lineOutM: Math.min(own?.lineOutM ?? USUAL_WRAPS * stickSpacingM, mostM) };
  }, [peg, own, bearingDeg, points, toM, stickSpacingM]);
  const cast = useMemo(() => {
    const aimed = dragged ?? settled;
    if (!peg || !aimed) return null;
    return drawnCast(peg, aimed, { points: dragged ? NO_POINTS : points, stickSpacingM });
  }, [peg, dragged, settled, points, stickSpacingM]);
  const aim = (next: AimedCast): void => {
    if (peg) setAims((before) => ({ ...before, [peg.id]: next }));
  };
  const drag = (place: Point, done: boolean): void => {
    if (!peg) return;
    const aimed = aimedAt(peg, place, SECTION_TO_M);
    setDragged(done ? null : aimed);
    if (done) aim({ ...aimed, lineOutM: points.length ? lineOutAt(points, aimed.lineOutM) : aimed.lineOutM });
  };
  return { settled, mostM: points.at(-1)?.lineOutM ?? toM, cast, section, points, aim, drag };
}
