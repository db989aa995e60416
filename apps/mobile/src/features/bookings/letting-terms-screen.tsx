import { useState } from 'react';
import type { LettingTermsView } from '@mereward/shared/bookings/letting-terms';
import type { ReadingMode } from '@mereward/shared/rules/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { FormCheckbox, FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Kept } from '@/components/kept';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { CancellationFields, type HoldsTerms } from '@/features/bookings/cancellation-fields';
import { putLettingTerms, useLettingTerms } from '@/features/bookings/terms-api';
import { TermsDraft, typedTerms } from '@/features/bookings/terms-draft';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';

const RULE_MODES: readonly Choice<ReadingMode>[] = [
  { key: 'must_ack_before_ticket_valid', label: 'Before the ticket is good' },
  { key: 'must_ack_before_arrival', label: 'Before they come' },
  { key: 'notice_only', label: 'They are only told' },
];

/** How the fishery lets its pegs: cancelling, holds, who didn't come, rules, juniors, money. */
export function LettingTermsScreen() {
  const fisheries = useChosenFishery(OFFICE_ROLES);
  return (
    <Page title="Terms of letting" back={{ label: 'Tickets and prices', href: '/office/tickets' }}>
      <ChosenFishery
        {...fisheries}
        none={
          <Empty title="Not yours to set" action={<LinkButton label="To the office" href="/office" />}>
            The owner or a manager sets the terms.
          </Empty>
        }
      >
        {(fisheryId) => <Terms fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Terms({ fisheryId }: { fisheryId: string }) {
  const terms = useLettingTerms(fisheryId);
  return (
    <Loaded query={terms} waiting="Reading the terms…">
      {(now) => <Held fisheryId={fisheryId} now={now} />}
    </Loaded>
  );
}

type Props = { fisheryId: string; now: LettingTermsView };

/** A fresh reading must not sweep away what is typed; what came in since is offered. */
function Held({ fisheryId, now }: Props) {
  const [held, hold] = useState(now);
  const [kept, setKept] = useState(false);
  const newer = (now.version ?? 0) > (held.version ?? 0) ? now : null;
  return (
    <>
      {now.may.change ? null : (
        <Note title="Not yours to change">
          The owner or a manager sets the terms. You can read them here.
        </Note>
      )}
      {held.version === null ? (
        <Note>
          Nothing was set yet: these are terms to begin with, by common practice. Keep them as they are, or
          change them first.
        </Note>
      ) : null}
      {newer && !kept ? <NewerNote what="the terms" onTake={() => hold(newer)} /> : null}
      <TermsForm
        key={held.version ?? 0}
        fisheryId={fisheryId}
        now={held}
        onKept={(view) => {
          setKept(true);
          hold(view);
        }}
      />
      <Kept words={kept ? 'The terms are kept. Bookings made from now on carry them.' : null} />
    </>
  );
}

const Wanted = z.object({ details: TermsDraft });

function TermsForm({ fisheryId, now, onKept }: Props & { onKept: (view: LettingTermsView) => void }) {
  const form: DraftForm<HoldsTerms, z.output<typeof Wanted>> = useDraftForm({
    form: `letting-terms:${fisheryId}:${String(now.version)}`,
    schema: Wanted,
    start: { details: typedTerms(now.details) },
    send: ({ details }) => putLettingTerms(fisheryId, { details, version: now.version }),
    onDone: onKept,
  });
  const { control } = form;
  return (
    <FormProvider {...form}>
      <DraftFormFrame form={form} label="Terms of letting" act="Keep the terms" busyLabel="Keeping…">
        <Section
          title="When an angler cancels"
          note="Each booking keeps the steps as they were when it was sold."
          bare
        >
          <CancellationFields />
        </Section>
        <Section title="Holding a peg">
          <FormField
            control={control}
            name="details.holdMinutes"
            label="Minutes a peg is held while somebody books"
            keypad="numeric"
          />
          <FormField
            control={control}
            name="details.challengeMinutes"
            label="Minutes from its start while their bank checks the card"
            keypad="numeric"
          />
          <FormField
            control={control}
            name="details.claimMinutes"
            label="Minutes a freed peg is offered to one who waits"
            hint="Nobody is offered a peg in the night."
            keypad="numeric"
          />
        </Section>
        <Section title="On the day">
          <FormField
            control={control}
            name="details.noShowHours"
            label="Hours after the start before “nobody came” may be said"
            keypad="numeric"
          />
          <FormSelect
            control={control}
            name="details.rulesMode"
            label="The rules are read"
            choices={RULE_MODES}
          />
          <FormCheckbox
            control={control}
            name="details.juniorNights"
            label="A junior may stay the night beside the guardian"
          />
        </Section>
        <Section title="Money">
          <FormCheckbox
            control={control}
            name="details.payAtLodge"
            label="An angler may book now and pay at the lodge"
          />
          <FormField
            control={control}
            name="details.officeRefund"
            label="The office gives back up to, £"
            hint="Above it a manager or the owner decides; nobody decides what they proposed."
            keypad="decimal"
          />
          <Note kind={now.cardPayments ? 'fine' : 'caution'}>
            {now.cardPayments
              ? 'Cards are taken on the web, on the card provider’s own page.'
              : 'Cards can’t be taken on the web: no card provider is set up. Anglers pay at the lodge.'}
          </Note>
        </Section>
      </DraftFormFrame>
    </FormProvider>
  );
}
