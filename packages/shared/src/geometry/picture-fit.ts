import { distanceBetweenM, type Point } from './point';

/** A pixel of a picture, right and down from its top left corner. */
export type Pixel = { xPx: number; yPx: number };

/** A pixel and the point of the plane it shows. */
export type ControlPoint = Pixel & { at: Point };

/** Turned, scaled and shifted alike in every direction; or stretched and sheared besides. */
export type FitKind = 'similarity' | 'affine';

/** How a picture lies on the plane: xM = xx·xPx + xy·yPx + x0 and yM = yx·xPx + yy·yPx + y0, metres. */
export type PictureTransform = { xx: number; xy: number; x0: number; yx: number; yy: number; y0: number };

export type PictureFit = {
  transform: PictureTransform;
  /** Metres in the plane from where the fit puts each control point to where it is, in their order. */
  residualsM: number[];
  /** Root mean square of the residuals, metres. */
  rmsM: number;
  /**
   * σ of a point read off the picture, in each direction, by what the fit has to spare; null where it has nothing
   * (two points always fit a similarity, three an affinity): then nothing checks them.
   */
  sigmaM: number | null;
};

export const FEWEST_POINTS: Record<FitKind, number> = { similarity: 2, affine: 4 };
const UNKNOWNS: Record<FitKind, number> = { similarity: 4, affine: 6 };

type Centred = { dx: number; dy: number; east: number; north: number };

/**
 * The least-squares fit of a picture to the plane from known points. Null where there are too few, or where they lie
 * too close or, for an affinity, too near one line to say how the picture lies.
 *
 * Similarity: with w = x − iy of a pixel and z of its place, both from their means, z ≈ c·w and c = Σ z·w̄ / Σ |w|²; in
 * two dimensions this is Umeyama's solution with reflections left out. Source: Umeyama, Least-squares estimation of
 * transformation parameters between two point patterns, IEEE PAMI 13, 1991, eq. 40–43. Affinity: normal equations.
 */
export function pictureFit(points: readonly ControlPoint[], kind: FitKind): PictureFit | null {
  const count = points.length;
  if (count < FEWEST_POINTS[kind]) return null;
  const mean = (of: (point: ControlPoint) => number): number =>
    points.reduce((sum, point) => sum + of(point), 0) / count;
  const [meanXPx, meanYPx] = [mean(({ xPx }) => xPx), mean(({ yPx }) => yPx)];
  const [meanXM, meanYM] = [mean(({ at }) => at.xM), mean(({ at }) => at.yM)];
  const centred = points.map(({ xPx, yPx, at }) => ({
    dx: xPx - meanXPx,
    dy: yPx - meanYPx,
    east: at.xM - meanXM,
    north: at.yM - meanYM,
  }));
  const turn = kind === 'similarity' ? similarity(centred) : affinity(centred);
  if (!turn) return null;
  const { xx, xy, yx, yy } = turn;
  const transform = {
    ...turn,
    x0: meanXM - xx * meanXPx - xy * meanYPx,
    y0: meanYM - yx * meanXPx - yy * meanYPx,
  };
  const residualsM = points.map((point) => distanceBetweenM(onPlane(transform, point), point.at));
  const squares = residualsM.reduce((sum, residualM) => sum + residualM ** 2, 0);
  const spare = 2 * count - UNKNOWNS[kind];
  return {
    transform,
    residualsM,
    rmsM: Math.sqrt(squares / count),
    sigmaM: spare > 0 ? Math.sqrt(squares / spare) : null,
  };
}

type Turn = Pick<PictureTransform, 'xx' | 'xy' | 'yx' | 'yy'>;

/** Points nearer to one another than this on average, px or metres, say nothing of the picture's turn. */
const LEAST_SPREAD = 1e-3;

const sum = (points: readonly Centred[], of: (point: Centred) => number): number =>
  points.reduce((total, point) => total + of(point), 0);

function similarity(points: readonly Centred[]): Turn | null {
  const spread = sum(points, ({ dx, dy }) => dx * dx + dy * dy);
  const spreadM = sum(points, ({ east, north }) => east * east + north * north);
  const least = points.length * LEAST_SPREAD ** 2;
  if (spread < least || spreadM < least) return null;
  const a = sum(points, ({ dx, dy, east, north }) => dx * east - dy * north) / spread;
  const b = sum(points, ({ dx, dy, east, north }) => dx * north + dy * east) / spread;
  return a * a + b * b > 0 ? { xx: a, xy: b, yx: b, yy: -a } : null;
}

/** Least ratio of the spread across the points to the spread along them: below it they lie on a line. */
const LEAST_WIDTH = 0.02;

function affinity(points: readonly Centred[]): Turn | null {
  const sxx = sum(points, ({ dx }) => dx * dx);
  const sxy = sum(points, ({ dx, dy }) => dx * dy);
  const syy = sum(points, ({ dy }) => dy * dy);
  const determinant = sxx * syy - sxy * sxy;
  // The eigenvalues' product against their sum's square: for a thin cloud, its width over its length, squared.
  if (!(determinant > LEAST_WIDTH ** 2 * (sxx + syy) ** 2)) return null;
  const solved = (toX: number, toY: number): [number, number] => [
    (syy * toX - sxy * toY) / determinant,
    (sxx * toY - sxy * toX) / determinant,
  ];
  const [xx, xy] = solved(
    sum(points, ({ dx, east }) => dx * east),
    sum(points, ({ dy, east }) => dy * east),
  );
  const [yx, yy] = solved(
    sum(points, ({ dx, north }) => dx * north),
    sum(points, ({ dy, north }) => dy * north),
  );
  // A picture seen from above is never mirrored: down in it is to the right of right, turned as clocks go.
  return xx * yy - xy * yx < 0 ? { xx, xy, yx, yy } : null;
}

/** Where a pixel lies in the plane. */
export const onPlane = (t: PictureTransform, { xPx, yPx }: Pixel): Point => ({
  xM: t.xx * xPx + t.xy * yPx + t.x0,
  yM: t.yx * xPx + t.yy * yPx + t.y0,
});

/** Metres of the plane in one pixel: the root of the area a pixel covers. */
export const metresPerPixel = ({ xx, xy, yx, yy }: PictureTransform): number =>
  Math.sqrt(Math.abs(xx * yy - xy * yx));
