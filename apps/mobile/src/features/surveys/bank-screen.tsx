import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { useMyLakes } from '@/features/fisheries/use-my-lakes';
import { BankLake } from '@/features/surveys/bank-lake';
import { OpenVisits } from '@/features/surveys/open-visits';

const ON_THE_BANK = ['owner', 'manager', 'head_bailiff', 'bailiff'] as const;

/** The lakes one works on: visits not closed yet first, then each lake's level and surveys. */
export function BankScreen() {
  const { fisheries, lakes } = useMyLakes(ON_THE_BANK);
  return (
    <Page title="Bank" under="Surveys and water levels">
      <Loaded
        query={fisheries}
        waiting="Reading the lakes…"
        empty={{
          when: () => lakes.length === 0,
          show: (
            <Empty title="No lake here yet" action={<LinkButton label="To the office" href="/office" bank />}>
              Survey visits and water levels appear here once a lake is drawn and has pegs.
            </Empty>
          ),
        }}
      >
        {() => (
          <>
            <List label="Tickets">
              <Row
                title="Pegs and tickets"
                note="Who is expected on which peg; is a ticket good"
                href="/bank/tickets"
              />
            </List>
            <OpenVisits lakeIds={lakes.map(({ id }) => id)} />
            {lakes.map(({ id, fisheryId, name }) => (
              <BankLake key={id} lakeId={id} fisheryId={fisheryId} name={name} />
            ))}
            <Section title="Kit">
              <List label="Kit">
                <Row title="Leads" note="How fast each falls, counted over known depths" href="/bank/leads" />
              </List>
            </Section>
          </>
        )}
      </Loaded>
    </Page>
  );
}
