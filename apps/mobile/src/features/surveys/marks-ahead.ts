import { bearingDifferenceDeg } from '@mereward/shared/geometry/geodesic';
import { planeBearingDeg, toPlane } from '@mereward/shared/geometry/plane';
import type { LakeView, MarkView } from '@mereward/shared/lakes/contract';

type Water = Pick<LakeView, 'origin' | 'pegs' | 'marks'>;

/** The lake's marks as somebody on a peg meets them: the one nearest to straight out first. */
export function marksAhead({ origin, pegs, marks }: Water, pegId: string): MarkView[] {
  const peg = pegs.find(({ id }) => id === pegId);
  if (!peg) return [...marks];
  const stance = toPlane(origin, peg.position);
  const besideDeg = ({ details }: MarkView): number =>
    Math.abs(bearingDifferenceDeg(planeBearingDeg(stance, toPlane(origin, details.position)), peg.facingDeg));
  return [...marks].sort((a, b) => besideDeg(a) - besideDeg(b));
}
