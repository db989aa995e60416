import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import type { BookingView } from '@mereward/shared/bookings/contract';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import { View } from 'react-native';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { SvgPicture } from '@/components/svg-picture';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { BookingTold } from '@/features/bookings/booking-told';
import { CalendarButton } from '@/features/bookings/calendar-button';
import { CancelBooking } from '@/features/bookings/cancel-booking';
import { ReceiptsPart } from '@/features/bookings/receipts-part';
import { TicketCautions } from '@/features/bookings/ticket-cautions';
import { TicketDeeds } from '@/features/bookings/ticket-deeds';
import { spokenCode } from '@/features/bookings/ticket-code';
import { useFishery } from '@/features/fisheries/office-api';
import { RulesToRead } from '@/features/rules/rules-to-read';
import { qrDrawing } from '@/lib/qr-drawing';

const QR_PX = 220;

/** The ticket itself: what is shown on the bank, then what may be done with it. */
export function TicketPart({ booking }: { booking: BookingView }) {
  const fishery = useFishery(booking.fisheryId);
  const over = booking.status === 'completed';
  return (
    <>
      <NotYet booking={booking} />
      <View style={{ gap: space.medium }}>
        <Text size="lead" weight="semibold">
          {ticketTimes(booking)}
        </Text>
        {over ? null : <Shown booking={booking} />}
        <Facts facts={ticketFacts(booking, fishery.data)} />
      </View>
      {booking.rulesToRead ? null : <TicketDeeds booking={booking} />}
      <Section title="Rules">
        <RulesToRead bookingId={booking.id} zone={booking.zone} />
      </Section>
      {over ? null : <TicketCautions booking={booking} jurisdiction={fishery.data?.details.jurisdiction} />}
      <Section title="Keep it">
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
          <CalendarButton booking={booking} />
          {booking.pegs.map(({ pegId, number }) => (
            <LinkButton key={pegId} label={`In front of peg ${number}`} href={`/water/pegs/${pegId}`} />
          ))}
          <LinkButton label="Emergency card" href="/emergency" />
        </View>
        <ReceiptsPart booking={booking} />
      </Section>
      <Section title="What it cost">
        <BookingTold booking={booking} />
        <CancelBooking booking={booking} />
      </Section>
    </>
  );
}

function NotYet({ booking: { notYet, status, rulesToRead } }: { booking: BookingView }) {
  if (status === 'choosing')
    return (
      <Note kind="caution" title="A closure lies over this ticket">
        The letter you got has the link to choose what becomes of it: another date, another lake, or the money
        back.
      </Note>
    );
  if (notYet.length === 0) return null;
  return (
    <Note kind="caution" title={rulesToRead ? 'Not good yet' : 'Before you fish'}>
      {notYet.map((words) => (
        <Text key={words}>{words}</Text>
      ))}
    </Note>
  );
}

/** The code in letters to be read aloud, and the square a bailiff's phone reads. */
function Shown({ booking }: { booking: BookingView }) {
  const svg = qrDrawing(booking.qr, QR_PX);
  return (
    <View style={{ alignItems: 'center', gap: space.small, paddingVertical: space.medium }}>
      {svg === null ? null : <SvgPicture svg={svg} label="The ticket as a code for the bailiff’s phone" />}
      <Text size="figure" weight="semibold" aria-label={`Code, ${spokenCode(booking.code)}`} selectable>
        {bookingCodeWords(booking.code)}
      </Text>
      <Text size="small" tone="inkSoft">
        Show the square to the bailiff, or read the letters aloud.
      </Text>
    </View>
  );
}

function ticketFacts(booking: BookingView, fishery: FisheryView | undefined) {
  const { details, pegs } = booking;
  const names = details.tickets.map(({ name, pegId }) => {
    const peg = pegs.find((each) => each.pegId === pegId);
    return pegs.length > 1 && peg ? `${name || booking.holder}, peg ${peg.number}` : name || booking.holder;
  });
  return [
    { term: 'Ticket', fact: details.ticketName },
    { term: names.length > 1 ? 'Anglers' : 'Angler', fact: names.join('; ') },
    { term: 'Rods', fact: booking.rods },
    {
      term: 'Guardian',
      fact: details.guardian ? `${details.guardian.name}, ${details.guardian.phone}` : null,
    },
    { term: 'Vehicle', fact: details.vehicle },
    { term: 'Gate code', fact: booking.gateCode },
    { term: 'Fishery’s duty phone', fact: fishery?.details.dutyPhone ?? null },
  ];
}
