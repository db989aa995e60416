import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { View } from 'react-native';
import { space } from '@/constants/layout';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import { useTicketTypes } from '@/features/tickets/office-api';
import { AUDIENCES, TEMPLATES } from '@/features/tickets/ticket-choices';
import { useToday } from '@/features/tickets/ticket-type-editor';
import { hoursOfKind, priceWords } from '@/features/tickets/ticket-type-words';

/** What the fishery sells, and what to start a new kind of ticket from. */
export function TicketTypesScreen() {
  const fisheries = useChosenFishery(OFFICE_ROLES);
  return (
    <Page title="Tickets and prices" width="wide" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fisheries}
        none={
          <Empty title="Not yours to set" action={<LinkButton label="To the office" href="/office" />}>
            The owner, a manager or the office sets what is sold.
          </Empty>
        }
      >
        {(fisheryId) => (
          <>
            <TicketTypes fisheryId={fisheryId} />
            <Templates fisheryId={fisheryId} />
          </>
        )}
      </ChosenFishery>
    </Page>
  );
}

function TicketTypes({ fisheryId }: { fisheryId: string }) {
  const types = useTicketTypes(fisheryId);
  const zone = useFishery(fisheryId).data?.details.zone ?? 'Europe/London';
  const today = useToday(zone);
  return (
    <Section
      title="On sale"
      end={<LinkButton label="Terms of letting" href={`/office/tickets/terms?fisheryId=${fisheryId}`} />}
      bare
    >
      <Loaded
        query={types}
        waiting="Reading the tickets…"
        empty={{
          when: ({ ticketTypes }) => ticketTypes.length === 0,
          show: (
            <Empty title="Nothing is sold yet">
              Start from one of the templates below; look over its price and hours, then put it on sale.
            </Empty>
          ),
        }}
      >
        {({ ticketTypes }) => (
          <Table
            caption="Kinds of ticket on sale"
            csvName="tickets"
            rows={ticketTypes}
            rowKey={({ id }) => id}
            href={({ id }) => `/office/tickets/${id}?fisheryId=${fisheryId}`}
            columns={[
              { key: 'name', head: 'Ticket', value: ({ details }) => details.name },
              { key: 'hours', head: 'Hours', value: ({ details }) => hoursOfKind(details.duration) },
              {
                key: 'price',
                head: 'Price',
                value: ({ details }) => priceWords(details, today),
                figures: true,
              },
              {
                key: 'audience',
                head: 'For',
                value: ({ details }) => AUDIENCES.find(({ key }) => key === details.audience)?.label ?? '',
              },
              {
                key: 'rods',
                head: 'Rods',
                value: ({ details }) =>
                  details.rodsMost > details.rodsIncluded
                    ? `${String(details.rodsIncluded)}, at most ${String(details.rodsMost)}`
                    : String(details.rodsIncluded),
              },
            ]}
          />
        )}
      </Loaded>
    </Section>
  );
}

function Templates({ fisheryId }: { fisheryId: string }) {
  return (
    <Section
      title="A new kind of ticket"
      note="Each starts filled in with common practice. Prices are invented: set your own before it is sold."
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {TEMPLATES.map(({ key, label }) => (
          <LinkButton
            key={key}
            label={label}
            href={`/office/tickets/new?template=${key}&fisheryId=${fisheryId}`}
          />
        ))}
      </View>
    </Section>
  );
}
