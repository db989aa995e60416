import { useLocalSearchParams } from 'expo-router';
import type { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';
import { useVisit } from '@/features/surveys/api';
import { CastForm } from '@/features/surveys/cast-form';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';

/** The next cast of a visit, entered with one hand. */
export function CastScreen() {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const units = useUnits();
  const back = { label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` } as const;
  const seq = (visit.data?.casts.at(-1)?.seq ?? 0) + 1;
  const gauge = visit.data ? `gauge ${length(visit.data.visit.gaugeStartM, units, 2)}` : '';
  return (
    <Page title={`Cast ${seq}`} over={gauge} back={back}>
      <Loaded query={visit} waiting="Reading the visit…">
        {(value) => <Ready value={value} />}
      </Loaded>
    </Page>
  );
}

function Ready({ value }: { value: VisitWithCasts }) {
  const { visit } = value;
  const lake = useLake(visit.lakeId);
  if (!visit.may.addCasts)
    return (
      <Empty
        title={visit.status === 'closed' ? 'This visit is closed' : 'Not yours to add to'}
        action={<LinkButton label="To the visit" href={`/bank/surveys/${visit.id}`} kind="main" />}
      >
        {visit.status === 'closed'
          ? 'Open another visit to go on casting.'
          : 'Ask the fishery for a role that surveys.'}
      </Empty>
    );
  return (
    <Loaded
      query={lake}
      waiting="Reading the lake…"
      empty={{
        when: ({ pegs }) => pegs.length === 0,
        show: <Empty title="No pegs yet">Give the lake its pegs first: a cast is made from one.</Empty>,
      }}
    >
      {(it) => <CastForm lake={it} visit={visit} casts={value.casts} />}
    </Loaded>
  );
}
