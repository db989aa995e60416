import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { ChartCastList, ChartCastView } from '@mereward/shared/charts/left-out-contract';
import type { SoundingMissView } from '@mereward/shared/charts/sounding-miss';
import { Button } from '@/components/button';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { placeOf, Stands } from './chart-casts-screen';
import { CastDraft, type CastRead, type CastTyped } from './leave-out-draft';
import { leaveOut, useChartCasts, usePutBack } from './left-out-api';
import { leftOutWords } from './left-out-words';
import { useChartReview } from './review-api';
import { castTitle, outByWords } from './sounding-miss-words';

/** One cast as it stands in one chart: left out with a reason, or put back. */
export function ChartCastScreen() {
  const { chartId, castId } = useLocalSearchParams<{ chartId: string; castId: string }>();
  const casts = useChartCasts(chartId);
  const review = useChartReview(chartId);
  const cast = casts.data?.casts.find(({ id }) => id === castId);
  const miss = review.data?.misses.find(({ id }) => id === castId);
  return (
    <Page
      title={cast ? castTitle(cast) : 'Cast'}
      {...(casts.data ? { over: `${casts.data.lakeName}, ${casts.data.title}` } : {})}
      back={{ label: casts.data?.title ?? 'The chart', href: `/office/charts/${chartId}` }}
      {...(cast ? { end: <Stands cast={cast} /> } : {})}
    >
      <Loaded
        query={casts}
        waiting="Reading the cast…"
        empty={{
          when: (list) => !list.casts.some(({ id }) => id === castId),
          show: (
            <Empty
              title="Not a cast of this chart"
              action={
                <LinkButton label="Every cast of this chart" href={`/office/charts/${chartId}/casts`} />
              }
            >
              It was taken back in its visit, or belongs to another visit.
            </Empty>
          ),
        }}
      >
        {(list) => (cast ? <Cast key={cast.id} {...{ list, cast, miss }} /> : null)}
      </Loaded>
    </Page>
  );
}

type Props = { list: ChartCastList; cast: ChartCastView; miss: SoundingMissView | undefined };

function Cast({ list, cast, miss }: Props) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <>
      <Facts
        facts={[
          { term: 'Visit', fact: cast.visitTitle },
          { term: 'Place', fact: placeOf(cast, units) ?? '' },
          { term: 'Read, at datum', fact: cast.depthM === null ? 'no depth' : m(cast.depthM) },
          { term: 'Grade', fact: cast.grade ?? '' },
          ...(miss
            ? [
                { term: 'By its neighbours', fact: m(miss.foretoldM) },
                {
                  term: 'Out by',
                  fact: `${outByWords(miss, units)}, ${figure(miss.standardised, 1)} times its own σ`,
                },
              ]
            : []),
          ...(cast.stands === 'not_charted' ? [{ term: 'Not charted', fact: cast.why }] : []),
        ]}
      />
      <LinkButton label="Open it in its visit" href={`/bank/surveys/${cast.visitId}/casts/${cast.id}`} />
      {cast.leftOut ? <LeftOut {...{ list, cast }} /> : <Leaving {...{ list, cast }} />}
    </>
  );
}

type Part = Omit<Props, 'miss'>;

function LeftOut({ list, cast: { leftOut } }: Part) {
  const putBack = usePutBack(list.chartId);
  if (!leftOut) return null;
  return (
    <Section title="Left out of this chart">
      <Note kind="caution">{leftOutWords(leftOut, list.zone)}</Note>
      <ProblemNote problem={putBack.error} />
      {list.may.leaveOut ? (
        <Button label="Put it back" busy={putBack.isPending} onPress={() => putBack.mutate(leftOut.id)} />
      ) : null}
    </Section>
  );
}

function Leaving({ list, cast }: Part) {
  const router = useRouter();
  const [id] = useState(newId);
  const back = `/office/charts/${list.chartId}` as const;
  const form: DraftForm<CastTyped, CastRead> = useDraftForm({
    form: `leave-out:${list.chartId}:${cast.id}`,
    schema: CastDraft,
    start: { id, reason: '' },
    send: ({ id: leftOutId, reason }) =>
      leaveOut(list.chartId, { id: leftOutId, what: { kind: 'cast', castId: cast.id }, reason }),
    onDone: () => router.replace(back),
  });
  if (!list.may.leaveOut) return null;
  return (
    <Section
      title="Leave it out of this chart"
      note="For a slip, not for a surprise: a hole or a bar may be true. The cast stays in its visit as it was observed; the chart has to be built again."
    >
      <DraftFormFrame
        form={form}
        label="Leave the cast out"
        act="Leave the cast out"
        busyLabel="Leaving it out…"
        beside={<LinkButton label="Keep it in" href={back} />}
      >
        <FormField
          control={form.control}
          name="reason"
          label="Why it is left out"
          hint="Whoever approves the chart reads it, and it stands in the survey report."
          lines={2}
        />
      </DraftFormFrame>
    </Section>
  );
}
