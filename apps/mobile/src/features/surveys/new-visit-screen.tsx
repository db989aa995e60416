import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';
import { useStances, useVisits } from '@/features/surveys/api';
import { NewVisitForm } from '@/features/surveys/new-visit-form';
import { datumBoard } from '@/features/surveys/visit-draft';
import { useAgain } from '@/hooks/use-again';

/** Opens a survey visit of one lake. */
export function NewVisitScreen() {
  const { lakeId = '' } = useLocalSearchParams<{ lakeId?: string }>();
  const lake = useLake(lakeId);
  const visits = useVisits(lakeId);
  useStances(lakeId);
  const again = useAgain();
  const board = lake.data ? datumBoard(lake.data) : null;
  if (lake.data?.may.survey && board && visits.data && again)
    return <NewVisitForm lake={lake.data} board={board} last={visits.data.visits[0] ?? null} again={again} />;
  return (
    <Page title="Open a visit" back={{ label: 'Bank', href: '/bank' }}>
      {lakeId === '' ? <ChooseLake /> : null}
      {lakeId === '' ? null : (
        <Loaded query={lake} waiting="Reading the lake…">
          {(value) => (
            <>
              <WhyNot lake={value} />
              <Loaded query={visits} waiting="Reading the earlier visits…">
                {() => null}
              </Loaded>
            </>
          )}
        </Loaded>
      )}
    </Page>
  );
}

const ChooseLake = () => (
  <Empty title="Which lake?" action={<LinkButton label="To the lakes" href="/bank" kind="main" bank />}>
    Open a visit from the lake it is made on.
  </Empty>
);

function WhyNot({ lake }: { lake: LakeView }) {
  if (!lake.may.survey)
    return (
      <Empty title="Not yours to survey" action={<LinkButton label="To the bank" href="/bank" bank />}>
        Managers and bailiffs survey a lake. Ask the owner for that role.
      </Empty>
    );
  if (datumBoard(lake) !== null) return null;
  return (
    <Empty
      title="No datum board yet"
      action={<LinkButton label="To the lake" href={`/office/lakes/${lake.id}`} kind="main" bank />}
    >
      Depths need a water level. Give the lake a gauge board and make it the one chart datum is read on.
    </Empty>
  );
}
