import { useLocalSearchParams } from 'expo-router';
import type { PegView } from '@mereward/shared/lakes/contract';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { usePegTickets } from '@/features/bookings/api';
import { CancelTicket } from '@/features/bookings/cancel-ticket';
import { TicketForm } from '@/features/bookings/ticket-form';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { useLake } from '@/features/lakes/api';
import { usePeg } from '@/features/lakes/office-api';
import { useSession } from '@/lib/session';

/** Writes tickets for one peg at the lodge, and shows those it has. */
export function PegTicketsScreen() {
  const { lakeId, pegId } = useLocalSearchParams<{ lakeId: string; pegId: string }>();
  const lake = useLake(lakeId);
  const peg = usePeg(pegId);
  const number = peg.data?.details.number;
  const { rolesAt } = useSession();
  const roles = lake.data ? rolesAt(lake.data.fisheryId) : [];
  const writes = roles.some((role) => role === 'owner' || role === 'manager' || role === 'office');
  return (
    <Page
      title={number === undefined ? 'Tickets' : `Tickets for peg ${number}`}
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{
        label: number === undefined ? 'The peg' : `Peg ${number}`,
        href: `/office/lakes/${lakeId}/pegs/${pegId}`,
      }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {({ zone, details }) => (
          <Loaded query={peg} waiting="Reading the peg…">
            {(value) => (writes ? <Write peg={value} zone={zone} nights={details.nights} /> : null)}
          </Loaded>
        )}
      </Loaded>
      <PegTickets pegId={pegId} />
    </Page>
  );
}

function Write({ peg, zone, nights }: { peg: PegView; zone: string; nights: boolean }) {
  const why = whyNotLet(peg.details);
  return (
    <Section title="Write a ticket" bare>
      {why ? (
        <Note kind="danger" title="No ticket can be written for this peg">
          {why}
        </Note>
      ) : (
        <TicketForm pegId={peg.id} zone={zone} nights={nights} />
      )}
    </Section>
  );
}

function PegTickets({ pegId }: { pegId: string }) {
  const tickets = usePegTickets(pegId);
  return (
    <Section title="Its tickets">
      <Loaded
        query={tickets}
        waiting="Reading the tickets…"
        empty={{
          when: (list) => list.tickets.length === 0,
          show: <Empty title="No ticket">Nobody holds this peg now or to come.</Empty>,
        }}
      >
        {(list) => (
          <Table
            caption="Tickets of this peg"
            rows={list.tickets}
            rowKey={({ id }) => id}
            columns={[
              { key: 'from', head: 'When', value: ({ from }) => from, show: ticketTimes },
              { key: 'holder', head: 'Holder', value: ({ holder }) => holder },
              {
                key: 'cancel',
                head: 'Change',
                value: ({ may }) => (may.cancel ? '' : null),
                show: (ticket) => <CancelTicket ticket={ticket} />,
              },
            ]}
          />
        )}
      </Loaded>
    </Section>
  );
}
