import { useCallback, useMemo, useState } from 'react';
import type { Line } from '@mereward/shared/charts/drawing/mark';
import { bestFit, type View } from '@mereward/shared/charts/drawing/view';
import { pannedView } from '@mereward/shared/charts/drawing/view-moves';

export type Size = { widthPx: number; heightPx: number };

const SCALE_STRIP_PX = 30;
const MARGIN_PX = 34; // the pegs' numbers stand on the land side
const CLOSEST_PX_PER_M = 40;
const FARTHEST_SHARE = 0.6; // of the scale that shows all of it

/** All of the water, above the strip where the scale bar stands. */
function wholeView(water: readonly Line[], size: Size): View {
  const page = { widthPx: size.widthPx, heightPx: Math.max(1, size.heightPx - SCALE_STRIP_PX) };
  const fitted = bestFit(water, { ...page, marginPx: Math.min(MARGIN_PX, size.widthPx / 8) });
  return pannedView({ ...fitted, ...size }, 0, -SCALE_STRIP_PX / 2);
}

/** The reader's view of a map: all of it until they move, and then where they left it, whatever the page's size. */
export function useMapView(water: readonly Line[], size: Size) {
  const [chosen, setChosen] = useState<View | null>(null);
  const whole = useMemo(
    () => (size.widthPx > 0 && size.heightPx > 0 && water.length > 0 ? wholeView(water, size) : null),
    [water, size],
  );
  const view = useMemo(() => (chosen ? { ...chosen, ...size } : whole), [chosen, whole, size]);
  const fit = useCallback(() => setChosen(null), []);
  const limits = {
    leastPxPerM: (whole?.pxPerM ?? 1) * FARTHEST_SHARE,
    mostPxPerM: Math.max(CLOSEST_PX_PER_M, whole?.pxPerM ?? 1),
  };
  return { view, limits, onView: setChosen, fit, isWhole: chosen === null };
}
