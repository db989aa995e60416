import type { PictureTransform } from '@mereward/shared/geometry/picture-fit';
import { toPage, type View } from '@mereward/shared/charts/drawing/view';

/** A picture that lies under a canvas: its bytes' address, its size, how it lies in the plane, how strongly it shows. */
export type Backdrop = {
  url: string;
  widthPx: number;
  heightPx: number;
  transform: PictureTransform;
  opacity: number;
};

/** The CSS transform that lays a picture's pixels on the page of a view, from the page's top left corner. */
export function cssTransformOf({ transform: t }: Pick<Backdrop, 'transform'>, view: View): string {
  const corner = toPage(view, t.x0, t.y0);
  const right = toPage(view, t.x0 + t.xx, t.y0 + t.yx);
  const down = toPage(view, t.x0 + t.xy, t.y0 + t.yy);
  const parts = [
    right.x - corner.x,
    right.y - corner.y,
    down.x - corner.x,
    down.y - corner.y,
    corner.x,
    corner.y,
  ];
  return `matrix(${parts.map((part) => part.toFixed(8)).join(', ')})`;
}

/** A picture in a plane of its own pixels: right as they run, down below nought. */
export const OWN_PIXELS: PictureTransform = { xx: 1, xy: 0, x0: 0, yx: 0, yy: -1, y0: 0 };
