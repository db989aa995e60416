import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { ChartLogView } from '@mereward/shared/charts/chart-log-view';
import type { ChartReview } from '@mereward/shared/charts/contract';
import type { LogMissView } from '@mereward/shared/charts/left-out-contract';
import { useWatch } from 'react-hook-form';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { useUnits } from '@/hooks/use-units';
import { figure, length } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { positionText } from '@/lib/position-text';
import { logPartOf, LogPartDraft, type LogPartRead, type LogPartTyped } from './leave-out-draft';
import { leaveOut } from './left-out-api';
import { useChartReview } from './review-api';
import { outByWords } from './sounding-miss-words';

/** A boat's log in one chart: one merged sounding of it, or a run of its soundings, left out with a reason. */
export function ChartLogScreen() {
  const { chartId, logId, sounding } = useLocalSearchParams<{
    chartId: string;
    logId: string;
    sounding?: string;
  }>();
  const review = useChartReview(chartId);
  const log = review.data?.logs.find(({ id }) => id === logId);
  const miss = review.data?.logMisses.find(({ id }) => id === sounding);
  return (
    <Page
      title={log ? log.filenames.join(', ') : 'Log'}
      {...(review.data ? { over: `${review.data.lakeName}, ${review.data.chart.title}` } : {})}
      back={{ label: review.data?.chart.title ?? 'The chart', href: `/office/charts/${chartId}` }}
    >
      <Loaded
        query={review}
        waiting="Reading the log…"
        empty={{
          when: ({ logs }) => !logs.some(({ id }) => id === logId),
          show: (
            <Empty
              title="Not a log of this chart"
              action={<LinkButton label="To the chart" href={`/office/charts/${chartId}`} />}
            >
              It was taken back in its visit, or belongs to another visit.
            </Empty>
          ),
        }}
      >
        {(value) =>
          log ? (
            <>
              {miss ? <Miss miss={miss} /> : null}
              <LinkButton
                label="Open the log in its visit"
                href={`/bank/surveys/${log.visitId}/logs/${log.id}`}
              />
              {value.may.leaveOut ? <Leaving key={miss?.id} {...{ review: value, log, miss }} /> : null}
            </>
          ) : null
        }
      </Loaded>
    </Page>
  );
}

function Miss({ miss }: { miss: LogMissView }) {
  const units = useUnits();
  const m = (valueM: number) => length(valueM, units, 2);
  return (
    <Facts
      facts={[
        { term: 'Visit', fact: miss.visitTitle },
        { term: 'Place', fact: positionText([...miss.position]) },
        { term: 'Read, at datum', fact: m(miss.depthM) },
        { term: 'By its neighbours', fact: m(miss.foretoldM) },
        {
          term: 'Out by',
          fact: `${outByWords(miss, units)}, ${figure(miss.standardised, 1)} times its own σ`,
        },
        {
          term: 'Merged from',
          fact: miss.merged ? mergedWords(miss.merged) : 'not kept: build the chart again',
        },
      ]}
    />
  );
}

const mergedWords = ({ count, fromSeq, toSeq }: NonNullable<LogMissView['merged']>): string =>
  count === 1
    ? `sounding ${figure(fromSeq)}`
    : `${figure(count)} soundings, ${figure(fromSeq)} to ${figure(toSeq)}`;

type Props = { review: ChartReview; log: ChartLogView; miss: LogMissView | undefined };

function Leaving({ review: { chart }, log, miss }: Props) {
  const router = useRouter();
  const units = useUnits();
  const [id] = useState(newId);
  const merged = miss?.merged ?? null;
  const back = `/office/charts/${chart.id}` as const;
  const form: DraftForm<LogPartTyped, LogPartRead> = useDraftForm({
    form: `leave-out:${chart.id}:${miss?.id ?? log.id}`,
    schema: LogPartDraft,
    start: {
      id,
      part: merged ? 'cell' : 'run',
      fromSeq: merged ? String(merged.fromSeq) : '',
      toSeq: merged ? String(merged.toSeq) : '',
      reason: '',
    },
    send: (read) =>
      leaveOut(chart.id, {
        id: read.id,
        what: logPartOf(read, { logId: log.id, cell: merged?.cell ?? null }),
        reason: read.reason,
      }),
    onDone: () => router.replace(back),
  });
  const part = useWatch({ control: form.control, name: 'part' });
  return (
    <Section
      title="Leave it out of this chart"
      note={`The log stays as it was read. Its soundings are counted as they were taken in, from 1 to ${figure(log.kept)}; the chart has to be built again.`}
    >
      <DraftFormFrame
        form={form}
        label="Leave a part of the log out"
        act="Leave it out"
        busyLabel="Leaving it out…"
        beside={<LinkButton label="Keep it in" href={back} />}
      >
        {merged ? (
          <FormChoice
            control={form.control}
            name="part"
            label="What is left out"
            choices={[
              { key: 'cell', label: 'This place', note: `a cell of ${length(merged.cell.sideM, units)}` },
              { key: 'run', label: 'A run of soundings', note: 'as the boat went' },
            ]}
            columns={2}
            bank={false}
          />
        ) : null}
        {part === 'run' ? (
          <>
            <FormField control={form.control} name="fromSeq" label="From sounding" keypad="numeric" />
            <FormField
              control={form.control}
              name="toSeq"
              label="To sounding"
              hint="This one too."
              keypad="numeric"
            />
          </>
        ) : null}
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
