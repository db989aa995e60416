import { useRouter } from 'expo-router';
import type { GaugeBoardView, LakeView } from '@mereward/shared/lakes/contract';
import type { VisitView } from '@mereward/shared/surveys/contract';
import { useQueryClient } from '@tanstack/react-query';
import { FormProvider } from 'react-hook-form';
import { Button } from '@/components/button';
import { Form } from '@/components/form';
import { FormCheckbox, FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { SaveBar } from '@/components/save-bar';
import { Section } from '@/components/section';
import { openVisitHere } from '@/features/surveys/keep-here';
import { KitPart } from '@/features/surveys/kit-part';
import { surveyKeys } from '@/features/surveys/survey-keys';
import {
  openedView,
  VisitDraft,
  visitOf,
  visitToStartFrom,
  type VisitRead,
  type VisitTyped,
} from '@/features/surveys/visit-draft';
import { dayAt } from '@/features/surveys/visit-words';
import { WeatherPart } from '@/features/surveys/weather-part';
import { draftName, type Again } from '@/hooks/use-again';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { useSession } from '@/lib/session';

const COMPETENCES = [
  { key: 'trainee', label: 'trainee' },
  { key: 'competent', label: 'competent' },
  { key: 'lead', label: 'lead' },
] as const;

type Props = { lake: LakeView; board: GaugeBoardView; last: VisitView | null; again: Again };

/** Opens a visit: the board's reading first, then what the casts will be made with. */
export function NewVisitForm({ lake, board, last, again }: Props) {
  const router = useRouter();
  const queries = useQueryClient();
  const { account } = useSession();
  const form: DraftForm<VisitTyped, VisitRead> = useDraftForm({
    form: draftName(`visit:${lake.id}`, again),
    schema: VisitDraft,
    start: { ...again.over(visitToStartFrom(lake, last)), ...(again.timeRefused ? { startedAt: '' } : {}) },
    send: (read) => {
      const visit = visitOf(read, { board, ...idsOf() });
      const shown = openedView(visit, { lake, surveyor: account });
      return openVisitHere({ visit, shown, typed: form.getValues() }, again.instead);
    },
    onDone: ({ value: visit, waits }) => {
      if (!waits) void queries.invalidateQueries({ queryKey: surveyKeys.ofLake(lake.id) });
      form.startAfresh();
      router.replace(again.instead === null ? `/bank/surveys/${visit.id}/cast` : '/waiting');
    },
  });
  const idsOf = () => {
    const { id, startedAt } = form.getValues();
    if (id !== '' && startedAt !== '') return { id, startedAt };
    const fresh = { id: id || newId(), startedAt: new Date().toISOString() }; // its casts may wait under the id already
    form.setValue('id', fresh.id);
    form.setValue('startedAt', fresh.startedAt);
    return fresh;
  };
  const { control } = form;
  return (
    <Page
      title="Open a visit"
      over={lake.details.name}
      back={{ label: 'Bank', href: '/bank' }}
      actions={<SaveBar form={form} act="Open the visit" busyLabel="Opening…" />}
    >
      <Form label="Visit" onSubmit={form.submit}>
        <ProblemNote problem={form.problem} />
        {form.restored ? (
          <Note title="What you typed earlier is here again">
            <Button label="Start afresh" kind="quiet" bank onPress={form.startAfresh} />
          </Note>
        ) : null}
        <FormField
          control={control}
          name="gauge"
          label={`Gauge board ${board.details.code} reads, ${board.details.unit}`}
          hint="Read it now. Every depth of the visit hangs on it."
          keypad="decimal"
          bank
        />
        <FormField
          control={control}
          name="title"
          label="Name of the visit"
          hint="Such as the pegs to be cast."
          bank
        />
        <FormChoice
          control={control}
          name="competence"
          label="The surveyor is"
          choices={COMPETENCES}
          columns={3}
        />
        <Section
          title="Kit"
          note={
            last
              ? `Carried over from ${last.title}, ${dayAt(last.startedAt, lake.zone)}. Change what differs today.`
              : 'The usual kit to begin with. Change what differs today.'
          }
        >
          <FormProvider {...form}>
            <KitPart lakeId={lake.id} />
          </FormProvider>
        </Section>
        <WeatherPart control={control} />
        <FormCheckbox
          control={control}
          name="consentToPublish"
          label="My casts may go into a published chart, with my name beside the date"
        />
      </Form>
    </Page>
  );
}
