import { useMemo, useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { View } from 'react-native';
import { FormProvider, useController } from 'react-hook-form';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { Field } from '@/components/field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { NO_BACKDROP } from '@/features/charts/lake-backdrop';
import { OutlineEditor } from '@/features/charts/outline-editor';
import { useMyFisheries } from '@/features/fisheries/use-my-fisheries';
import { NEW_LAKE, TypedLake } from '@/features/lakes/lake-fields';
import { LakeForm } from '@/features/lakes/lake-form';
import { makeLake } from '@/features/lakes/office-api';
import { EMPTY_SKETCH, FinishedSketch, type Sketch } from '@/features/lakes/outline-sketch';
import {
  outlineFrom,
  OutlineSourceFields,
  TypedOutlineSource,
  typedOutlineSource,
} from '@/features/lakes/outline-source-fields';
import { positionText, readPosition } from '@/lib/position-text';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const READING_PX = 720; // a form's lines stay short on a wide sheet
const FAR_M = 5000;

const Wanted = z.object({
  start: z.string(),
  sketch: FinishedSketch,
  source: TypedOutlineSource,
  details: TypedLake,
});

/** Draws a new lake and says what it is. */
export function MakeLakeScreen() {
  const { fisheryId } = useLocalSearchParams<{ fisheryId?: string }>();
  const { all, mine } = useMyFisheries(['owner', 'manager']);
  const fishery = mine.find(({ id }) => id === fisheryId) ?? mine[0];
  return (
    <Page
      title="A new lake"
      width="wide"
      {...(fishery ? { over: fishery.name } : {})}
      back={{ label: 'Lakes', href: '/office/lakes' }}
    >
      <Loaded
        query={all}
        waiting="Reading the fishery…"
        empty={{
          when: () => fishery === undefined,
          show: (
            <Empty
              title="No fishery to draw a lake for"
              action={<LinkButton label="To the office" href="/office" kind="main" />}
            >
              A fishery’s owner or manager draws its lakes. Make the fishery first, or ask its owner.
            </Empty>
          ),
        }}
      >
        {() => (fishery ? <MakeLakeForm fishery={fishery} /> : null)}
      </Loaded>
    </Page>
  );
}

function MakeLakeForm({ fishery }: { fishery: FisheryListItem }) {
  const router = useRouter();
  const [id] = useState(newId);
  const form = useDraftForm({
    form: `lake:new:${fishery.id}`,
    schema: Wanted,
    start: {
      start: positionText(fishery.position),
      sketch: EMPTY_SKETCH,
      source: typedOutlineSource(undefined),
      details: NEW_LAKE,
    },
    send: ({ sketch, source, details }) =>
      makeLake(fishery.id, { id, details: { ...details, outline: sketch, ...outlineFrom(source) } }),
    onDone: (lake) => router.replace(`/office/lakes/${lake.id}`),
  });
  const { control } = form;
  const sketch = useController({ control, name: 'sketch' });
  const source = useController({ control, name: 'source' });
  const start = useController({ control, name: 'start' });
  const typed = useMemo(() => readPosition(start.field.value), [start.field.value]);
  const origin = typed ?? fishery.position;
  const isDrawn = sketch.field.value.rings.length > 0;
  const draw = (next: Sketch): void => {
    const first = next.rings[0]?.places[0];
    const far = first && geodesicBetween(origin, first).distanceM > FAR_M;
    if (far) start.field.onChange(positionText(first)); // a file may hold a water far from the sheet's middle
    sketch.field.onChange(next);
  };
  return (
    <>
      <Section
        title="The shore"
        note="Walk round it with a phone, read it from a GeoJSON or GPX file, tap round it here, or type its points."
        bare
      >
        <OutlineEditor
          sketch={sketch.field.value}
          onChange={draw}
          origin={origin}
          under={NO_BACKDROP}
          error={sketch.fieldState.error?.message}
          keptAs={`new:${fishery.id}`}
          onSource={(found) => source.field.onChange(typedOutlineSource(found))}
        />
        {isDrawn ? null : (
          <Field
            label="Where to start drawing"
            hint="Latitude, longitude: a place at the water. At first it is the fishery’s own position."
            value={start.field.value}
            onChange={start.field.onChange}
            error={
              typed ? undefined : 'Type latitude, then longitude, in degrees, such as 52.36610, -1.14170'
            }
          />
        )}
      </Section>
      <Section title="The lake">
        <View style={{ maxWidth: READING_PX }}>
          <FormProvider {...form}>
            <DraftFormFrame form={form} label="A new lake" act="Keep the lake" busyLabel="Keeping…">
              <OutlineSourceFields control={control} name="source" />
              <LakeForm />
            </DraftFormFrame>
          </FormProvider>
        </View>
      </Section>
    </>
  );
}
