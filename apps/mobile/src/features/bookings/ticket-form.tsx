import { useState } from 'react';
import type { TicketView } from '@mereward/shared/bookings/contract';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { Kept } from '@/components/kept';
import { writeTicket } from '@/features/bookings/api';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { civilTime, instantOf } from '@/lib/zoned-time';

const instant = (zone: string) =>
  z.string().transform((civil, context): string => {
    const at = instantOf(civil, zone);
    if (at) return at;
    context.issues.push({ code: 'custom', message: 'Choose the day and the time', input: civil });
    return z.NEVER;
  });

const wanted = (zone: string) =>
  z
    .object({
      email: z.string().trim().toLowerCase().pipe(z.email('Type the visitor’s e-mail address')),
      from: instant(zone),
      until: instant(zone),
    })
    .refine(({ from, until }) => from < until, { path: ['until'], message: 'It ends before it starts' });

const FIRST_HOUR = '07:00';
const LAST_HOUR = '20:00';

type Props = { pegId: string; zone: string; nights: boolean };

/** A ticket for somebody who has signed up, for this peg and this time. */
export function TicketForm(props: Props) {
  const [written, setWritten] = useState<TicketView | null>(null);
  const words = written ? `Written for ${written.holder ?? 'the visitor'}: ${ticketTimes(written)}.` : null;
  return (
    <>
      <TicketFields key={written?.id ?? 'first'} {...props} onWritten={setWritten} />
      <Kept words={words} />
    </>
  );
}

function TicketFields({
  pegId,
  zone,
  nights,
  onWritten,
}: Props & { onWritten: (ticket: TicketView) => void }) {
  const [id] = useState(newId);
  const [schema] = useState(() => wanted(zone));
  const [today] = useState(() => civilTime(Date.now(), zone).slice(0, 10));
  const form = useDraftForm({
    form: `ticket:${pegId}`,
    schema,
    start: { email: '', from: `${today}T${FIRST_HOUR}`, until: `${today}T${LAST_HOUR}` },
    send: (times) => writeTicket(pegId, { id, ...times }),
    onDone: onWritten,
  });
  return (
    <DraftFormFrame form={form} label="Write a ticket" act="Write the ticket" busyLabel="Writing…">
      <FormField
        control={form.control}
        name="email"
        label="Visitor’s e-mail"
        hint="Of somebody who has signed up here."
        keypad="email"
      />
      <FormField
        control={form.control}
        name="from"
        label="From"
        hint={`By the fishery’s clock (${zone}).`}
        picker="datetime-local"
      />
      <FormField
        control={form.control}
        name="until"
        label="Until"
        hint={nights ? 'At most 31 days.' : 'On the same day: there is no night fishing here.'}
        picker="datetime-local"
      />
    </DraftFormFrame>
  );
}
