import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView, MarkView } from '@mereward/shared/lakes/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { NewerNote } from '@/components/newer-note';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { PlaceField } from '@/features/charts/place-field';
import { Photos } from '@/features/files/photos';
import { lakeKeys } from '@/features/lakes/api';
import { NEW_MARK, TypedMark, typedMark } from '@/features/lakes/mark-fields';
import { MarkForm } from '@/features/lakes/mark-form';
import { putMark } from '@/features/lakes/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';
import { newId } from '@/lib/new-id';

const Wanted = z.object({ details: TypedMark });

/** Places a new far-bank mark. */
export function NewMarkScreen() {
  return (
    <OfficeLakePage title="A new far-bank mark" may="changePegs">
      {(lake) => <MarkFields lake={lake} mark={null} />}
    </OfficeLakePage>
  );
}

/** One far-bank mark: its fields, its place, its photos. */
export function MarkScreen() {
  const { markId } = useLocalSearchParams<{ markId: string }>();
  return (
    <OfficeLakePage title="Far-bank mark" may="changePegs">
      {(lake) => {
        const mark = lake.marks.find(({ id }) => id === markId);
        if (!mark)
          return (
            <Empty title="No such mark">It may have been renamed. Go back to the lake and look again.</Empty>
          );
        return <Mark lake={lake} now={mark} />;
      }}
    </OfficeLakePage>
  );
}

function Mark({ lake, now }: { lake: LakeView; now: MarkView }) {
  const { held, hold, newer } = useHeld(now);
  return (
    <>
      {newer ? <NewerNote what="this mark" onTake={() => hold(newer)} /> : null}
      <MarkFields key={held.version} lake={lake} mark={held} />
      <Photos
        subject={{ kind: 'marks', id: now.id }}
        photos={now.photos}
        alsoRead={lakeKeys.one(lake.id)}
        note="From the bank, so that an angler knows it when they see it."
      />
    </>
  );
}

function MarkFields({ lake, mark }: { lake: LakeView; mark: MarkView | null }) {
  const router = useRouter();
  const [fresh] = useState(newId);
  const id = mark?.id ?? fresh;
  const version = mark?.version ?? null;
  const form = useDraftForm({
    form: `mark:${lake.id}:${mark ? `${id}:${String(version)}` : 'new'}`,
    schema: Wanted,
    start: { details: mark ? typedMark(mark.details) : NEW_MARK },
    send: ({ details }) => putMark({ lakeId: lake.id, id }, { details, version }),
    onDone: () => router.replace(`/office/lakes/${lake.id}`),
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Far-bank mark"
        act="Keep the mark"
        busyLabel="Keeping…"
        beside={<LinkButton label="Leave it" href={`/office/lakes/${lake.id}`} />}
      >
        <MarkForm />
        <PlaceField lake={lake} label={form.watch('details.code') || 'the mark'} exceptMarkId={id} />
      </DraftFormFrame>
    </FormProvider>
  );
}
