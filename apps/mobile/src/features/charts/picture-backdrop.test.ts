import type { View } from '@mereward/shared/charts/drawing/view';
import { toPage } from '@mereward/shared/charts/drawing/view';
import { onPlane } from '@mereward/shared/geometry/picture-fit';
import { expect, test } from 'vitest';
import { cssTransformOf } from './picture-backdrop';

test.each([0, -90, 33])(
  'a pixel lands where the plane’s drawing of its place lands, turned by %i°',
  (turnDeg) => {
    const view: View = { widthPx: 400, heightPx: 300, pxPerM: 1.7, centre: { xM: 12, yM: -8 }, turnDeg };
    const transform = { xx: 0.11, xy: 0.02, x0: -140, yx: 0.02, yy: -0.11, y0: 90 };
    const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = (
      cssTransformOf({ transform }, view).match(/-?\d+\.\d+/g) ?? []
    ).map(Number);
    for (const [xPx, yPx] of [
      [0, 0],
      [3200, 0],
      [1600, 1200],
    ] as const) {
      const { xM, yM } = onPlane(transform, { xPx, yPx });
      const { x, y } = toPage(view, xM, yM);
      // matrix(a, b, c, d, e, f) maps x to ax + cy + e and y to bx + dy + f: CSS Transforms 1, section 12.
      expect(a * xPx + c * yPx + e).toBeCloseTo(x, 3);
      expect(b * xPx + d * yPx + f).toBeCloseTo(y, 3);
    }
  },
);
