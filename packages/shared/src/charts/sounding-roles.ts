import type { Outline } from '../geometry/polygon';
import { insideOutline } from '../geometry/polygon';
import { distanceToShoreM } from '../geometry/shore-distance';
import type { Grade } from '../surveys/contract';
import type { Sounding } from './samples';

export type ChartSounding = Sounding & { grade: Grade };
export type LeftOut = { id: string; why: string };

export type SoundingRoles = {
  surface: ChartSounding[]; // grades A and B on the water: contours come from these alone
  shown: ChartSounding[]; // A, B and C on the water, by id
  leftOut: LeftOut[];
};

/** Fewer places than this say nothing of a bed between them. Common practice, no published source. */
export const FEWEST_SOUNDINGS = 12;

/** Sorts soundings by what they may be used for. Throws RangeError, in words, when too few are left for a surface. */
export function sortSoundings(soundings: readonly ChartSounding[], outline: Outline): SoundingRoles {
  const roles: SoundingRoles = { surface: [], shown: [], leftOut: [] };
  const sorted = [...soundings].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  for (const sounding of sorted) {
    const { id, xM, yM, depthM, sigmaM, grade } = sounding;
    requireFinite(sounding);
    if (grade === 'D') roles.leftOut.push({ id, why: 'Graded D: kept for staff, not charted.' });
    else if (!insideOutline(outline, { xM, yM })) {
      const outM = distanceToShoreM(outline, { xM, yM });
      roles.leftOut.push({ id, why: `Its place is ${outM.toFixed(1)} m outside the outline of the water.` });
    } else {
      const kept = { id, xM, yM, depthM, sigmaM, grade };
      roles.shown.push(kept);
      if (grade !== 'C') roles.surface.push(kept);
    }
  }
  if (roles.surface.length < FEWEST_SOUNDINGS) {
    throw new RangeError(
      `Only ${roles.surface.length} casts of grade A or B lie on this water; a chart needs at least ${FEWEST_SOUNDINGS}. ` +
        'Add casts, or see why others were graded lower.',
    );
  }
  return roles;
}

/** Casts on one spot are one place; throws RangeError, in words, when they leave too few. */
export function requirePlaces(count: number): void {
  if (count >= FEWEST_SOUNDINGS) return;
  throw new RangeError(
    `The casts of grade A or B lie at only ${count} places; a chart needs at least ${FEWEST_SOUNDINGS}. Cast elsewhere too.`,
  );
}

function requireFinite({ id, xM, yM, depthM, sigmaM }: ChartSounding): void {
  if (![xM, yM, depthM, sigmaM].every(Number.isFinite) || sigmaM < 0) {
    throw new RangeError(
      `Sounding ${id} has a place, depth or σ that is not a usable number; reduce it again.`,
    );
  }
}
