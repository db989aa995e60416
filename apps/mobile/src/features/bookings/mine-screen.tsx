import type { BookingListItem } from '@mereward/shared/bookings/contract';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { useMyBookings } from '@/features/bookings/booking-api';
import { BOOKING_LOOKS, partOf, placeName, type Part } from '@/features/bookings/booking-words';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { MyWaiting } from '@/features/bookings/my-waiting';
import { useClock } from '@/features/bookings/use-clock';
import { useSession } from '@/lib/session';

/** The reader's tickets: what is open, what is to come, where they wait, what was. */
export function MineScreen() {
  const { account } = useSession();
  return (
    <Page title="My tickets" back={{ label: 'Tickets', href: '/tickets' }}>
      {account ? (
        <Mine />
      ) : (
        <Empty
          title="Your own tickets"
          action={<LinkButton label="Sign in" href="/sign-in?next=%2Ftickets%2Fmine" kind="main" />}
        >
          Sign in to see the tickets you hold.
        </Empty>
      )}
    </Page>
  );
}

const TITLES = { open: 'To be finished', 'to come': 'To come', past: 'Past' } as const satisfies Record<
  Part,
  string
>;

function Mine() {
  const bookings = useMyBookings(true);
  const nowMs = useClock(30_000);
  return (
    <>
      <Loaded
        query={bookings}
        waiting="Reading your tickets…"
        empty={{
          when: (list) => list.bookings.length === 0,
          show: (
            <Empty
              title="No ticket yet"
              action={<LinkButton label="Find a free peg" href="/tickets" kind="main" />}
            >
              A ticket you book, or one written for your e-mail address at the lodge, appears here.
            </Empty>
          ),
        }}
      >
        {(list) => (
          <>
            {(['open', 'to come'] as const).map((part) => (
              <PartOf key={part} part={part} bookings={inPart(list.bookings, part, nowMs)} />
            ))}
          </>
        )}
      </Loaded>
      <MyWaiting />
      <PartOf part="past" bookings={inPart(bookings.data?.bookings ?? [], 'past', nowMs)} />
      <LinkButton label="What I told of the water" href="/tickets/disagreements" kind="quiet" />
    </>
  );
}

/** Those to come begin with the next, those past with the last. */
const inPart = (bookings: readonly BookingListItem[], part: Part, nowMs: number): BookingListItem[] =>
  bookings
    .filter((each) => partOf(each, nowMs) === part)
    .sort((a, b) => (part === 'past' ? b.from.localeCompare(a.from) : a.from.localeCompare(b.from)));

function PartOf({ part, bookings }: { part: Part; bookings: readonly BookingListItem[] }) {
  if (bookings.length === 0) return null;
  return (
    <Section title={TITLES[part]} bare={part !== 'past'}>
      <List label={TITLES[part]}>
        {bookings.map((booking) => (
          <Row
            key={booking.id}
            title={placeName(booking)}
            note={[ticketTimes(booking), booking.ticketName, ...(part === 'past' ? [] : booking.notYet)].join(
              ' · ',
            )}
            end={<StatusShape {...BOOKING_LOOKS[booking.status]} size="small" />}
            href={`/tickets/bookings/${booking.id}`}
          />
        ))}
      </List>
    </Section>
  );
}
