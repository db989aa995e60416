import type { FitKind } from '@mereward/shared/geometry/picture-fit';
import type { LonLat } from '@mereward/shared/geometry/plane';
import type { LakePictureView, PicturePoint } from '@mereward/shared/lakes/picture-contract';
import { placedPicture } from '@mereward/shared/lakes/picture-placing';
import { z } from 'zod';
import { positionText, readPosition, typedPosition } from '@/lib/position-text';

/** A point as it is being set: its place is text until it is whole. */
const TypedPoint = z.object({
  label: z.string().trim().min(1, 'Say what this point is, such as “the corner of the sluice”').max(60),
  xPx: z.number(),
  yPx: z.number(),
  position: typedPosition('Choose or type where this point is'),
});
export type DraftPoint = z.input<typeof TypedPoint>;

export const TypedPoints = z.object({
  fit: z.enum(['similarity', 'affine']),
  points: z.array(TypedPoint).max(40),
});
export type DraftPoints = z.input<typeof TypedPoints>;

export const draftOf = ({ fit, points }: Pick<LakePictureView, 'fit' | 'points'>): DraftPoints => ({
  fit,
  points: points.map((point) => ({ ...point, position: positionText(point.position) })),
});

/** The points whose place is known so far, with their order among all. */
export function finishedPoints(points: readonly DraftPoint[]): { at: number; point: PicturePoint }[] {
  return points.flatMap(({ label, xPx, yPx, position }, at) => {
    const read = readPosition(position);
    return read
      ? [{ at, point: { label: label || `Point ${String(at + 1)}`, xPx, yPx, position: read } }]
      : [];
  });
}

export type Fitting = {
  fit: NonNullable<ReturnType<typeof placedPicture>>;
  /** The points it was made with. */
  points: PicturePoint[];
  /** Metres each of the draft's points is missed by; null for one without a place. */
  missedM: (number | null)[];
};

/** How the picture would lie by what is set so far; null where that doesn't say. */
export function fittingOf({ fit: kind, points }: DraftPoints, origin: LonLat): Fitting | null {
  const finished = finishedPoints(points);
  const fit = placedPicture(
    finished.map(({ point }) => point),
    { origin, fit: kind satisfies FitKind },
  );
  if (!fit) return null;
  const missedM: (number | null)[] = points.map(() => null);
  finished.forEach(({ at }, i) => {
    missedM[at] = fit.residualsM[i] ?? null;
  });
  return { fit, points: finished.map(({ point }) => point), missedM };
}
