import type { Point } from '@mereward/shared/geometry/plane';
import type { Grade } from '@mereward/shared/surveys/contract';

type Cast = Point & { id: string; grade: Grade };

/**
 * The cast a spot is quoted from: of those within its usable radius (metres) the best graded, then the nearest; D never.
 * A cast that was made there says more of the place than a surface smoothed over its neighbours, and of two throws at
 * one place the surer one counts.
 */
export function castToQuote<C extends Cast>(casts: readonly C[], place: Point, radiusM: number): C | null {
  const away = (cast: Cast): number => Math.hypot(cast.xM - place.xM, cast.yM - place.yM);
  const near = casts.filter((cast) => cast.grade !== 'D' && away(cast) <= radiusM);
  const order = (a: C, b: C): number =>
    a.grade.localeCompare(b.grade) || away(a) - away(b) || a.id.localeCompare(b.id);
  return [...near].sort(order)[0] ?? null;
}
