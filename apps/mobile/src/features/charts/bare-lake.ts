import { groundOf } from '@mereward/shared/charts/drawing/ground';
import { toPlane } from '@mereward/shared/geometry/plane';
import { placesInPlane } from '@mereward/shared/lakes/lake-places';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { MapContent } from './map-layers';
import { planeOutline } from './readied-chart';

/** A lake that has no published chart: its shore, pegs and marks, and nothing made up in between. */
export function bareLake(lake: LakeView): MapContent {
  const at = (position: LakeView['origin']) => toPlane(lake.origin, position);
  return {
    ground: groundOf({
      outline: planeOutline(lake.details.outline, lake.origin),
      depth: null,
      isobaths: null,
      stepM: 1,
      raisedM: 0,
    }),
    bottom: [],
    soundings: [],
    spots: [],
    pegs: lake.pegs.map((peg) => ({ ...peg, ...at(peg.position) })),
    marks: lake.marks.map(({ details }) => ({ code: details.code, ...at(details.position) })),
    places: placesInPlane(lake.details.places ?? [], lake.origin),
  };
}
