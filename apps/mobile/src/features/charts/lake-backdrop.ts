import { mixed } from '@mereward/shared/charts/drawing/colour';
import { farMarks } from '@mereward/shared/charts/drawing/draw-map';
import { filled, ruled, stroked } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { placeMarks } from '@mereward/shared/charts/drawing/place-marks';
import { pegMarks } from '@mereward/shared/charts/drawing/shore-marks';
import { toPlane } from '@mereward/shared/geometry/plane';
import { placesInPlane } from '@mereward/shared/lakes/lake-places';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { Draw } from '@/features/charts/lake-canvas';
import { lineOf } from '@/features/charts/outline-drawing';
import { planeOutline } from '@/features/charts/readied-chart';

type Parts = {
  water: boolean;
  exceptPegId?: string | undefined;
  exceptMarkId?: string | undefined;
  exceptPlaceId?: string | undefined;
};

/** Shore and islands as lines of the lake's plane. */
export function waterLines({ details, origin }: Pick<LakeView, 'details' | 'origin'>) {
  const { shore, islands } = planeOutline(details.outline, origin);
  return [shore, ...islands].map(lineOf);
}

/** What stands on a lake already, for a canvas to draw something more on. */
export function lakeBackdrop(
  lake: LakeView,
  { water, exceptPegId, exceptMarkId, exceptPlaceId }: Parts,
): Draw {
  const at = (position: LakeView['origin']) => toPlane(lake.origin, position);
  const lines = waterLines(lake);
  const pegs = lake.pegs
    .filter(({ id }) => id !== exceptPegId)
    .map((peg) => ({ ...peg, ...at(peg.position) }));
  const marks = lake.marks
    .filter(({ id }) => id !== exceptMarkId)
    .map(({ details }) => ({ code: details.code, ...at(details.position) }));
  const others = (lake.details.places ?? []).filter(({ id }) => id !== exceptPlaceId);
  const places = placesInPlane(others, lake.origin);
  return ({ palette, view }) => [
    ...(water
      ? [filled(lines, waterTint(palette)), { ...stroked(lines, ruled(palette.ink, 1.9)), closed: true }]
      : []),
    ...pegMarks(pegs, { palette, view, selectedId: null, taken: [] }),
    ...placeMarks(places, palette, view),
    ...farMarks(marks, palette),
  ];
}

const WATER_SHARE = 0.2;

/** Water that no depth is told of: none of the depth tints, so that it is not read as one. */
export const waterTint = ({ paper, waterLine }: Palette): string => mixed(paper, waterLine, WATER_SHARE);

/** Nothing drawn. */
export const NO_BACKDROP: Draw = () => [];
