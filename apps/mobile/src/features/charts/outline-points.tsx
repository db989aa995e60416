import { useState } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { Field } from '@/components/field';
import { Form } from '@/components/form';
import { Heading } from '@/components/heading';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { Chosen } from '@/features/charts/outline-drawing';
import {
  addPlace,
  insertPlace,
  movePlace,
  openRingOf,
  removePlace,
  removeRing,
  ringName,
  type Sketch,
  type SketchRing,
} from '@/features/lakes/outline-sketch';
import { positionText, readPosition } from '@/lib/position-text';

const PAGE = 20;
const NOT_READ = 'Type latitude, then longitude, in degrees, such as 52.36610, -1.14170';

type Props = {
  sketch: Sketch;
  onChange: (sketch: Sketch, choose?: Chosen) => void;
  chosen: Chosen;
};

/** The same drawing as figures: every point can be typed, put in and taken out without the canvas. */
export function OutlinePoints({ sketch, onChange, chosen }: Props) {
  return (
    <Disclosure title="Points as figures">
      <Text size="small" tone="inkSoft">
        Latitude and longitude in degrees (WGS 84). A changed point moves when you leave its field.
      </Text>
      {sketch.rings.map((ring, at) => (
        <RingPoints key={at} {...{ ring, at, sketch, onChange, chosen }} />
      ))}
      {sketch.rings.length === 0 || openRingOf(sketch) !== null ? (
        <NextPoint onPlace={(place) => onChange(addPlace(sketch, place))} />
      ) : null}
    </Disclosure>
  );
}

type RingProps = Props & { ring: SketchRing; at: number };

function RingPoints({ ring, at, sketch, onChange, chosen }: RingProps) {
  const [page, setPage] = useState(0);
  const first = Math.min(page, Math.max(0, Math.ceil(ring.places.length / PAGE) - 1)) * PAGE;
  const name = ringName(at);
  const between = (index: number): [number, number] => {
    const [lon, lat] = ring.places[index] ?? [0, 0];
    const [nextLon, nextLat] = ring.places[index + 1] ?? ring.places[0] ?? [lon, lat];
    return [(lon + nextLon) / 2, (lat + nextLat) / 2];
  };
  return (
    <View style={{ gap: space.small }}>
      <Heading
        level={3}
      >{`${name.charAt(0).toUpperCase()}${name.slice(1)}, ${String(ring.places.length)} points`}</Heading>
      {ring.places.slice(first, first + PAGE).map((place, i) => {
        const spot = { ring: at, index: first + i };
        return (
          <View
            key={spot.index}
            style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'flex-end' }}
          >
            <PointField
              key={positionText(place)}
              label={`Point ${String(spot.index + 1)} of ${name}${chosen?.ring === at && chosen.index === spot.index ? ', chosen' : ''}`}
              place={place}
              onPlace={(next) => onChange(movePlace(sketch, spot, next), spot)}
            />
            <Button
              label="Take out"
              spoken={`Take out point ${String(spot.index + 1)} of ${name}`}
              onPress={() => onChange(removePlace(sketch, spot))}
            />
            {ring.places.length > 1 ? (
              <Button
                label="Put one after"
                spoken={`Put one after point ${String(spot.index + 1)} of ${name}`}
                onPress={() =>
                  onChange(insertPlace(sketch, spot, between(spot.index)), {
                    ring: at,
                    index: spot.index + 1,
                  })
                }
              />
            ) : null}
          </View>
        );
      })}
      {ring.places.length > PAGE ? (
        <View style={{ flexDirection: 'row', gap: space.small, alignItems: 'center' }}>
          <Button label="Earlier points" disabled={first === 0} onPress={() => setPage(first / PAGE - 1)} />
          <Button
            label="Later points"
            disabled={first + PAGE >= ring.places.length}
            onPress={() => setPage(first / PAGE + 1)}
          />
          <Text
            size="small"
            tone="inkSoft"
          >{`${String(first + 1)} to ${String(Math.min(first + PAGE, ring.places.length))}`}</Text>
        </View>
      ) : null}
      {at > 0 ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label={`Take ${name} away`}
            kind="danger"
            onPress={() => onChange(removeRing(sketch, at))}
          />
        </View>
      ) : null}
    </View>
  );
}

type PointProps = {
  label: string;
  place: readonly [number, number];
  onPlace: (place: [number, number]) => void;
};

function PointField({ label, place, onPlace }: PointProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const read = typed === null ? null : readPosition(typed);
  const leave = (): void => {
    if (read && positionText(read) !== positionText(place)) onPlace(read);
    if (read) setTyped(null);
  };
  return (
    <View style={{ flexGrow: 1, flexBasis: 230 }}>
      <Field
        label={label}
        value={typed ?? positionText(place)}
        onChange={setTyped}
        onBlur={leave}
        error={typed !== null && !read ? NOT_READ : undefined}
      />
    </View>
  );
}

function NextPoint({ onPlace }: { onPlace: (place: [number, number]) => void }) {
  const [typed, setTyped] = useState('');
  const [asked, setAsked] = useState(false);
  const read = readPosition(typed);
  const add = (): void => {
    setAsked(read === null);
    if (!read) return;
    onPlace(read);
    setTyped('');
  };
  return (
    <Form label="Next point" onSubmit={add}>
      <View style={{ maxWidth: 360 }}>
        <Field
          label="Next point"
          value={typed}
          onChange={setTyped}
          error={asked && !read ? NOT_READ : undefined}
        />
      </View>
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Add it" onPress={add} />
      </View>
    </Form>
  );
}
