import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { OfficeMethod } from '@mereward/shared/payments/contract';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { takeMoney } from '@/features/bookings/office-api';
import { PAID_BY } from '@/features/payments/method-words';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { typedPence, typedPounds } from '@/lib/typed-money';

const Taken = z.object({ method: OfficeMethod, amount: typedPence('What was taken') });

/** What is still to be paid, never below nought. */
export const leftToPay = ({ grossPence, paidPence }: Pick<BookingView, 'grossPence' | 'paidPence'>): number =>
  Math.max(0, grossPence - paidPence);

/** Money taken at the lodge for one booking; its receipt is numbered at once. */
export function TakeMoney({ booking, onDone }: { booking: BookingView; onDone: () => void }) {
  const [id] = useState(newId);
  const form: DraftForm<z.input<typeof Taken>, z.output<typeof Taken>> = useDraftForm({
    form: `take-money:${booking.id}:${String(booking.version)}`,
    schema: Taken,
    start: { method: 'cash', amount: typedPounds(leftToPay(booking)) },
    send: ({ method, amount }) => takeMoney(booking.id, { id, method, amountPence: amount }),
    onDone,
  });
  return (
    <DraftFormFrame form={form} label="Take money" act="It is paid" busyLabel="Writing the receipt…">
      <FormChoice
        control={form.control}
        name="method"
        label="Paid by"
        choices={PAID_BY}
        columns={2}
        bank={false}
      />
      <FormField
        control={form.control}
        name="amount"
        label={`Amount, ${booking.currency}`}
        keypad="decimal"
      />
    </DraftFormFrame>
  );
}
