import { useState } from 'react';
import { useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { EVENT_USUALLY_ENDS } from '@mereward/shared/surveys/bottom-ending';
import { civilDay } from '@mereward/shared/time/civil-day';
import { useController, useWatch } from 'react-hook-form';
import { ChoiceGrid, ManyChoiceGrid } from '@/components/choice-grid';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { AreaField } from '@/features/charts/area-field';
import {
  EVENT_ENDS,
  EVENT_KINDS,
  EventDraft,
  eventOf,
  type EventRead,
  type EventTyped,
} from '@/features/charts/event-draft';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { recordBottomEvent } from '@/features/surveys/bottom-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const WHERE = [
  { key: 'area', label: 'Part of it', note: 'drawn below' },
  { key: 'whole', label: 'The whole lake' },
] as const;

/** Records works or a season that end what was known of a bottom. */
export function NewEventScreen() {
  return (
    <OfficeLakePage title="Record an event" may="changePegs">
      {(lake) => <EventForm lake={lake} />}
    </OfficeLakePage>
  );
}

function EventForm({ lake }: { lake: LakeView }) {
  const router = useRouter();
  const [id] = useState(newId);
  const [today] = useState(() => civilDay(new Date(), lake.zone));
  const list = `/office/lakes/${lake.id}/events` as const;
  const form: DraftForm<EventTyped, EventRead> = useDraftForm({
    form: `bottom-event:${lake.id}`,
    schema: EventDraft,
    start: {
      id,
      kind: 'weed_cut',
      happenedOn: today,
      where: 'area',
      corners: '',
      ends: [...EVENT_USUALLY_ENDS.weed_cut],
      note: '',
    },
    leaveOut: ['happenedOn'],
    send: (read) => recordBottomEvent(lake.id, eventOf(read)),
    onDone: () => {
      form.startAfresh();
      router.replace(list);
    },
  });
  return (
    <DraftFormFrame
      form={form}
      label="Event"
      act="Record the event"
      busyLabel="Recording…"
      beside={<LinkButton label="Leave it" href={list} />}
    >
      <What form={form} />
      <FormField
        control={form.control}
        name="happenedOn"
        label="It happened on"
        hint="Casts of that day count as made after it."
        picker="date"
      />
      <Where form={form} lake={lake} />
      <FormField control={form.control} name="note" label="Note" hint="For the staff only." optional />
    </DraftFormFrame>
  );
}

type PartProps = { form: DraftForm<EventTyped, EventRead> };

function What({ form }: PartProps) {
  const kind = useController({ control: form.control, name: 'kind' });
  const ends = useController({ control: form.control, name: 'ends' });
  return (
    <>
      <ChoiceGrid
        label="What happened"
        choices={EVENT_KINDS}
        value={kind.field.value}
        onChange={(key) => {
          kind.field.onChange(key);
          form.setValue('ends', [...EVENT_USUALLY_ENDS[key]]);
        }}
        columns={2}
        bank={false}
      />
      <ManyChoiceGrid
        label="What of the old survey it ends"
        hint="Set to what is usual for it (common practice, no published source). Change it where you know better."
        choices={EVENT_ENDS}
        values={ends.field.value}
        onChange={ends.field.onChange}
        error={ends.fieldState.error?.message}
        columns={1}
        bank={false}
      />
      {ends.field.value.includes('depth') ? (
        <Note kind="caution" title="Depths from before it will be left out">
          The next chart shows that water as not surveyed until it is cast again.
        </Note>
      ) : null}
    </>
  );
}

function Where({ form, lake }: PartProps & { lake: LakeView }) {
  const { control } = form;
  const where = useWatch({ control, name: 'where' });
  const corners = useController({ control, name: 'corners' });
  return (
    <>
      <FormChoice control={control} name="where" label="Where" choices={WHERE} columns={2} bank={false} />
      {where === 'area' ? (
        <AreaField
          lake={lake}
          value={corners.field.value}
          onChange={corners.field.onChange}
          error={corners.fieldState.error?.message}
        />
      ) : null}
    </>
  );
}
