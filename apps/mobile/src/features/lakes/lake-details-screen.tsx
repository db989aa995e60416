import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';
import { TypedLake, typedLake } from '@/features/lakes/lake-fields';
import { LakeForm } from '@/features/lakes/lake-form';
import { changeLake } from '@/features/lakes/office-api';
import { outlineFrom } from '@/features/lakes/outline-source-fields';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';

const Wanted = z.object({ details: TypedLake });

/** A lake's fields and who may see its layers. */
export function LakeDetailsScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  return (
    <Page
      title="Details and audiences"
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: lake.data?.details.name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) =>
          value.may.change ? (
            <Details now={value} />
          ) : (
            <Note title="Not yours to change">The owner or a manager changes a lake’s details.</Note>
          )
        }
      </Loaded>
    </Page>
  );
}

function Details({ now }: { now: LakeView }) {
  const { held, hold, newer } = useHeld(now);
  return (
    <>
      {newer ? <NewerNote what="this lake" onTake={() => hold(newer)} /> : null}
      <DetailsForm key={held.version} lake={held} />
    </>
  );
}

function DetailsForm({ lake }: { lake: LakeView }) {
  const router = useRouter();
  const { id, version, details } = lake;
  const form = useDraftForm({
    form: `lake:${id}:${String(version)}`,
    schema: Wanted,
    start: { details: typedLake(details) },
    send: ({ details: typed }) =>
      changeLake(id, {
        details: { ...typed, outline: details.outline, ...outlineFrom(details.outlineFrom ?? null) },
        version,
      }),
    onDone: () => router.replace(`/office/lakes/${id}`),
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Details and audiences"
        act="Keep the details"
        busyLabel="Keeping…"
        beside={<LinkButton label="Leave it" href={`/office/lakes/${id}`} />}
      >
        <LakeForm />
      </DraftFormFrame>
    </FormProvider>
  );
}
