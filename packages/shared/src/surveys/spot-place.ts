import { planeBearingDeg, type Point } from '../geometry/plane';
import { insideOutline, insideRing, type Outline } from '../geometry/polygon';
import { distanceToShoreM, waterRunM } from '../geometry/shore-distance';
import { refuse, type Refusal } from './cast-site';

const REMEDY = 'Check the mark or bearing, the wraps and the sticks; what was observed is kept as it is';

/**
 * Is the spot on the water of the lake? On land, on an island or beyond the far bank is refused, with how far. A line that
 * crosses land on its way to water is taken with a warning, since a point or island may truly be cast over.
 */
export function spotPlace(
  outline: Outline,
  stance: Point,
  spot: Point,
): { ok: true; warnings: string[] } | Refusal {
  const rangeM = Math.hypot(spot.xM - stance.xM, spot.yM - stance.yM);
  const bearingDeg = planeBearingDeg(stance, spot);
  const ray = { bearingDeg, limitM: Math.max(rangeM, 1) };
  if (insideOutline(outline, spot)) {
    const run = waterRunM(outline, stance, ray);
    const overLand = run === null || run.leavesAtM < rangeM - 1e-6;
    const words = 'The line crosses land before it reaches the spot: is the mark or bearing right?';
    return { ok: true, warnings: overLand ? [words] : [] };
  }
  const offM = distanceToShoreM(outline, spot);
  if (outline.islands.some((island) => insideRing(island, spot))) {
    return refuse(`The spot falls on an island, ${offM.toFixed(1)} m from its edge`, REMEDY);
  }
  const run = waterRunM({ shore: outline.shore, islands: [] }, stance, ray);
  if (run && run.leavesAtM < rangeM) {
    const words = `The spot falls beyond the far bank: the line meets it at ${run.leavesAtM.toFixed(1)} m and the spot lies ${offM.toFixed(1)} m outside the water`;
    return refuse(words, REMEDY);
  }
  return refuse(`The spot falls on land, ${offM.toFixed(1)} m outside the water`, REMEDY);
}
