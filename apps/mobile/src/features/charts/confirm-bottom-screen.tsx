import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { ConfirmedBottomView } from '@mereward/shared/surveys/confirmed-contract';
import { civilDay } from '@mereward/shared/time/civil-day';
import { useController, useWatch } from 'react-hook-form';
import { Empty } from '@/components/empty';
import { Field } from '@/components/field';
import { Form } from '@/components/form';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Text } from '@/components/text';
import {
  ConfirmDraft,
  confirmationOf,
  type ConfirmRead,
  type ConfirmTyped,
} from '@/features/charts/confirm-draft';
import { ConfirmedSection } from '@/features/charts/confirmed-section';
import { PlaceCanvas } from '@/features/charts/place-canvas';
import { useLake } from '@/features/lakes/api';
import { CONFIRMED_WAYS, COVERS, SUBSTRATES } from '@/features/surveys/bottom-class-words';
import { confirmBottom, useConfirmed } from '@/features/surveys/bottom-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { positionText, readPosition } from '@/lib/position-text';

/** Keeps what the bottom certainly is at one place: at a cast just made, or at a place tapped on the lake. */
export function ConfirmBottomScreen() {
  const { lakeId, castId, cast } = useLocalSearchParams<{ lakeId: string; castId?: string; cast?: string }>();
  const lake = useLake(lakeId);
  const confirmed = useConfirmed(lakeId);
  const may = confirmed.data?.may.confirm;
  if (lake.data && may)
    return (
      <ConfirmForm
        key={castId ?? 'place'}
        lake={lake.data}
        at={castId ? { id: castId, words: cast ?? 'the cast' } : null}
        kept={confirmed.data?.confirmed ?? []}
      />
    );
  return (
    <Page title="Confirm a bottom" back={{ label: 'Bank', href: '/bank' }}>
      <Loaded query={confirmed} waiting="Reading the lake…">
        {(value) => (
          <>
            <Empty title="Not yours to confirm">Managers and bailiffs confirm bottoms.</Empty>
            {lake.data ? <ConfirmedSection lakeId={lakeId} confirmed={value.confirmed} /> : null}
          </>
        )}
      </Loaded>
    </Page>
  );
}

type Props = {
  lake: LakeView;
  at: { id: string; words: string } | null;
  kept: readonly ConfirmedBottomView[];
};

function ConfirmForm({ lake, at, kept }: Props) {
  const [today] = useState(() => civilDay(new Date(), lake.zone));
  const [said, setSaid] = useState(false);
  const form: DraftForm<ConfirmTyped, ConfirmRead> = useDraftForm({
    form: `confirm:${lake.id}:${at?.id ?? 'place'}`,
    schema: ConfirmDraft,
    start: {
      id: '',
      castId: at?.id ?? '',
      position: '',
      positionSigmaM: '3',
      substrate: '',
      cover: '',
      method: null,
      day: today,
      note: '',
    },
    leaveOut: ['day'],
    send: (read) => confirmBottom(lake.id, confirmationOf(read, idOf())),
    onDone: () => {
      form.startAfresh();
      setSaid(true);
    },
  });
  const idOf = (): string => {
    const { id } = form.getValues();
    if (id !== '') return id;
    const fresh = newId();
    form.setValue('id', fresh);
    return fresh;
  };
  return (
    <Page
      title="Confirm a bottom"
      over={lake.details.name}
      back={{ label: 'Bank', href: '/bank' }}
      actions={<SaveBar form={form} act="Confirm it" busyLabel="Keeping…" />}
    >
      <Form label="Confirmed bottom" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        {said ? (
          <Note kind="fine" title="It is kept" live>
            It counts in the next chart, and teaches the fishery’s table of feels through the casts near it.
          </Note>
        ) : null}
        {at ? <Text weight="semibold">{`At ${at.words}, where the cast lay.`}</Text> : null}
        <Seen form={form} />
        {at ? null : <PlaceOfIt form={form} lake={lake} />}
        <FormField control={form.control} name="day" label="Seen on" picker="date" bank />
        <FormField control={form.control} name="note" label="Note" optional bank />
      </Form>
      <ConfirmedSection lakeId={lake.id} confirmed={kept} />
    </Page>
  );
}

type PartProps = { form: DraftForm<ConfirmTyped, ConfirmRead> };

const NOT_SEEN = { key: '', label: 'not seen' } as const;

function Seen({ form: { control } }: PartProps) {
  const method = useWatch({ control, name: 'method' });
  return (
    <>
      <FormChoice
        control={control}
        name="method"
        label="How it was seen"
        choices={CONFIRMED_WAYS}
        columns={2}
      />
      {method === 'pronged_lead' ? (
        <Note kind="caution" title="Pronged leads lock in weed">
          Use a smooth lead first. Strong line, gloves, never wrap line round your hand, and stand aside when
          pulling. A lost pronged lead is a tether: tell the fishery.
        </Note>
      ) : null}
      {method === 'diver' ? (
        <Note kind="caution">Only a diving contractor dives, and never alone.</Note>
      ) : null}
      <FormChoice
        control={control}
        name="substrate"
        label="The bottom is"
        choices={[...SUBSTRATES, NOT_SEEN]}
        columns={3}
      />
      <FormChoice
        control={control}
        name="cover"
        label="On it lies"
        choices={[...COVERS, NOT_SEEN]}
        columns={3}
      />
    </>
  );
}

function PlaceOfIt({ form, lake }: PartProps & { lake: LakeView }) {
  const { control } = form;
  const { field, fieldState } = useController({ control, name: 'position' });
  return (
    <>
      <PlaceCanvas
        lake={lake}
        label="here"
        place={readPosition(field.value)}
        onPlace={(place) => field.onChange(positionText(place))}
      />
      <Field
        label="Latitude, longitude"
        hint="Tap the place on the lake, drag it, or type it in degrees (WGS 84)."
        value={field.value}
        onChange={field.onChange}
        onBlur={field.onBlur}
        error={fieldState.error?.message}
        bank
      />
      <FormField
        control={control}
        name="positionSigmaM"
        label="Good to, metres"
        hint="One σ. A phone under open sky is good to about 3 m."
        keypad="decimal"
        bank
      />
    </>
  );
}
