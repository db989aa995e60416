import type { Point } from './point';
import { insideRing, signedAreaM2, type Outline } from './polygon';

/**
 * Rings that turn counter-clockwise round what they hold and clockwise round what is cut out of it, put together as
 * polygons: each hole goes to the smallest ring about it. Rings are open; those that hold nothing are let go.
 */
export function polygonsOf(rings: readonly (readonly Point[])[]): Outline[] {
  const sized = rings
    .map((ring) => ({ ring: [...ring], areaM2: signedAreaM2(ring) }))
    .filter(({ ring, areaM2 }) => ring.length >= 3 && areaM2 !== 0);
  const outer = sized
    .filter(({ areaM2 }) => areaM2 > 0)
    .sort((a, b) => a.areaM2 - b.areaM2)
    .map(({ ring, areaM2 }) => ({ areaM2, outline: { shore: ring, islands: [] as Point[][] } }));
  for (const { ring, areaM2 } of sized) {
    const first = ring[0];
    if (areaM2 > 0 || !first) continue;
    const around = outer.find(
      (each) => each.areaM2 > -areaM2 && insideRing(each.outline.shore, middleOf(first, ring[1] ?? first)),
    );
    around?.outline.islands.push(ring);
  }
  return outer.map(({ outline }) => outline);
}

/** A hole may touch the ring about it at a corner: the middle of a side is told apart more surely. */
const middleOf = (a: Point, b: Point): Point => ({ xM: (a.xM + b.xM) / 2, yM: (a.yM + b.yM) / 2 });

/** Rings meant by the even-odd rule, turned so that each one inside an even number of others holds something. */
export function turnedByNesting(rings: readonly (readonly Point[])[]): Point[][] {
  return rings.map((ring) => {
    const [first, second] = ring;
    const middle = first && middleOf(first, second ?? first);
    const about = middle ? rings.filter((other) => other !== ring && insideRing(other, middle)).length : 0;
    return signedAreaM2(ring) > 0 === (about % 2 === 0) ? [...ring] : [...ring].reverse();
  });
}
