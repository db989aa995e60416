import { useMemo, useState } from 'react';
import type { ChartView, SectionPoint } from '@mereward/shared/charts/contract';
import type { Point } from '@mereward/shared/geometry/plane';
import { useUnits } from '@/hooks/use-units';
import { useSection } from './api';
import { aimedAt, drawnCast, lineOutAt, type AimedCast } from './drawn-cast';

const USUAL_WRAPS = 10;
/** How far a section is read, metres: the longest cast a fishery may allow is a good deal less. */
export const SECTION_TO_M = 100;
const NO_POINTS: readonly SectionPoint[] = [];

type Peg = ChartView['pegs'][number];

/** A cast drawn from the chosen peg: by a drag on the map, or by choosing bearing and wraps. */
export function useCast(peg: Peg | null) {
  const { stickSpacingM } = useUnits();
  const [aims, setAims] = useState<Record<string, AimedCast>>({});
  const [dragged, setDragged] = useState<AimedCast | null>(null);
  const own = peg ? aims[peg.id] : undefined;
  const settled = useMemo((): AimedCast | null => {
    if (!peg) return null;
    return own ?? { bearingDeg: Math.round(peg.facingDeg) % 360, lineOutM: USUAL_WRAPS * stickSpacingM };
  }, [peg, own, stickSpacingM]);
  const section = useSection(
    peg && settled ? { pegId: peg.id, bearingDeg: settled.bearingDeg, toM: SECTION_TO_M } : null,
  );
  const points = section.data?.points ?? NO_POINTS;
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
  return { settled, cast, section, points, aim, drag };
}
