import type { BookingView } from '@mereward/shared/bookings/contract';
import { bookingCodeWords, readBookingCode } from '@mereward/shared/bookings/booking-code';
import { Redirect, useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { useBookingByCode, useBookingDeed } from '@/features/bookings/booking-api';
import { BOOKING_LOOKS, placeName } from '@/features/bookings/booking-words';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { RulesToRead } from '@/features/rules/rules-to-read';
import { useSession } from '@/lib/session';

/** What a ticket's square opens: its holder's ticket, and for staff the check on the bank. */
export function ByCodeScreen() {
  const { code: typed } = useLocalSearchParams<{ code: string }>();
  const { state, account } = useSession();
  const code = readBookingCode(typed);
  if (code === null)
    return (
      <Page title="No such code">
        <Empty
          title="A letter of it is misread"
          action={<LinkButton label="Tickets" href="/tickets" kind="main" />}
        >
          A ticket’s code has six letters and figures. Look at it again, or have it read out.
        </Empty>
      </Page>
    );
  if (account === null)
    return (
      <Page title={`Ticket ${bookingCodeWords(code)}`}>
        {state === 'unknown' ? (
          <Waiting words="Seeing who is here…" />
        ) : (
          <Empty
            title="Sign in to see it"
            action={
              <LinkButton
                label="Sign in"
                href={`/sign-in?next=${encodeURIComponent(`/t/${code}`)}`}
                kind="main"
              />
            }
          >
            A ticket is shown to its holder and to the fishery’s staff.
          </Empty>
        )}
      </Page>
    );
  return <Found code={code} />;
}

function Found({ code }: { code: string }) {
  const { rolesAt } = useSession();
  const query = useBookingByCode(code, true);
  const booking = query.data;
  const staff =
    booking !== undefined &&
    rolesAt(booking.fisheryId).some((role) => role !== 'angler' && role !== 'member');
  if (booking && !staff) return <Redirect href={`/tickets/bookings/${booking.id}`} />;
  return (
    <Page
      title={`Ticket ${bookingCodeWords(code)}`}
      {...(booking
        ? { over: booking.fisheryName, end: <StatusShape {...BOOKING_LOOKS[booking.status]} /> }
        : {})}
    >
      <Loaded query={query} waiting="Looking for the ticket…">
        {(view) => <Check booking={view} onSeen={() => void query.refetch()} />}
      </Loaded>
    </Page>
  );
}

function Check({ booking, onSeen }: { booking: BookingView; onSeen: () => void }) {
  const arrive = useBookingDeed(booking.id, 'check-in');
  const { details, notYet } = booking;
  const good = (booking.status === 'confirmed' || booking.status === 'checked_in') && !booking.rulesToRead;
  return (
    <View style={{ gap: space.page }}>
      <Note
        kind={good ? 'fine' : 'caution'}
        title={good ? 'A good ticket for its hours' : 'Not a good ticket as it stands'}
      >
        {notYet.map((words) => (
          <Text key={words}>{words}</Text>
        ))}
      </Note>
      <Facts
        facts={[
          { term: 'Where', fact: placeName(booking) },
          { term: 'When', fact: ticketTimes(booking) },
          { term: 'Holder', fact: booking.holder },
          {
            term: 'On it',
            fact: details.tickets
              .map(({ name }) => name)
              .filter(Boolean)
              .join('; '),
          },
          { term: 'Ticket', fact: details.ticketName },
          { term: 'Anglers and rods', fact: `${String(booking.people)}, ${String(booking.rods)}` },
          {
            term: 'Guardian',
            fact: details.guardian ? `${details.guardian.name}, ${details.guardian.phone}` : null,
          },
          { term: 'Vehicle', fact: details.vehicle },
          { term: 'Rod licence', fact: licenceFact(booking) },
          { term: 'Word to you', fact: details.note },
        ]}
      />
      <ProblemNote problem={arrive.error} />
      {booking.may.checkIn ? (
        <Button
          label="They are here"
          kind="main"
          bank
          busy={arrive.isPending}
          onPress={() => arrive.mutate(undefined, { onSuccess: onSeen })}
        />
      ) : null}
      {booking.rulesToRead ? (
        <Section title="Rules">
          <RulesToRead bookingId={booking.id} zone={booking.zone} witness />
        </Section>
      ) : null}
    </View>
  );
}

const licenceFact = ({ details: { licence } }: BookingView): string | null =>
  licence === null
    ? null
    : licence.held
      ? ['declared', licence.lastSix && `ends in ${licence.lastSix}`].filter(Boolean).join(', ')
      : 'not declared';
