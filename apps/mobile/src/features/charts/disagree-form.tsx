import { useState } from 'react';
import type { PegPageView } from '@mereward/shared/charts/contract';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { DisagreementView } from '@mereward/shared/charts/disagreement';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { useController } from 'react-hook-form';
import { View } from 'react-native';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormCheckbox, FormChoice, FormSelect, FormStepper } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { FieldError } from '@/components/field-frame';
import { space } from '@/constants/layout';
import { marksAhead } from '@/features/surveys/marks-ahead';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { useUnits } from '@/hooks/use-units';
import { newId } from '@/lib/new-id';
import { positionText, readPosition } from '@/lib/position-text';
import { BOTTOMS, BY_COUNT, BY_PLACE, disagreeDraft, type DisagreeTyped } from './disagree-draft';
import { disagree } from './disagreement-api';
import { capital } from './peg-words';
import { PlaceCanvas } from './place-canvas';

type Props = {
  page: PegPageView;
  lake: LakeView;
  /** What the reader came from: a spot, or a place touched on the chart. */
  spotId: string | null;
  place: [number, number] | null;
  onSent: (kept: DisagreementView) => void;
};

/** What was found at a peg that the chart tells otherwise: where, when, how deep, on what. */
export function DisagreeForm({ page, lake, spotId, place, onSent }: Props) {
  const units = useUnits();
  const [id] = useState(newId);
  const [schema] = useState(() => disagreeDraft(units));
  const [today] = useState(() => civilDay(new Date(), page.fishery.zone));
  const spots = page.spots ?? [];
  const spot = spots.find((each) => each.id === spotId);
  const start: DisagreeTyped = {
    where: place ? BY_PLACE : (spot?.id ?? BY_COUNT),
    position: place ? positionText(place) : '',
    markId: marksAhead(lake, page.id)[0]?.id ?? '',
    offsetDeg: 0,
    count: '',
    readTo: 'lead_to_rod_tip',
    day: today,
    found: { depthM: '', depthBy: 'float', bottom: '', snag: false, weed: 'unsaid', note: '' },
  };
  const form = useDraftForm({
    form: `disagree:${page.id}:${place ? 'place' : (spot?.id ?? 'count')}`,
    schema,
    start,
    send: (told) => disagree(page.id, { id, ...told }),
    onDone: onSent,
  });
  const { control } = form;
  return (
    <DraftFormFrame
      form={form}
      label="Not as charted"
      act="Send it to the fishery"
      busyLabel="Sending…"
      beside={<LinkButton label="Leave it" href={`/water/pegs/${page.id}`} />}
    >
      <FormSelect
        control={control}
        name="where"
        label="Where it was"
        choices={[
          ...spots.map(({ id: key, name }) => ({ key, label: `At the spot “${name}”` })),
          { key: BY_COUNT, label: 'By wraps and far-bank mark' },
          { key: BY_PLACE, label: 'A place on the map' },
        ]}
      />
      <Where form={form} lake={lake} pegId={page.id} sticks={stickWords(units.stickSpacingM)} />
      <FormField control={control} name="day" label="Which day" picker="date" />
      <Section title="What you found" note="Fill in what you know; one of these is enough.">
        <FormField
          control={control}
          name="found.depthM"
          label={`Depth, ${units.length}`}
          hint="Of the water that day. The fishery brings it to the gauge board."
          keypad="decimal"
          optional
        />
        {form.watch('found.depthM').trim() === '' ? null : (
          <FormChoice
            control={control}
            name="found.depthBy"
            label="Measured"
            columns={3}
            choices={[
              { key: 'float', label: 'Marker float' },
              { key: 'lead_count', label: 'Lead counted down' },
              { key: 'other', label: 'Another way' },
            ]}
          />
        )}
        <FormSelect
          control={control}
          name="found.bottom"
          label="Bottom"
          choices={[
            { key: '', label: 'Not said' },
            ...BOTTOMS.map((key) => ({ key, label: capital(BOTTOM_WORDS[key]) })),
          ]}
        />
        <FormChoice
          control={control}
          name="found.weed"
          label="Weed"
          columns={4}
          choices={[
            { key: 'unsaid', label: 'Not said' },
            { key: 'clear', label: 'Clear' },
            { key: 'low', label: 'Low' },
            { key: 'thick', label: 'Thick' },
          ]}
        />
        <FormCheckbox control={control} name="found.snag" label="A snag: it held or took tackle" />
        <FormField control={control} name="found.note" label="Anything else" lines={3} optional />
      </Section>
    </DraftFormFrame>
  );
}

type Part<Out> = { form: DraftForm<DisagreeTyped, Out>; lake: LakeView; pegId: string; sticks: string };

function Where<Out>({ form, lake, pegId, sticks }: Part<Out>) {
  const { control } = form;
  const where = form.watch('where');
  if (where === BY_PLACE) return <OnTheMap form={form} lake={lake} />;
  if (where !== BY_COUNT) return null;
  return (
    <View style={{ gap: space.page }}>
      <FormField
        control={control}
        name="count"
        label={`Wraps of ${sticks}`}
        hint="As you wound it: 14, 14 + 3 ft, 14 + 0.9 m. Other sticks? Change them under Me."
      />
      <FormSelect
        control={control}
        name="markId"
        label="Over the mark"
        unset="Choose a mark"
        choices={marksAhead(lake, pegId).map(({ id, details }) => ({
          key: id,
          label: `${details.name} (${details.code})`,
        }))}
      />
      <FormStepper
        control={control}
        name="offsetDeg"
        label="Beside the mark: − left, + right"
        min={-90}
        max={90}
        step={1}
        unit="°"
      />
      <FormChoice
        control={control}
        name="readTo"
        label="Line counted from the lead to"
        columns={2}
        choices={[
          { key: 'lead_to_rod_tip', label: 'The rod tip' },
          { key: 'lead_to_clip', label: 'The reel’s clip' },
        ]}
      />
    </View>
  );
}

function OnTheMap<Out>({ form, lake }: Pick<Part<Out>, 'form' | 'lake'>) {
  const { field, fieldState } = useController({ control: form.control, name: 'position' });
  return (
    <View style={{ gap: space.small }}>
      <PlaceCanvas
        lake={lake}
        label="here"
        place={readPosition(field.value)}
        onPlace={(at) => field.onChange(positionText(at))}
      />
      {fieldState.error?.message ? <FieldError id="position" words={fieldState.error.message} /> : null}
    </View>
  );
}
