import type { Point } from '../../geometry/plane';
import { fromPage, type PagePoint, type View } from './view';

/** Closest and farthest a reader may zoom, px per metre. */
export type ZoomLimits = { leastPxPerM: number; mostPxPerM: number };

/** A movement of the picture on the page: scaled by `scale` about `from`, then `from` carried to `to`. */
export type Movement = { scale: number; from: PagePoint; to: PagePoint };

export const clampedScale = (view: View, scale: number, limits: ZoomLimits): number =>
  Math.min(limits.mostPxPerM / view.pxPerM, Math.max(limits.leastPxPerM / view.pxPerM, scale));

/** The view that shows what the moved picture showed: the place under `from` now lies under `to`. */
export function movedView(view: View, { scale, from, to }: Movement): View {
  const scaled = { ...view, pxPerM: view.pxPerM * scale };
  const held = fromPage(view, from.x, from.y);
  const under = fromPage(scaled, to.x, to.y);
  return {
    ...scaled,
    centre: {
      xM: view.centre.xM + held.xM - under.xM,
      yM: view.centre.yM + held.yM - under.yM,
    },
  };
}

/** Scaled about the middle of the page. */
export function zoomedView(view: View, scale: number, limits: ZoomLimits): View {
  return { ...view, pxPerM: view.pxPerM * clampedScale(view, scale, limits) };
}

/** The picture pushed by so many px right and down. */
export function pannedView(view: View, rightPx: number, downPx: number): View {
  return movedView(view, { scale: 1, from: { x: 0, y: 0 }, to: { x: rightPx, y: downPx } });
}

/** Centred on a place, no farther off than `pxPerM`. */
export const centredView = (view: View, centre: Point, pxPerM: number): View => ({
  ...view,
  centre,
  pxPerM: Math.max(view.pxPerM, pxPerM),
});

/** The view with its page grown by a share on every side, so that a pan has something to show. */
export function grownView(view: View, share: number): View {
  return { ...view, widthPx: view.widthPx * (1 + 2 * share), heightPx: view.heightPx * (1 + 2 * share) };
}
