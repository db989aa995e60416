import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { VisitView } from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import { Choices } from '@/features/charts/visit-choices';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { draftChart } from '@/features/charts/review-api';
import { useLake } from '@/features/lakes/api';
import { useVisits } from '@/features/surveys/api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

const STEPS = [
  { key: '0.25', label: '0.25 m' },
  { key: '0.5', label: '0.5 m' },
  { key: '1', label: '1 m' },
  { key: '0.3048', label: '1 ft' },
  { key: '0.6096', label: '2 ft' },
  { key: '1.524', label: '5 ft' },
] as const;

const Wanted = z.object({
  title: z.string().trim().min(1, 'Give the chart a title, such as “Spring survey”.').max(120),
  contourStep: z.enum(['0.25', '0.5', '1', '0.3048', '0.6096', '1.524']),
  visitIds: z.array(z.uuid()).min(1, 'Choose at least one visit.'),
});

/** Chooses the visits a chart is made from and queues its building. */
export function DraftChartScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const visits = useVisits(lakeId);
  return (
    <Page
      title="Draft a chart"
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: 'Charts', href: '/office/charts' }}
    >
      <Loaded
        query={visits}
        waiting="Reading the visits…"
        empty={{
          when: (list) => list.visits.length === 0,
          show: (
            <Empty title="No survey yet" action={<LinkButton label="To the bank" href="/bank" kind="main" />}>
              Open a visit on the bank and cast; the chart is made from what was found.
            </Empty>
          ),
        }}
      >
        {(list) => <DraftForm lakeId={lakeId} visits={list.visits} />}
      </Loaded>
    </Page>
  );
}

function DraftForm({ lakeId, visits }: { lakeId: string; visits: readonly VisitView[] }) {
  const router = useRouter();
  const [id] = useState(newId);
  const form = useDraftForm({
    form: `chart:${lakeId}`,
    schema: Wanted,
    start: { title: '', contourStep: '0.5', visitIds: visits.map((visit) => visit.id) },
    send: ({ title, contourStep, visitIds }) =>
      draftChart(lakeId, { id, title, visitIds, contourStepM: Number(contourStep) }),
    onDone: ({ chart }) => router.replace(`/office/charts/${chart.id}`),
  });
  return (
    <DraftFormFrame form={form} label="Draft a chart" act="Build the draft" busyLabel="Queueing…">
      <FormField
        control={form.control}
        name="title"
        label="Title"
        hint="Its number, such as 2027.1, is given when it is published."
      />
      <FormSelect control={form.control} name="contourStep" label="Isobaths every" choices={STEPS} />
      <Choices control={form.control} visits={visits} />
    </DraftFormFrame>
  );
}
