import { pictureFit, type FitKind, type PictureFit, type PictureTransform } from '../geometry/picture-fit';
import { toPlane, type LonLat } from '../geometry/plane';
import type { PicturePoint } from './picture-contract';

/** A picture missed by more than this, root mean square, metres, is warned of. Common practice, no published source. */
export const RMS_LIMIT_M = 2;
/** Points that span less than this share of the picture's diagonal say little of the rest of it. */
const LEAST_SPAN = 0.25;
/** A picture stretched by more than this was hardly taken straight down. */
const MOST_STRETCH = 1.1;

/** The fit of a picture to a lake's plane by its known points; null where they don't say how it lies. */
export const placedPicture = (
  points: readonly PicturePoint[],
  { origin, fit }: { origin: LonLat; fit: FitKind },
): PictureFit | null =>
  pictureFit(
    points.map(({ xPx, yPx, position }) => ({ xPx, yPx, at: toPlane(origin, position) })),
    fit,
  );

export type PictureCaution =
  | { kind: 'unchecked' }
  | { kind: 'misses'; rmsM: number; worst: string; worstM: number }
  | { kind: 'narrow' }
  | { kind: 'stretched'; share: number };

/** What to be told of a fit before tracing by it; nothing when there is nothing against it. */
export function pictureCautions(
  fit: PictureFit,
  points: readonly PicturePoint[],
  size: { widthPx: number; heightPx: number },
): PictureCaution[] {
  const cautions: PictureCaution[] = [];
  const worst = worstPoint(fit);
  if (fit.sigmaM === null) cautions.push({ kind: 'unchecked' });
  if (fit.rmsM > RMS_LIMIT_M)
    cautions.push({
      kind: 'misses',
      rmsM: fit.rmsM,
      worst: points[worst]?.label ?? '',
      worstM: fit.residualsM[worst] ?? 0,
    });
  if (spanPx(points) < LEAST_SPAN * Math.hypot(size.widthPx, size.heightPx))
    cautions.push({ kind: 'narrow' });
  const stretch = stretchOf(fit.transform);
  if (stretch > MOST_STRETCH) cautions.push({ kind: 'stretched', share: stretch - 1 });
  return cautions;
}

/** The point the fit misses most. */
export const worstPoint = ({ residualsM }: Pick<PictureFit, 'residualsM'>): number =>
  residualsM.reduce((worst, residualM, i) => (residualM > (residualsM[worst] ?? 0) ? i : worst), 0);

/** The longest way between two of the points, px. */
const spanPx = (points: readonly PicturePoint[]): number =>
  Math.max(0, ...points.flatMap((a) => points.map((b) => Math.hypot(a.xPx - b.xPx, a.yPx - b.yPx))));

/** How much longer a metre is drawn one way than another: the ratio of the transform's singular values. */
function stretchOf({ xx, xy, yx, yy }: PictureTransform): number {
  const squares = xx * xx + xy * xy + yx * yx + yy * yy;
  const twiceArea = 2 * Math.abs(xx * yy - xy * yx);
  const difference = Math.sqrt(Math.max(0, squares * squares - twiceArea * twiceArea));
  return Math.sqrt((squares + difference) / (squares - difference));
}
