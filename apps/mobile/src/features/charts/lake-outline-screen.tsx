import { useMemo } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { useController } from 'react-hook-form';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { lakeBackdrop } from '@/features/charts/lake-backdrop';
import { BackdropChoice, useOutlineBackdrop } from '@/features/charts/outline-backdrop';
import { OutlineEditor } from '@/features/charts/outline-editor';
import { useLake } from '@/features/lakes/api';
import { changeLake } from '@/features/lakes/office-api';
import { FinishedSketch, sketchOf } from '@/features/lakes/outline-sketch';
import {
  outlineFrom,
  OutlineSourceFields,
  TypedOutlineSource,
  typedOutlineSource,
} from '@/features/lakes/outline-source-fields';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';

const Wanted = z.object({ sketch: FinishedSketch, source: TypedOutlineSource });

/** Draws a lake's shore and islands anew or mends them. */
export function LakeOutlineScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  return (
    <Page
      title="Outline"
      width="wide"
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: lake.data?.details.name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) =>
          value.may.change ? (
            <Outline now={value} />
          ) : (
            <Note title="Not yours to change">The owner or a manager changes a lake’s outline.</Note>
          )
        }
      </Loaded>
    </Page>
  );
}

function Outline({ now }: { now: LakeView }) {
  const { held, hold, newer } = useHeld(now);
  return (
    <>
      {newer ? <NewerNote what="this lake" onTake={() => hold(newer)} /> : null}
      <OutlineForm key={held.version} lake={held} />
    </>
  );
}

function OutlineForm({ lake }: { lake: LakeView }) {
  const router = useRouter();
  const { id, version, details, origin, publishedChart } = lake;
  const { pictureId } = useLocalSearchParams<{ pictureId?: string }>();
  const picture = useOutlineBackdrop(id, pictureId);
  const form = useDraftForm({
    form: `lake-outline:${id}:${String(version)}`,
    schema: Wanted,
    start: { sketch: sketchOf(details.outline), source: typedOutlineSource(details.outlineFrom) },
    send: ({ sketch, source }) => {
      const { outlineFrom: _before, ...rest } = details;
      return changeLake(id, { details: { ...rest, outline: sketch, ...outlineFrom(source) }, version });
    },
    onDone: () => router.replace(`/office/lakes/${id}`),
  });
  const sketch = useController({ control: form.control, name: 'sketch' });
  const source = useController({ control: form.control, name: 'source' });
  const under = useMemo(() => lakeBackdrop(lake, { water: false }), [lake]);
  return (
    <>
      {publishedChart ? (
        <Note>
          {`Chart ${publishedChart.version} keeps the outline it was made with. The next chart built takes this one.`}
        </Note>
      ) : null}
      <OutlineEditor
        sketch={sketch.field.value}
        onChange={sketch.field.onChange}
        origin={origin}
        under={under}
        error={sketch.fieldState.error?.message}
        keptAs={id}
        onSource={(found) => source.field.onChange(typedOutlineSource(found))}
        backdrop={picture.backdrop}
        beside={<BackdropChoice of={picture} />}
      />
      <DraftFormFrame
        form={form}
        label="Outline"
        act="Keep the outline"
        busyLabel="Keeping…"
        beside={<LinkButton label="Leave it" href={`/office/lakes/${id}`} />}
      >
        <OutlineSourceFields control={form.control} name="source" />
      </DraftFormFrame>
    </>
  );
}
