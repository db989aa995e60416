import type { NextCast, NextCasts } from '@mereward/shared/charts/chart-answers';
import { distanceBetweenM, type Point } from '@mereward/shared/geometry/point';

const CAST_THERE_M = 3; // a cast of this visit so near has done what the suggestion was for

/** Casts not made yet on this visit, the most telling first. */
export function castsAhead(
  answer: NextCasts | undefined,
  pegId: string,
  made: readonly Point[],
): readonly NextCast[] {
  const casts = answer?.pegs?.find((peg) => peg.pegId === pegId)?.casts ?? [];
  return casts.filter((next) => made.every((cast) => distanceBetweenM(cast, next) > CAST_THERE_M));
}
