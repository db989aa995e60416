import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { LakePlace } from '@mereward/shared/lakes/place-contract';
import { useMutation } from '@tanstack/react-query';
import { useController } from 'react-hook-form';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { NewerNote } from '@/components/newer-note';
import { ProblemNote } from '@/components/problem-note';
import { AreaField } from '@/features/charts/area-field';
import {
  draftOfPlace,
  maySayWho,
  newPlace,
  PLACE_AUDIENCES,
  PLACE_KINDS,
  PlaceDraft,
  placeOfDraft,
  type PlaceRead,
  type PlaceTyped,
} from '@/features/charts/lake-place-draft';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { changeLake } from '@/features/lakes/office-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';
import { newId } from '@/lib/new-id';

/** Draws a new place at the lake: parking, a gate, a throw line, a hazard, an overhead line. */
export function NewLakePlaceScreen() {
  return (
    <OfficeLakePage title="A new place" may="change">
      {(lake) => <PlaceForm lake={lake} place={null} />}
    </OfficeLakePage>
  );
}

/** One place of a lake: what it is, where, who is shown it. */
export function LakePlaceScreen() {
  const { placeId } = useLocalSearchParams<{ placeId: string }>();
  return (
    <OfficeLakePage title="A place at the lake" may="change">
      {(lake) => <Place now={lake} placeId={placeId} />}
    </OfficeLakePage>
  );
}

function Place({ now, placeId }: { now: LakeView; placeId: string }) {
  const { held, hold, newer } = useHeld(now);
  const place = held.details.places?.find(({ id }) => id === placeId);
  if (!place)
    return (
      <Empty title="No such place">It may have been taken away. Go back to the lake and look again.</Empty>
    );
  return (
    <>
      {newer ? <NewerNote what="this lake" onTake={() => hold(newer)} /> : null}
      <PlaceForm key={held.version} lake={held} place={place} />
      <TakeAway lake={held} place={place} />
    </>
  );
}

const withPlaces = (lake: LakeView, places: LakePlace[]) =>
  changeLake(lake.id, { details: { ...lake.details, places }, version: lake.version });

const others = ({ details }: LakeView, id: string): LakePlace[] =>
  (details.places ?? []).filter((each) => each.id !== id);

function PlaceForm({ lake, place }: { lake: LakeView; place: LakePlace | null }) {
  const router = useRouter();
  const [fresh] = useState(newId);
  const id = place?.id ?? fresh;
  const form: DraftForm<PlaceTyped, PlaceRead> = useDraftForm({
    form: `place:${lake.id}:${place ? `${id}:${String(lake.version)}` : 'new'}`,
    schema: PlaceDraft,
    start: place ? draftOfPlace(place) : newPlace(id),
    send: (read) => withPlaces(lake, [...others(lake, id), { ...placeOfDraft(read), id }]),
    onDone: () => {
      if (!place) form.startAfresh();
      router.replace(`/office/lakes/${lake.id}`);
    },
  });
  return (
    <DraftFormFrame
      form={form}
      label="Place"
      act="Keep the place"
      busyLabel="Keeping…"
      beside={<LinkButton label="Leave it" href={`/office/lakes/${lake.id}`} />}
    >
      <Fields form={form} lake={lake} id={id} />
    </DraftFormFrame>
  );
}

type FieldsProps = { form: DraftForm<PlaceTyped, PlaceRead>; lake: LakeView; id: string };

function Fields({ form, lake, id }: FieldsProps) {
  const { control } = form;
  const kind = form.watch('kind');
  const { field, fieldState } = useController({ control, name: 'points' });
  return (
    <>
      <FormChoice
        control={control}
        name="kind"
        label="What it is"
        choices={PLACE_KINDS}
        columns={2}
        bank={false}
      />
      <FormField
        control={control}
        name="name"
        label="Name"
        hint="As one angler would tell another: “Lodge car park”, “soft silt: do not wade”."
      />
      <AreaField
        lake={lake}
        shape={kind === 'overhead_line' ? 'line' : 'point'}
        exceptPlaceId={id}
        value={field.value}
        onChange={field.onChange}
        error={fieldState.error?.message}
      />
      <FormField control={control} name="note" label="Note" hint="Stands in the exported layers." optional />
      {maySayWho(kind) ? (
        <FormChoice
          control={control}
          name="audience"
          label="Who is shown it"
          choices={PLACE_AUDIENCES}
          columns={2}
          bank={false}
        />
      ) : null}
    </>
  );
}

function TakeAway({ lake, place }: { lake: LakeView; place: LakePlace }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const remove = useMutation({
    mutationFn: () => withPlaces(lake, others(lake, place.id)),
    onSuccess: () => router.replace(`/office/lakes/${lake.id}`),
  });
  return (
    <>
      <Button label="Take it off the lake" kind="danger" onPress={() => setAsking(true)} />
      <ProblemNote problem={remove.error} />
      <Confirm
        open={asking}
        title={`Take “${place.name}” off the lake?`}
        words="It goes from the chart, the cards and the pegs’ pages at once. What is printed keeps it."
        act="Take it off the lake"
        danger
        busy={remove.isPending}
        onAct={() => remove.mutate(undefined, { onSettled: () => setAsking(false) })}
        onClose={() => setAsking(false)}
      />
    </>
  );
}
