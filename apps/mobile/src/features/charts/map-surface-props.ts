import type { View as MapView } from '@mereward/shared/charts/drawing/view';
import type { ZoomLimits } from '@mereward/shared/charts/drawing/view-moves';
import type { Point } from '@mereward/shared/geometry/plane';
import type { Backdrop } from './picture-backdrop';

/** Share of the page drawn beyond each of its edges, so that a pan has something to show before the redraw. */
export const OVERSCAN = 0.25;

export type MapSurfaceProps = {
  /** A picture under the drawing; it moves with the map. */
  backdrop?: Backdrop | undefined;
  /** Drawn one over the other for `view` grown by `OVERSCAN`; they move with the map. */
  layers: readonly string[];
  /** Stands still over the map: scale bar, north. */
  fixed: string;
  view: MapView;
  limits: ZoomLimits;
  label: string;
  onView: (view: MapView) => void;
  onFit: () => void;
  onTap: (place: Point) => void;
  /** Is there something at this place that a drag takes hold of, instead of moving the map? */
  grabs: (place: Point) => boolean;
  onDrag: (place: Point, done: boolean) => void;
};
