import { useState } from 'react';
import { ChangeWeight } from '@mereward/shared/rules/contract';
import type { DraftView } from '@mereward/shared/rules/sheet-contract';
import { Button } from '@/components/button';
import { ChoiceGrid } from '@/components/choice-grid';
import { Confirm } from '@/components/confirm';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { usePublishRules } from '@/features/rules/api';

const WEIGHTS: Readonly<Record<ChangeWeight, { label: string; note: string }>> = {
  minor: { label: 'A wording put right', note: 'Nobody is asked to read again.' },
  change: { label: 'A change', note: 'Whoever books from now on reads it.' },
  safety: {
    label: 'Somebody’s safety hangs on it',
    note: 'Everybody with a ticket to come reads it again, and gets a letter.',
  },
};

type Props = { fisheryId: string; draft: DraftView };

/** Puts the draft in force: how much it matters, then the act. */
export function PublishPart({ fisheryId, draft }: Props) {
  const [weight, setWeight] = useState<ChangeWeight>(draft.suggested);
  const [asking, setAsking] = useState(false);
  const publish = usePublishRules(fisheryId);
  const choices = ChangeWeight.options
    .filter((key) => key !== 'minor' || draft.least === 'minor')
    .map((key) => ({ key, ...WEIGHTS[key] }));
  const told =
    weight === 'safety'
      ? ` ${String(draft.upcoming)} ${draft.upcoming === 1 ? 'booking is' : 'bookings are'} asked to read it again.`
      : '';
  return (
    <Section title="Publish">
      <ChoiceGrid
        label="How much it matters"
        choices={choices}
        value={weight}
        onChange={setWeight}
        columns={1}
        bank={false}
      />
      <ProblemNote problem={publish.error} />
      <Button label="Publish" kind="main" onPress={() => setAsking(true)} />
      <Confirm
        open={asking}
        title="Put these rules in force?"
        words={`${draft.words}. What is published stays as it is; a later version can change it.${told}`}
        act="Publish the rules"
        busy={publish.isPending}
        onClose={() => setAsking(false)}
        onAct={() =>
          publish.mutate(
            { draftId: draft.id, version: draft.version, weight },
            { onSettled: () => setAsking(false) },
          )
        }
      />
    </Section>
  );
}
