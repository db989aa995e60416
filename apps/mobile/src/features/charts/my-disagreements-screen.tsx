import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { useSession } from '@/lib/session';
import { useMyDisagreements } from './disagreement-api';
import { MyDisagreements } from './my-disagreements';

/** What the reader told of the water, and what became of it. */
export function MyDisagreementsScreen() {
  const { account } = useSession();
  const mine = useMyDisagreements(account !== null);
  return (
    <Page title="Not as charted" over="What you told" back={{ label: 'Tickets', href: '/tickets' }}>
      {account ? (
        <Loaded
          query={mine}
          waiting="Reading what you told…"
          empty={{
            when: ({ disagreements }) => disagreements.length === 0,
            show: (
              <Empty title="Nothing told yet" action={<LinkButton label="To the water" href="/water" />}>
                When a depth or the bottom is not as the chart says, tell it on the peg’s page.
              </Empty>
            ),
          }}
        >
          {({ disagreements }) => (
            <MyDisagreements label="What you told" disagreements={disagreements} withPeg />
          )}
        </Loaded>
      ) : (
        <Empty
          title="What you told"
          action={<LinkButton label="Sign in" href="/sign-in?next=%2Ftickets%2Fdisagreements" kind="main" />}
        >
          Sign in to see what became of it.
        </Empty>
      )}
    </Page>
  );
}
