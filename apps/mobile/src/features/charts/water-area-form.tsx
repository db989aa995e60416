import { useState } from 'react';
import type { LonLat } from '@mereward/shared/geometry/plane';
import type { LakeWaters } from '@mereward/shared/lakes/peg-water-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { Field } from '@/components/field';
import { Kept } from '@/components/kept';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { newId } from '@/lib/new-id';
import { positionText, readPosition } from '@/lib/position-text';
import type { useWaterDeeds } from './chart-answers-api';
import type { DrawnArea } from './water-area-marks';

const NOBODY = 'nobody';

type Props = {
  waters: LakeWaters;
  pegId: string | null;
  corners: DrawnArea;
  origin: LonLat;
  onCorners: (corners: DrawnArea) => void;
  deeds: ReturnType<typeof useWaterDeeds>;
};

/** An area drawn on the lake, and who it is given to. */
export function WaterAreaForm({ waters, pegId, corners, onCorners, deeds }: Props) {
  const [areaId, setAreaId] = useState(newId);
  const [wanted, setWanted] = useState<string | null>(null);
  const [note, setNote] = useState('');
  const [said, setSaid] = useState<string | null>(null);
  const to = wanted ?? pegId;
  const number = waters.pegs.find((peg) => peg.pegId === to)?.number;
  const give = (): void =>
    deeds.put.mutate(
      {
        areaId,
        area: {
          details: {
            pegId: to === NOBODY ? null : to,
            ring: corners.map(([lon, lat]) => [lon, lat]),
            note: note.trim(),
          },
          version: null,
        },
      },
      {
        onSuccess: () => {
          setSaid(number ? `Given to peg ${number}.` : 'Kept free of lines.');
          onCorners([]);
          setNote('');
          setAreaId(newId());
        },
      },
    );
  return (
    <Section
      title="Draw an area"
      note="Tap its corners on the lake, one after another; drag one to move it. The area drawn last wins."
      bare
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'center' }}>
        <Button
          label="Undo the last corner"
          disabled={corners.length === 0}
          onPress={() => onCorners(corners.slice(0, -1))}
        />
        <Button label="Clear" kind="quiet" disabled={corners.length === 0} onPress={() => onCorners([])} />
        <Text size="small" tone="inkSoft">
          {corners.length === 1 ? '1 corner' : `${String(corners.length)} corners`}
        </Text>
      </View>
      <Select
        label="Given to"
        unset="Choose a peg"
        choices={[
          ...waters.pegs.map((peg) => ({
            key: peg.pegId,
            label: `Peg ${[peg.number, peg.name].filter(Boolean).join(', ')}`,
          })),
          { key: NOBODY, label: 'Nobody: kept free of lines' },
        ]}
        value={to}
        onChange={setWanted}
      />
      <Field
        label="Note"
        hint="Such as “to the line between the dead oak and the pump house”."
        value={note}
        onChange={setNote}
        optional
      />
      <Disclosure title="Type a corner">
        <TypedCorner onAdd={(corner) => onCorners([...corners, corner])} />
      </Disclosure>
      <View style={{ alignItems: 'flex-start' }}>
        <Button
          label={to === NOBODY ? 'Keep it free' : number ? `Give it to peg ${number}` : 'Give it'}
          kind="main"
          disabled={corners.length < 3 || to === null}
          busy={deeds.put.isPending}
          busyLabel="Parting the water…"
          onPress={give}
        />
      </View>
      <Kept words={said} />
    </Section>
  );
}

/** For those who draw without a pointer. */
function TypedCorner({ onAdd }: { onAdd: (corner: [number, number]) => void }) {
  const [typed, setTyped] = useState('');
  const place = readPosition(typed);
  const fault = typed !== '' && !place ? 'Type latitude, then longitude, in degrees.' : undefined;
  return (
    <>
      <Field
        label="Latitude, longitude"
        value={typed}
        onChange={setTyped}
        error={fault}
        hint={place ? positionText(place) : undefined}
      />
      <Button
        label="Add the corner"
        disabled={!place}
        onPress={() => {
          if (!place) return;
          onAdd(place);
          setTyped('');
        }}
      />
    </>
  );
}
