import type { Grade } from './contract';
import { GRADE_LIMITS } from './grade';

/**
 * Grade of a sounding from a log, by the same limits as a cast's: σ of A ≤ 1 m and 0.15 m, B ≤ 2 m and 0.3 m, C ≤ 4 m and
 * 0.6 m, D more. No better than C where the board was not read within a fortnight. σ in metres.
 */
export function logGrade(sigma: { positionM: number; depthM: number; levelKnown: boolean }): Grade {
  const met = GRADE_LIMITS.find(
    ({ positionM, depthM }) => sigma.positionM <= positionM && sigma.depthM <= depthM,
  );
  const grade = met?.grade ?? 'D';
  return sigma.levelKnown || grade > 'C' ? grade : 'C';
}

/** What the grade means for the chart, and what would make it better. */
export function logGradeWords(grade: Grade, positionSigmaM: number): string {
  const sure = `Places are sure to ± ${positionSigmaM} m`;
  switch (grade) {
    case 'A':
    case 'B':
      return `${sure}: contours are drawn from these soundings.`;
    case 'C':
      return `${sure}: the soundings will be shown as points. Contours are drawn where places are sure to ± 2 m and depths to ± 0.3 m.`;
    case 'D':
      return `${sure}: that is too coarse for a chart. The soundings are kept for staff.`;
  }
}
