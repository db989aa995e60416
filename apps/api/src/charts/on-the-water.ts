import type { Outline } from '@mereward/shared/geometry/polygon';
import type { Point } from '@mereward/shared/geometry/point';
import { intersection } from 'polyclip-ts';

/**
 * What of some polygons lies on the water: inside the shore and on no island. Areas drawn from cells reach half a cell
 * over it. Plane metres; none when nothing is left.
 */
export function onTheWater(polygons: readonly Outline[], water: Outline): Outline[] {
  if (polygons.length === 0) return [];
  return intersection(polygons.map(ringsAsPairs), [ringsAsPairs(water)]).flatMap(([shore, ...islands]) =>
    shore ? [{ shore: opened(shore), islands: islands.map(opened) }] : [],
  );
}

type Ring = [number, number][];

const ringsAsPairs = ({ shore, islands }: Outline): Ring[] =>
  [shore, ...islands].map((ring) => ring.map(({ xM, yM }): [number, number] => [xM, yM]));

/** The library closes its rings. */
const opened = (ring: Ring): Point[] => ring.slice(0, -1).map(([xM, yM]) => ({ xM, yM }));
