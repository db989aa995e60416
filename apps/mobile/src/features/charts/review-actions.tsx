import { useState } from 'react';
import { useRouter } from 'expo-router';
import type { ChartReview } from '@mereward/shared/charts/contract';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Field } from '@/components/field';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { useDiscardChart, useReviewDeed, useWithdrawChart } from '@/features/charts/review-api';

/** What this person may do with the chart now. */
export function ReviewActions({ review }: { review: ChartReview }) {
  const { chart, may } = review;
  const deed = useReviewDeed(chart.id);
  const pending = deed.isPending ? deed.variables : null;
  const rebuild = may.rebuild && chart.build?.state === 'done';
  return (
    <>
      <ProblemNote problem={deed.error} />
      {may.submit ? (
        <Button
          label="Submit for approval"
          kind="main"
          busy={pending === 'submit'}
          onPress={() => deed.mutate('submit')}
        />
      ) : null}
      {may.approve ? (
        <Button
          label="Approve and publish"
          kind="main"
          busy={pending === 'approve'}
          onPress={() => deed.mutate('approve')}
        />
      ) : null}
      {rebuild ? (
        <Button label="Build again" busy={pending === 'rebuild'} onPress={() => deed.mutate('rebuild')} />
      ) : null}
      {may.discard ? <Discard review={review} /> : null}
      {may.withdraw ? <Withdraw chartId={chart.id} /> : null}
    </>
  );
}

function Discard({ review }: { review: ChartReview }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const discard = useDiscardChart({ chartId: review.chart.id, lakeId: review.lakeId });
  const act = () =>
    discard.mutate(undefined, {
      onSuccess: () => router.replace('/office/charts'),
      onSettled: () => setAsking(false),
    });
  return (
    <>
      <ProblemNote problem={discard.error} />
      <Button label="Discard the draft" kind="quiet" onPress={() => setAsking(true)} />
      <Confirm
        open={asking}
        title="Discard this draft?"
        words="The draft goes and can’t be brought back. The visits and casts it was made from stay as they are."
        act="Discard the draft"
        danger
        busy={discard.isPending}
        onAct={act}
        onClose={() => setAsking(false)}
      />
    </>
  );
}

function Withdraw({ chartId }: { chartId: string }) {
  const [reason, setReason] = useState('');
  const [asking, setAsking] = useState(false);
  const withdraw = useWithdrawChart(chartId);
  return (
    <Section
      title="Withdraw it"
      note="A withdrawn chart is no longer shown to anglers. It is kept with the reason, and never changes."
    >
      <ProblemNote problem={withdraw.error} />
      <Field label="Why it is withdrawn" value={reason} onChange={setReason} lines={2} />
      <Button
        label="Withdraw the chart"
        kind="danger"
        disabled={reason.trim() === ''}
        onPress={() => setAsking(true)}
      />
      <Confirm
        open={asking}
        title="Withdraw this chart?"
        words="Anglers stop seeing its depths, bottom and spots at once. It can’t be published again; a new chart can."
        act="Withdraw the chart"
        danger
        busy={withdraw.isPending}
        onAct={() => withdraw.mutate({ reason: reason.trim() }, { onSettled: () => setAsking(false) })}
        onClose={() => setAsking(false)}
      />
    </Section>
  );
}
