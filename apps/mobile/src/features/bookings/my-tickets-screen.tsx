import { useState } from 'react';
import type { TicketView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { space } from '@/constants/layout';
import { useMyTickets } from '@/features/bookings/api';
import { CancelTicket } from '@/features/bookings/cancel-ticket';
import { ticketState, ticketTimes, type TicketState } from '@/features/bookings/ticket-words';
import { useSession } from '@/lib/session';

/** The reader's tickets, and where a ticket is got. */
export function MyTicketsScreen() {
  const { account } = useSession();
  return (
    <Page title="Tickets">
      <Note title="Tickets are not sold here yet">
        Ask the fishery’s office or the bailiff on the bank. A ticket written there for your e-mail address is
        shown here. What lies in front of each peg is under Water.
      </Note>
      {account ? (
        <MyTickets />
      ) : (
        <Empty
          title="Your own tickets"
          action={<LinkButton label="Sign in" href="/sign-in?next=%2Ftickets" kind="main" />}
        >
          Sign in to see the tickets written for you.
        </Empty>
      )}
    </Page>
  );
}

function MyTickets() {
  const tickets = useMyTickets(true);
  const [nowMs] = useState(() => Date.now());
  return (
    <Section
      title="My tickets"
      end={<LinkButton label="What I told of the water" href="/tickets/disagreements" kind="quiet" />}
    >
      <Loaded
        query={tickets}
        waiting="Reading your tickets…"
        empty={{
          when: (list) => list.tickets.length === 0,
          show: (
            <Empty title="No ticket" action={<LinkButton label="To the water" href="/water" />}>
              A ticket written for your address at the lodge appears here, and opens what a ticket opens on
              its peg’s page.
            </Empty>
          ),
        }}
      >
        {(list) => (
          <List label="My tickets">
            {list.tickets.map((ticket) => (
              <Row
                key={ticket.id}
                title={`Peg ${ticket.pegNumber}, ${ticket.lakeName}`}
                note={`${ticketTimes(ticket)} · ${ticket.fisheryName}`}
                end={<TicketEnd ticket={ticket} nowMs={nowMs} />}
              />
            ))}
          </List>
        )}
      </Loaded>
    </Section>
  );
}

const LOOKS = {
  running: { shape: 'triangle', tone: 'reed' },
  'to come': { shape: 'dot', tone: 'water' },
  over: { shape: 'bar', tone: 'inkSoft' },
} as const satisfies Record<TicketState, object>;

function TicketEnd({ ticket, nowMs }: { ticket: TicketView; nowMs: number }) {
  const state = ticketState(ticket, nowMs);
  return (
    <View style={{ alignItems: 'flex-end', gap: space.hair }}>
      <StatusShape {...LOOKS[state]} word={state} size="small" />
      {state === 'over' ? null : <LinkButton label="The peg" href={`/water/pegs/${ticket.pegId}`} />}
      <CancelTicket ticket={ticket} />
    </View>
  );
}
