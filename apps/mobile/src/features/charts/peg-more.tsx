import type { ReactNode } from 'react';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { Disclosure } from '@/components/disclosure';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { useLake } from '@/features/lakes/api';
import { ReadCastBack } from './read-cast-back';
import { SimilarPegs } from './similar-pegs';
import { SpotFromAnother } from './spot-from-another';
import { ToldHere } from './told-here';

type Props = { page: PegPageView; spot: SpotView | null };

/** What else the chart can tell at this peg; each is read when it is opened. */
export function PegMore({ page, spot }: Props) {
  return (
    <>
      <ToldHere pegId={page.id} bare />
      <Section title="Ask the chart" bare>
        {page.chart ? (
          <Disclosure title="What lies where a cast lands">
            <OnTheLake lakeId={page.lake.id}>
              {(lake) => <ReadCastBack lake={lake} pegId={page.id} />}
            </OnTheLake>
          </Disclosure>
        ) : null}
        {spot ? (
          <Disclosure title={`“${spot.name}” from another peg`}>
            <OnTheLake lakeId={page.lake.id}>
              {(lake) => <SpotFromAnother key={spot.id} lake={lake} pegId={page.id} spot={spot} />}
            </OnTheLake>
          </Disclosure>
        ) : null}
        <Disclosure title="Pegs like this one">
          <SimilarPegs pegId={page.id} />
        </Disclosure>
      </Section>
    </>
  );
}

type Lake = NonNullable<ReturnType<typeof useLake>['data']>;

function OnTheLake({ lakeId, children }: { lakeId: string; children: (lake: Lake) => ReactNode }) {
  const lake = useLake(lakeId);
  return (
    <Loaded query={lake} waiting="Reading the marks…">
      {children}
    </Loaded>
  );
}
