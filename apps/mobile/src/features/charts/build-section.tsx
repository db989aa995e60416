import type { ChartReview } from '@mereward/shared/charts/contract';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Progress } from '@/components/progress';
import { useReviewDeed } from '@/features/charts/review-api';

/** How far the building is; it can be left and comes back true. Nothing is shown once it is done. */
export function BuildSection({ review }: { review: ChartReview }) {
  const deed = useReviewDeed(review.chart.id);
  const { build } = review.chart;
  if (build === null || build.state === 'done') return null;
  if (build.state === 'queued' || build.state === 'running')
    return (
      <>
        <Progress
          label={build.step}
          share={build.state === 'queued' ? null : build.share}
          onCancel={review.may.cancelBuild ? () => deed.mutate('cancel-build') : undefined}
        />
        <ProblemNote problem={deed.error} />
      </>
    );
  return (
    <>
      <Note
        kind={build.state === 'failed' ? 'danger' : 'caution'}
        title={build.state === 'failed' ? 'The chart could not be built' : 'The building was stopped'}
      >
        {build.error ?? 'Nothing of the survey was changed. Build it again when you like.'}
      </Note>
      <ProblemNote problem={deed.error} />
      {review.may.rebuild ? (
        <Button label="Build again" busy={deed.isPending} onPress={() => deed.mutate('rebuild')} />
      ) : null}
    </>
  );
}
