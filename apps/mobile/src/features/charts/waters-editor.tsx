import { useCallback, useMemo, useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { LakeWaters } from '@mereward/shared/lakes/peg-water-contract';
import { toPlane } from '@mereward/shared/geometry/plane';
import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { useWide } from '@/hooks/use-wide';
import { useWaterDeeds } from './chart-answers-api';
import { lakeBackdrop, waterLines } from './lake-backdrop';
import { LakeCanvas, type Draw } from './lake-canvas';
import { placeOf } from './outline-drawing';
import { WaterAreas } from './water-areas';
import { areaMarks, type DrawnArea } from './water-area-marks';
import { WaterAreaForm } from './water-area-form';
import { waterSheetMarks } from './water-marks';
import { waterArea } from './water-words';

type Props = { lake: LakeView; waters: LakeWaters };

/** The waters drawn on the lake, and the areas the fishery gives to a peg over them. */
export function WatersEditor({ lake, waters }: Props) {
  const wide = useWide();
  const units = useUnits();
  const [pegId, setPegId] = useState<string | null>(null);
  const [corners, setCorners] = useState<DrawnArea>([]);
  const deeds = useWaterDeeds(lake.id);
  const { origin } = lake;
  const frame = useMemo(() => waterLines(lake), [lake]);
  const backdrop = useMemo(() => lakeBackdrop(lake, { water: true }), [lake]);
  const under = useCallback<Draw>(
    (pen) => {
      const [ground, shore, ...rest] = backdrop(pen);
      const all = waterSheetMarks(waters.pegs, pen.palette, pegId);
      return [...(ground ? [ground] : []), ...all, ...(shore ? [shore] : []), ...rest];
    },
    [backdrop, waters, pegId],
  );
  const drawn = useMemo(() => corners.map((place) => toPlane(origin, place)), [corners, origin]);
  const over = useCallback<Draw>(({ palette }) => areaMarks(drawn, palette), [drawn]);
  const chosen = waters.pegs.find((peg) => peg.pegId === pegId);
  const move = (id: string, place: { xM: number; yM: number }): void =>
    setCorners(corners.map((corner, i) => (String(i) === id ? placeOf(origin, place) : corner)));
  if (waters.pegs.length === 0)
    return (
      <Empty
        title="No pegs yet"
        action={<LinkButton label="Add a peg" href={`/office/lakes/${lake.id}/pegs/new`} kind="main" />}
      >
        Water is parted among pegs: place the first.
      </Empty>
    );
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
      <View style={{ flexGrow: 3, flexBasis: 340, minWidth: 0, maxWidth: '100%', gap: space.small }}>
        <LakeCanvas
          label={`${lake.details.name}: whose water is whose. The list says the same.`}
          frame={frame}
          under={under}
          over={over}
          handles={drawn.map((point, i) => ({ ...point, id: String(i) }))}
          onTap={(point) => {
            if (waters.may.change) setCorners([...corners, placeOf(origin, point)]);
          }}
          onMove={move}
          heightPx={wide ? 560 : 420}
        />
        <Text size="small" tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
          {`${waters.words} ${waterArea(waters.nobodysM2, units)} is no peg’s.`}
        </Text>
      </View>
      <View style={{ flexGrow: 1, flexBasis: 320, gap: space.medium, minWidth: 0 }}>
        <Select
          label="Peg"
          unset="Choose a peg to see its water"
          choices={waters.pegs.map((peg) => ({
            key: peg.pegId,
            label: [peg.number, peg.name].filter(Boolean).join(', '),
            note: peg.areaM2 === 0 ? 'no water' : waterArea(peg.areaM2, units),
          }))}
          value={pegId}
          onChange={setPegId}
        />
        {chosen?.areaM2 === 0 ? (
          <Note kind="caution" title={`Peg ${chosen.number} has no water`}>
            Its arc looks over land, or all of it was given away. Mend the arc on the peg’s page, or draw an
            area for it here.
          </Note>
        ) : null}
        <ProblemNote problem={deeds.put.error ?? deeds.remove.error} />
        {waters.may.change ? (
          <WaterAreaForm
            waters={waters}
            pegId={pegId}
            corners={corners}
            origin={origin}
            onCorners={setCorners}
            deeds={deeds}
          />
        ) : (
          <Note title="Not yours to change">The owner or a manager draws whose water is whose.</Note>
        )}
        <WaterAreas waters={waters} deeds={deeds} />
      </View>
    </View>
  );
}
