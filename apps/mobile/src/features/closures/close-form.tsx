import { useState } from 'react';
import { CLOSURE_REASON_WORDS } from '@mereward/shared/closures/closure-effect';
import { ClosureEffect, ClosureReason } from '@mereward/shared/closures/contract';
import type { ClosurePreview } from '@mereward/shared/closures/deeds-contract';
import { useController, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { Confirm } from '@/components/confirm';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Facts } from '@/components/facts';
import { FormChoice, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { closeWater, usePreviewClosure } from '@/features/closures/api';
import { ClosureDraft, closeOf, MOST_CONDITIONS } from '@/features/closures/closure-draft';
import { EFFECTS, METHODS } from '@/features/closures/closure-words';
import { useLake } from '@/features/lakes/api';
import { space } from '@/constants/layout';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { money } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { civilTime } from '@/lib/zoned-time';

type Form = DraftForm<ClosureDraft, ClosureDraft>;
type Lakes = readonly { id: string; name: string }[];
type Props = { fisheryId: string; lakes: Lakes; zone: string; nowMs: number; onDone: () => void };
type Asked = { draft: ClosureDraft; hits: ClosurePreview };

const start = (zone: string, nowMs: number): ClosureDraft => ({
  what: 'lakes',
  lakeIds: [],
  pegIds: [],
  method: 'keepnets',
  reason: 'flood',
  effect: 'move',
  from: civilTime(nowMs, zone),
  until: '',
  publicWords: '',
  conditions: '',
  dawns: '',
  moveToLakeId: '',
  chooseUntil: '',
});

/** What is closed, why, and what becomes of the bookings in the way: told first, done when confirmed. */
export function CloseForm({ fisheryId, lakes, zone, nowMs, onDone }: Props) {
  const [made] = useState(() => ({
    id: newId(),
    zone,
    conditionIds: Array.from({ length: MOST_CONDITIONS }, newId),
  }));
  const [asked, setAsked] = useState<Asked | null>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const preview = usePreviewClosure(fisheryId);
  const form: Form = useDraftForm({
    form: `closure:${fisheryId}`,
    schema: ClosureDraft,
    start: start(zone, nowMs),
    leaveOut: ['from'],
    send: async (draft) => {
      const { id: _id, ...wish } = closeOf(draft, made);
      return { draft, hits: await preview.mutateAsync(wish) };
    },
    onDone: setAsked,
  });
  const close = async ({ draft }: Asked): Promise<void> => {
    setBusy(true);
    setProblem(null);
    try {
      await closeWater(fisheryId, closeOf(draft, made));
      form.startAfresh();
      onDone();
    } catch (fault) {
      setProblem(fault);
      setAsked(null);
    } finally {
      setBusy(false);
    }
  };
  return (
    <>
      <DraftFormFrame form={form} label="Closure" act="See what it hits" busyLabel="Looking…">
        <Where form={form} lakes={lakes} />
        <Why form={form} zone={zone} />
        <Bookings form={form} lakes={lakes} zone={zone} />
        <Opening form={form} />
      </DraftFormFrame>
      <ProblemNote problem={problem} />
      {asked ? (
        <Hits hits={asked.hits} onClose={() => setAsked(null)} onAct={() => void close(asked)} busy={busy} />
      ) : null}
    </>
  );
}

type HitsProps = { hits: ClosurePreview; busy: boolean; onAct: () => void; onClose: () => void };

function Hits({ hits, busy, onAct, onClose }: HitsProps) {
  const [asking, setAsking] = useState(false);
  const { words, kinds, told, pegs, currency } = hits;
  return (
    <View style={{ gap: space.medium }}>
      <Note kind={hits.bookings > 0 ? 'caution' : 'plain'} title={words} live>
        {`${String(pegs)} ${pegs === 1 ? 'peg is' : 'pegs are'} closed in the calendar${told > 0 ? `, and ${String(told)} more are told` : ''}. Nothing is done yet.`}
      </Note>
      <Facts
        facts={kinds.map(({ ticketName, count, valuePence }) => ({
          term: ticketName,
          fact: `${String(count)}, ${money(valuePence, currency)}`,
        }))}
      />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button label="Close it" kind="danger" onPress={() => setAsking(true)} />
        <Button label="Change it first" kind="quiet" onPress={onClose} />
      </View>
      <Confirm
        open={asking}
        title="Close the water?"
        words={`${words}. Their holders get a letter at once, and the notice goes up.`}
        act="Close it"
        danger
        busy={busy}
        onClose={() => setAsking(false)}
        onAct={onAct}
      />
    </View>
  );
}

const WHAT = [
  { key: 'lakes', label: 'Lakes' },
  { key: 'pegs', label: 'Pegs' },
  { key: 'fishery', label: 'The whole fishery' },
  { key: 'method', label: 'A way of fishing' },
] as const;

function Where({ form, lakes }: { form: Form; lakes: Lakes }) {
  const { control } = form;
  const what = useWatch({ control, name: 'what' });
  const chosen = useController({ control, name: 'lakeIds' });
  const [lakeId = ''] = chosen.field.value;
  return (
    <>
      <FormChoice
        control={control}
        name="what"
        label="What is closed"
        choices={WHAT}
        columns={2}
        bank={false}
      />
      {what === 'method' ? (
        <FormChoice
          control={control}
          name="method"
          label="Which way"
          choices={(['keepnets', 'boats', 'night'] as const).map((key) => ({ key, label: METHODS[key] }))}
          columns={3}
          bank={false}
        />
      ) : null}
      {what === 'fishery' ? null : (
        <ManyChoiceGrid
          label="On which lakes"
          hint={what === 'method' ? 'None chosen: on all.' : undefined}
          choices={lakes.map(({ id: key, name: label }) => ({ key, label }))}
          values={chosen.field.value}
          onChange={chosen.field.onChange}
          error={chosen.fieldState.error?.message}
          columns={1}
          bank={false}
        />
      )}
      {what === 'pegs' && lakeId !== '' ? <Pegs form={form} lakeId={lakeId} /> : null}
    </>
  );
}

function Pegs({ form, lakeId }: { form: Form; lakeId: string }) {
  const lake = useLake(lakeId);
  const chosen = useController({ control: form.control, name: 'pegIds' });
  return (
    <Loaded query={lake} waiting="Reading the pegs…">
      {({ pegs }) => (
        <ManyChoiceGrid
          label="Which pegs"
          choices={pegs.map(({ id: key, number: label }) => ({ key, label }))}
          values={chosen.field.value}
          onChange={chosen.field.onChange}
          error={chosen.fieldState.error?.message}
          columns={4}
          bank={false}
        />
      )}
    </Loaded>
  );
}

function Why({ form: { control }, zone }: { form: Form; zone: string }) {
  return (
    <>
      <FormSelect
        control={control}
        name="reason"
        label="Why"
        choices={ClosureReason.options.map((key) => ({ key, label: CLOSURE_REASON_WORDS[key] }))}
      />
      <FormField
        control={control}
        name="publicWords"
        label="What visitors read"
        hint="The hazard, then the act, then who decides. At most 400 letters."
        lines={3}
      />
      <FormField
        control={control}
        name="from"
        label="From"
        hint={`By the fishery’s clock (${zone}).`}
        picker="datetime-local"
      />
      <FormField
        control={control}
        name="until"
        label="Until"
        hint="Empty: until it is lifted."
        picker="datetime-local"
        optional
      />
    </>
  );
}

function Bookings({ form: { control }, lakes, zone }: { form: Form; lakes: Lakes; zone: string }) {
  const [effect, what, closed] = useWatch({ control, name: ['effect', 'what', 'lakeIds'] });
  const others = lakes.filter(({ id }) => what !== 'lakes' || !closed.includes(id));
  const none = { key: '', label: 'No other lake' };
  return (
    <>
      <FormChoice
        control={control}
        name="effect"
        label="Bookings in the way"
        choices={ClosureEffect.options.map((key) => ({ key, ...EFFECTS[key] }))}
        columns={2}
        bank={false}
      />
      {effect === 'move' && what !== 'method' ? (
        <>
          {what === 'fishery' ? null : (
            <FormSelect
              control={control}
              name="moveToLakeId"
              label="Another lake to offer"
              hint="The difference in price goes back; a dearer ticket costs them nothing more."
              choices={[none, ...others.map(({ id: key, name: label }) => ({ key, label }))]}
            />
          )}
          <FormField
            control={control}
            name="chooseUntil"
            label="They choose by"
            hint={`Empty: ten the next morning. Whoever has not chosen then gets all their money back. By the fishery’s clock (${zone}).`}
            picker="datetime-local"
            optional
          />
        </>
      ) : null}
    </>
  );
}

function Opening({ form: { control } }: { form: Form }) {
  return (
    <>
      <FormField
        control={control}
        name="conditions"
        label="What must be so before it is lifted"
        hint="A line each. They are ticked when it is lifted; only the owner may pass over one."
        lines={3}
        optional
      />
      <FormField
        control={control}
        name="dawns"
        label="Dawn readings running of 5.0 mg/l oxygen or more"
        hint="How many. Oxygen readings are not kept here yet, so until then only the owner can lift such a closure, with a reason. 5.0 is common practice, no published source."
        keypad="numeric"
        optional
      />
    </>
  );
}
