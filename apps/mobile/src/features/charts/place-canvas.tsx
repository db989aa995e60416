import { useCallback, useMemo } from 'react';
import { ruled, text } from '@mereward/shared/charts/drawing/mark';
import { toPlane, type LonLat } from '@mereward/shared/geometry/plane';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { lakeBackdrop, waterLines } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import { lineOf, placeOf } from '@/features/charts/outline-drawing';

const PLACE = 'm-8 0a8 8 0 1 0 16 0a8 8 0 1 0 -16 0zm8 -13v26m-13 -13h26';

type Props = {
  lake: LakeView;
  /** What is placed, to a screen reader and beside the sign: "M3". */
  label: string;
  place: LonLat | null;
  onPlace: (place: [number, number]) => void;
  exceptMarkId?: string | undefined;
};

/** The lake, and one thing on or beside it that a tap places and a drag moves. */
export function PlaceCanvas({ lake, label, place, onPlace, exceptMarkId }: Props) {
  const { origin } = lake;
  const under = useMemo(() => lakeBackdrop(lake, { water: true, exceptMarkId }), [lake, exceptMarkId]);
  const lon = place?.[0];
  const lat = place?.[1];
  const at = useMemo(
    () => (lon === undefined || lat === undefined ? null : toPlane(origin, [lon, lat])),
    [origin, lon, lat],
  );
  // Only the water and what was placed first: a place far off must not shrink the lake while it is dragged.
  const frame = useMemo(() => waterLines(lake), [lake]);
  const over = useCallback<Draw>(
    ({ palette }) =>
      at
        ? [
            { kind: 'glyphs', at: lineOf([at]), glyph: PLACE, fill: null, stroke: ruled(palette.paper, 5) },
            {
              kind: 'glyphs',
              at: lineOf([at]),
              glyph: PLACE,
              fill: null,
              stroke: ruled(palette.selected, 2.4),
            },
            text({
              words: label,
              ...{ x: at.xM, y: at.yM },
              dyPx: 22,
              bold: true,
              colour: palette.ink,
              halo: palette.paper,
            }),
          ]
        : [],
    [at, label],
  );
  return (
    <LakeCanvas
      label={`${lake.details.name}: tap where ${label} is`}
      frame={frame}
      under={under}
      over={over}
      handles={at ? [{ ...at, id: 'place' }] : []}
      onTap={(point) => onPlace(placeOf(origin, point))}
      onMove={(_id, point) => onPlace(placeOf(origin, point))}
      heightPx={360}
    />
  );
}
