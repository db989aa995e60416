import { useCallback, useMemo, useState } from 'react';
import { ruled, stroked, text, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { distanceBetweenM, pointAlong, toPlane, type Point } from '@mereward/shared/geometry/plane';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { useController, useFormContext } from 'react-hook-form';
import { View } from 'react-native';
import { FormField } from '@/components/form-field';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { lakeBackdrop } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import { lineOf, placeOf } from '@/features/charts/outline-drawing';
import type { ReducedCast } from '@/features/charts/use-peg-casts';
import { usePegCasts } from '@/features/charts/use-peg-casts';
import { positionText, readPosition } from '@/lib/position-text';

export type HoldsSpot = { details: { name: string; position: string; usableRadiusM: string; note: string } };

const REACH_M = 65; // middle of what is shown before the peg, and half its width
const CAST = 'm-3.4 0a3.4 3.4 0 1 0 6.8 0a3.4 3.4 0 1 0 -6.8 0z';
const SPOT = 'm-9 0a9 9 0 1 0 18 0a9 9 0 1 0 -18 0zm9 -14v28m-14 -14h28';

type Props = { lake: LakeView; peg: PegView };

/** Where a spot is: on a cast that was made there, tapped on the water, or typed. */
export function SpotPlace({ lake, peg }: Props) {
  const { control } = useFormContext<HoldsSpot>();
  const { field } = useController({ control, name: 'details.position' });
  const { casts, waiting } = usePegCasts(lake.id, peg.id);
  const { origin } = lake;
  const stand = useMemo(() => toPlane(origin, peg.details.origin), [origin, peg.details.origin]);
  const at = useMemo(() => {
    const place = readPosition(field.value);
    return place && toPlane(origin, place);
  }, [origin, field.value]);
  const [frame] = useState(() => frameBefore(stand, facingDeg(peg.details)));
  const backdrop = useMemo(() => lakeBackdrop(lake, { water: true }), [lake]);
  const under = useCallback<Draw>(
    (pen) => [...backdrop(pen), ...castDots(casts, pen.palette)],
    [backdrop, casts],
  );
  const over = useCallback<Draw>(({ palette }) => spotMarks(at, stand, palette), [at, stand]);
  const put = (point: Point): void => field.onChange(positionText(placeOf(origin, point)));
  const tap = (point: Point, reachM: number): void => {
    const near = casts.find((cast) => distanceBetweenM(cast, point) <= reachM / 2);
    put(near ?? point);
  };
  const chosen = casts.find((cast) => at !== null && distanceBetweenM(cast, at) < 0.05);
  return (
    <View style={{ gap: space.small }}>
      {casts.length > 0 ? (
        <Select
          label="On a cast from this peg"
          hint="Casts of closed visits. A spot on a cast is quoted from that cast."
          choices={casts.map(({ id, words }) => ({ key: id, label: words }))}
          value={chosen?.id ?? null}
          unset="No cast: somewhere else"
          onChange={(id) => {
            const cast = casts.find((each) => each.id === id);
            if (cast) put(cast);
          }}
        />
      ) : (
        <Text tone="inkSoft">
          {waiting
            ? 'Reading the casts of this peg…'
            : 'No closed visit has a cast from this peg. The spot can be tapped or typed.'}
        </Text>
      )}
      <LakeCanvas
        label={`The water before peg ${peg.details.number}: tap the spot`}
        frame={frame}
        under={under}
        over={over}
        handles={at ? [{ ...at, id: 'spot' }] : []}
        onTap={tap}
        onMove={(_id, point) => put(point)}
      />
      <FormField control={control} name="details.position" label="Latitude, longitude" />
    </View>
  );
}

function frameBefore(stand: Point, facing: number) {
  const { xM, yM } = pointAlong(stand, facing, REACH_M);
  return [[xM - REACH_M, yM - REACH_M, xM + REACH_M, yM + REACH_M]];
}

function castDots(casts: readonly ReducedCast[], palette: Palette): Mark[] {
  return [
    {
      kind: 'glyphs',
      at: lineOf(casts),
      glyph: CAST,
      fill: palette.paper,
      stroke: ruled(palette.ink, 1.2),
    },
  ];
}

function spotMarks(at: Point | null, stand: Point, palette: Palette): Mark[] {
  if (!at) return [];
  return [
    stroked([lineOf([stand, at])], ruled(palette.selected, 1.6, [4, 5])),
    { kind: 'glyphs', at: lineOf([at]), glyph: SPOT, fill: null, stroke: ruled(palette.paper, 5) },
    { kind: 'glyphs', at: lineOf([at]), glyph: SPOT, fill: null, stroke: ruled(palette.selected, 2.4) },
    text({
      words: `${distanceBetweenM(stand, at).toFixed(0)} m`,
      x: at.xM,
      y: at.yM,
      dyPx: 24,
      bold: true,
      colour: palette.ink,
      halo: palette.paper,
    }),
  ];
}
