import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import type { RefundList } from '@mereward/shared/payments/refund-contract';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormField } from '@/components/form-field';
import { askRefund } from '@/features/bookings/office-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { money } from '@/lib/format';
import { newId } from '@/lib/new-id';
import { typedPence, typedPounds } from '@/lib/typed-money';

/** What may still go back: what was taken less what went back or is on its way. */
export function leftToGive({ paidPence, refunds }: Pick<BookingView, 'paidPence' | 'refunds'>): number {
  const given = refunds
    .filter(({ status }) => status !== 'declined' && status !== 'failed')
    .reduce((sum, { amountPence }) => sum + amountPence, 0);
  return Math.max(0, paidPence - given);
}

/** What an asking came to, in words. */
export function refundAsked({ refunds }: RefundList): string {
  const sum = refunds.reduce((total, { amountPence }) => total + amountPence, 0);
  const amount = money(sum, refunds[0]?.currency);
  return refunds.some(({ status }) => status === 'proposed')
    ? `${amount} is proposed: somebody else decides it under Money.`
    : `${amount} is on its way back.`;
}

const wanted = (mostPence: number, currency: string) =>
  z.object({
    amount: typedPence('What goes back').pipe(
      z
        .int()
        .min(1, 'More than nothing')
        .max(mostPence, `At most ${money(mostPence, currency)}: no more was taken`),
    ),
    reason: z.string().trim().min(1, 'Say why: it is kept with the refund').max(300, 'At most 300 letters'),
  });

type Props = { booking: BookingView; onDone: (words: string) => void };

/** Gives money back, or proposes it where it takes somebody else to decide. */
export function AskRefund({ booking, onDone }: Props) {
  const [id] = useState(newId);
  const most = leftToGive(booking);
  const [schema] = useState(() => wanted(most, booking.currency));
  const form: DraftForm<z.input<typeof schema>, z.output<typeof schema>> = useDraftForm({
    form: `refund:${booking.id}:${String(booking.version)}`,
    schema,
    start: { amount: typedPounds(most), reason: '' },
    send: ({ amount, reason }) => askRefund(booking.id, { id, amountPence: amount, reason }),
    onDone: (asked) => onDone(refundAsked(asked)),
  });
  return (
    <DraftFormFrame form={form} label="Give money back" act="Give it back" busyLabel="Giving…">
      <FormField
        control={form.control}
        name="amount"
        label={`Amount, ${booking.currency}`}
        hint={`At most ${money(most, booking.currency)}. A card gets it back on the card.`}
        keypad="decimal"
      />
      <FormField control={form.control} name="reason" label="Why" lines={2} />
    </DraftFormFrame>
  );
}
