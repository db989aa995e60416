import { useState } from 'react';
import { addDays } from '@mereward/shared/time/zoned';
import type { BookingListItem } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { ChoiceGrid } from '@/components/choice-grid';
import { Empty } from '@/components/empty';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Sheet } from '@/components/sheet';
import { StatusShape } from '@/components/status-shape';
import { BookingSheet } from '@/features/bookings/booking-sheet';
import { CodeSearch } from '@/features/bookings/code-search';
import { useBookingsOfDay, useOfficeBooking } from '@/features/bookings/office-api';
import { pegsOf, STAFF_LOOKS } from '@/features/bookings/office-booking-words';
import { StaffDeeds } from '@/features/bookings/staff-deeds';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { dayName } from '@/lib/format-time';
import { civilTime } from '@/lib/zoned-time';

const CHECKERS = ['owner', 'manager', 'head_bailiff', 'bailiff'] as const;
const NO_TICKETS = new Set(['expired', 'cancelled_by_angler', 'cancelled_by_fishery']);

const NEAR = [
  { key: '-1', label: 'Yesterday' },
  { key: '0', label: 'Today' },
  { key: '1', label: 'Tomorrow' },
] as const;

/** Who should be on which peg, and whether a ticket read aloud is good. */
export function BankTicketsScreen() {
  const fisheries = useChosenFishery(CHECKERS);
  return (
    <Page title="Pegs and tickets" back={{ label: 'Bank', href: '/bank' }}>
      <ChosenFishery
        {...fisheries}
        bank
        none={<Empty title="Not yours to check">Bailiffs and managers check tickets.</Empty>}
      >
        {(fisheryId) => <Check fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Check({ fisheryId }: { fisheryId: string }) {
  const about = useFishery(fisheryId);
  return (
    <>
      <CodeSearch fisheryId={fisheryId} bank>
        {(booking) => <Opened key={booking.id} bookingId={booking.id} />}
      </CodeSearch>
      <Loaded query={about} waiting="Reading the fishery…">
        {({ details }) => <DayPegs fisheryId={fisheryId} zone={details.zone} />}
      </Loaded>
    </>
  );
}

function DayPegs({ fisheryId, zone }: { fisheryId: string; zone: string }) {
  const [today] = useState(() => civilTime(Date.now(), zone).slice(0, 10));
  const [near, setNear] = useState<(typeof NEAR)[number]['key']>('0');
  const [open, setOpen] = useState<BookingListItem | null>(null);
  const day = addDays(today, Number(near));
  const bookings = useBookingsOfDay(fisheryId, day);
  return (
    <Section title={dayName(day)}>
      <ChoiceGrid label="Which day" choices={NEAR} value={near} onChange={setNear} columns={3} />
      <Loaded
        query={bookings}
        waiting="Reading who is expected…"
        empty={{
          when: ({ bookings: list }) => ticketsOf(list).length === 0,
          show: <Empty title="Nobody is expected">{`No ticket runs on ${dayName(day)}.`}</Empty>,
        }}
      >
        {({ bookings: list }) => (
          <List label="Who is expected">
            {ticketsOf(list).map((booking) => (
              <Row
                key={booking.id}
                title={`${pegsOf(booking)}, ${booking.lakeName ?? ''}: ${booking.holder}`}
                note={`${ticketTimes(booking)} · ${booking.ticketName} · ${String(booking.rods)} ${booking.rods === 1 ? 'rod' : 'rods'}`}
                onPress={() => setOpen(booking)}
                end={
                  <View style={{ alignItems: 'flex-end' }}>
                    <StatusShape {...STAFF_LOOKS[booking.status]} size="small" />
                    {booking.notYet.length > 0 ? (
                      <StatusShape shape="diamond" tone="amber" word="not good yet" size="small" />
                    ) : null}
                  </View>
                }
              />
            ))}
          </List>
        )}
      </Loaded>
      <Sheet open={open !== null} onClose={() => setOpen(null)} title="Ticket">
        {open ? <Opened bookingId={open.id} /> : null}
      </Sheet>
    </Section>
  );
}

/** Tickets that are or were one, by peg as people count. */
const ticketsOf = (bookings: readonly BookingListItem[]): BookingListItem[] =>
  bookings
    .filter(({ status }) => !NO_TICKETS.has(status))
    .sort((a, b) =>
      `${a.lakeName ?? ''} ${pegsOf(a)}`.localeCompare(`${b.lakeName ?? ''} ${pegsOf(b)}`, 'en-GB', {
        numeric: true,
      }),
    );

function Opened({ bookingId }: { bookingId: string }) {
  const booking = useOfficeBooking(bookingId);
  return (
    <Loaded query={booking} waiting="Reading the ticket…">
      {(value) => (
        <>
          <BookingSheet booking={value} />
          <StaffDeeds booking={value} bank />
        </>
      )}
    </Loaded>
  );
}
