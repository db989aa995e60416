import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import type { FreePegs } from '@mereward/shared/bookings/availability-contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { useMutation } from '@tanstack/react-query';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Field } from '@/components/field';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { moveBooking, useBooking, useClaimPeg } from '@/features/bookings/booking-api';
import { placeName } from '@/features/bookings/booking-words';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { choiceOf, freeQuery } from '@/features/bookings/find-choice';
import { useFreePegs } from '@/features/bookings/free-api';
import { PegRows } from '@/features/bookings/free-peg-list';
import { useTicketTypes } from '@/features/tickets/office-api';
import { startsOf } from '@/features/tickets/kind-words';

/** Another day or other pegs for the same tickets; with `?claim=yes` the peg of a ticket that chooses on arrival. */
export function MoveScreen() {
  const { bookingId, claim } = useLocalSearchParams<{ bookingId: string; claim?: string }>();
  const booking = useBooking(bookingId);
  const claiming = claim === 'yes';
  return (
    <Page
      title={claiming ? 'Choose your peg' : 'Move the ticket'}
      back={{ label: 'The ticket', href: `/tickets/bookings/${bookingId}` }}
      {...(booking.data ? { over: placeName(booking.data), under: ticketTimes(booking.data) } : {})}
    >
      <Loaded query={booking} waiting="Reading the ticket…">
        {(view) =>
          claiming ? (
            view.may.claimPeg ? (
              <Claim booking={view} />
            ) : (
              <Empty title="No peg is to be chosen now">The ticket says when a peg is chosen.</Empty>
            )
          ) : view.may.move ? (
            <Moving key={view.version} booking={view} />
          ) : (
            <Empty title="This ticket can’t be moved">
              The ticket’s page says until when it could be. The fishery may still move it for you.
            </Empty>
          )
        }
      </Loaded>
    </Page>
  );
}

function Moving({ booking }: { booking: BookingView }) {
  const kinds = useTicketTypes(booking.fisheryId);
  return (
    <Loaded query={kinds} waiting="Reading the ticket…">
      {({ ticketTypes }) => (
        <MoveTo
          booking={booking}
          kind={ticketTypes.find(({ id }) => id === booking.details.tickets[0]?.ticketTypeId)}
        />
      )}
    </Loaded>
  );
}

function MoveTo({ booking, kind }: { booking: BookingView; kind: TicketTypeView | undefined }) {
  const { details } = booking;
  const [day, setDay] = useState(details.day);
  const [start, setStart] = useState(details.start);
  const starts = kind ? startsOf(kind.details) : [];
  const rods = Math.max(1, ...details.tickets.map((ticket) => ticket.rods));
  const free = useFreePegs(
    booking.fisheryId,
    freeQuery({ ...choiceOf({}), day, start, kindId: kind?.id ?? null, rods }),
  );
  if (!kind)
    return (
      <Note kind="caution" title="This kind of ticket is sold no more">
        Ask the fishery to move it for you.
      </Note>
    );
  return (
    <>
      <Text>The price stays. Choose the day, then the peg.</Text>
      <Field
        label="Day"
        picker="date"
        value={day}
        onChange={(to) => {
          if (/^\d{4}-\d\d-\d\d$/.test(to)) setDay(to);
        }}
      />
      {starts.length > 1 ? (
        <Select
          label="Start"
          choices={starts.map((clock) => ({ key: clock, label: clock }))}
          value={start}
          onChange={setStart}
        />
      ) : null}
      <Loaded query={free} waiting="Looking which pegs are free…">
        {(pegs) => <Places booking={booking} free={pegs} day={day} start={start} />}
      </Loaded>
    </>
  );
}

type PlacesProps = { booking: BookingView; free: FreePegs; day: string; start: string | null };

function Places({ booking, free, day, start }: PlacesProps) {
  const router = useRouter();
  const { tickets } = booking.details;
  const named = tickets.filter(({ pegId }) => pegId !== null).length;
  const [picked, setPicked] = useState<string[]>([]);
  const move = useMutation({
    mutationFn: (lakeId: string) =>
      moveBooking(booking.id, {
        version: booking.version,
        day,
        start,
        lakeId,
        pegIds: tickets.map(({ pegId }, i) => (pegId === null ? null : (picked[i] ?? null))),
        reason: '',
      }),
    onSuccess: () => router.replace(`/tickets/bookings/${booking.id}`),
  });
  if (free.whyNot !== null) return <Note kind="caution">{free.whyNot}</Note>;
  const pick = (pegId: string): void =>
    setPicked(
      picked.includes(pegId) ? picked.filter((id) => id !== pegId) : [...picked, pegId].slice(-named),
    );
  const lakeId =
    free.pegs.find(({ pegId }) => pegId === picked[0])?.lakeId ?? (named === 0 ? booking.lakeId : null);
  const numbers = picked.map((id) => free.pegs.find(({ pegId }) => pegId === id)?.number ?? '');
  const own = new Set(booking.pegs.map(({ pegId }) => pegId));
  return (
    <>
      <Text tone="inkSoft">{free.words}</Text>
      {named === 0
        ? null
        : free.lakes.map(({ id, name }) => {
            const pegs = free.pegs.filter(
              (peg) => peg.lakeId === id && (peg.state === 'free' || own.has(peg.pegId)),
            );
            return pegs.length === 0 ? null : (
              <Section key={id} title={name}>
                <PegRows
                  label={`Free pegs of ${name}`}
                  pegs={pegs}
                  open={null}
                  wanted={picked}
                  currency={free.currency}
                  onOpen={pick}
                />
              </Section>
            );
          })}
      <ProblemNote problem={move.error} />
      {lakeId !== null && picked.length === named ? (
        <Button
          label={named === 0 ? 'Move to this day' : `Move to peg ${numbers.join(' and ')}`}
          kind="main"
          bank
          busy={move.isPending}
          busyLabel="Moving…"
          onPress={() => move.mutate(lakeId)}
        />
      ) : (
        <Text tone="inkSoft">
          {named === 1 ? 'Choose a free peg.' : `Choose ${String(named)} free pegs of one lake.`}
        </Text>
      )}
    </>
  );
}

/** On arrival: the first to claim a peg has it. */
function Claim({ booking }: { booking: BookingView }) {
  const router = useRouter();
  const { details, fisheryId, lakeId } = booking;
  const claim = useClaimPeg(booking.id);
  const free = useFreePegs(
    fisheryId,
    freeQuery({ ...choiceOf({ ...(lakeId === null ? {} : { lake: lakeId }) }), day: details.day }),
  );
  return (
    <>
      <Text>Stand at the peg you want, then claim it. The first to claim a peg has it.</Text>
      <ProblemNote problem={claim.error} />
      <Loaded query={free} waiting="Looking which pegs are free…">
        {({ pegs, currency }) => (
          <PegRows
            label="Free pegs"
            pegs={pegs.filter(({ state }) => state === 'free')}
            open={null}
            wanted={[]}
            currency={currency}
            onOpen={(pegId) =>
              claim.mutate(pegId, { onSuccess: () => router.replace(`/tickets/bookings/${booking.id}`) })
            }
          />
        )}
      </Loaded>
    </>
  );
}
