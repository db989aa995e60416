import type { ComponentProps } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useLake } from '@/features/lakes/api';
import { useStances, useVisit } from '@/features/surveys/api';
import { CastForm } from '@/features/surveys/cast-form';
import { useAgain } from '@/hooks/use-again';

/** The next cast of a visit, entered with one hand. */
export function CastScreen({ suggest }: Pick<ComponentProps<typeof CastForm>, 'suggest'>) {
  const { visitId } = useLocalSearchParams<{ visitId: string }>();
  const visit = useVisit(visitId);
  const lake = useLake(visit.data?.visit.lakeId ?? '');
  useStances(visit.data?.visit.lakeId ?? '');
  const again = useAgain();
  if (visit.data?.visit.may.addCasts && lake.data && lake.data.pegs.length > 0 && again)
    return <CastForm lake={lake.data} value={visit.data} again={again} suggest={suggest} />;
  const back = { label: visit.data?.visit.title ?? 'Visit', href: `/bank/surveys/${visitId}` } as const;
  return (
    <Page title="Next cast" back={back}>
      <Loaded query={visit} waiting="Reading the visit…">
        {(value) =>
          value.visit.may.addCasts ? (
            <Loaded query={lake} waiting="Reading the lake…">
              {(it: LakeView) => (
                <Empty
                  title="No pegs yet"
                  action={<LinkButton label="To the lake" href={`/office/lakes/${it.id}`} />}
                >
                  Give the lake its pegs first: a cast is made from one.
                </Empty>
              )}
            </Loaded>
          ) : (
            <Empty
              title={value.visit.status === 'closed' ? 'This visit is closed' : 'Not yours to add to'}
              action={<LinkButton label="To the visit" href={`/bank/surveys/${visitId}`} kind="main" bank />}
            >
              {value.visit.status === 'closed'
                ? 'Open another visit to go on casting.'
                : 'Ask the fishery for a role that surveys.'}
            </Empty>
          )
        }
      </Loaded>
    </Page>
  );
}
