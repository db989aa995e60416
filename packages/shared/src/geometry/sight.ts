import type { Point } from './point';
import { insideOutline, ringsOf, sidesOf, type Outline } from './polygon';
import { distanceToShoreM } from './shore-distance';

const BINS = 720;
const TURN = 2 * Math.PI;
/** Strip of land in front of a stance that a line may cross, beyond what parts the stance from the water, metres. */
const BANK_M = 5;

/** Can a place on the water, in plane metres, be seen straight from the stance? */
export type Sight = (xM: number, yM: number) => boolean;

/**
 * Straight sight over the water from a stance: nothing of the shore or of an island lies between. What the stance stands
 * behind (its own distance from the water and 5 m) doesn't count. Sides of the outline are sorted into half degrees once, so
 * that each question looks at the few it can meet. The answer is for places on the water only.
 */
export function sightFrom(outline: Outline, stance: Point): Sight {
  const bankM = BANK_M + (insideOutline(outline, stance) ? 0 : distanceToShoreM(outline, stance));
  const sides = ringsOf(outline).flatMap((ring) => [...sidesOf(ring)]);
  const bins: number[][] = Array.from({ length: BINS }, () => []);
  sides.forEach(([a, b], i) => {
    for (const bin of binsOf(stance, a, b)) bins[bin]!.push(i);
  });
  return (xM, yM) => {
    const dx = xM - stance.xM;
    const dy = yM - stance.yM;
    const rangeM = Math.hypot(dx, dy);
    if (rangeM <= bankM) return true;
    const least = bankM / rangeM;
    for (const i of bins[binOf(dx, dy)]!) {
      const [a, b] = sides[i]!;
      const sx = b.xM - a.xM;
      const sy = b.yM - a.yM;
      const cross = dx * sy - dy * sx;
      if (cross === 0) continue;
      const qx = a.xM - stance.xM;
      const qy = a.yM - stance.yM;
      const t = (qx * sy - qy * sx) / cross;
      const u = (qx * dy - qy * dx) / cross;
      if (t > least && t < 1 && u >= 0 && u <= 1) return false;
    }
    return true;
  };
}

function binOf(dx: number, dy: number): number {
  const turn = Math.atan2(dy, dx) / TURN;
  return Math.min(BINS - 1, Math.floor((turn < 0 ? turn + 1 : turn) * BINS));
}

/** Every bin a side is seen in, a neighbour to spare at both ends. */
function binsOf(from: Point, a: Point, b: Point): number[] {
  const start = binOf(a.xM - from.xM, a.yM - from.yM);
  const end = binOf(b.xM - from.xM, b.yM - from.yM);
  const over = (end - start + BINS) % BINS;
  const [first, count] = over <= BINS / 2 ? [start, over] : [end, BINS - over];
  if (count >= BINS / 2 - 2) return [...Array(BINS).keys()]; // the stance lies on the side itself
  return Array.from({ length: count + 3 }, (_, i) => (first + i - 1 + BINS) % BINS);
}
