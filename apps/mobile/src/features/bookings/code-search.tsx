import { useState, type ReactNode } from 'react';
import { readBookingCode } from '@mereward/shared/bookings/booking-code';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Form } from '@/components/form';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { findByCode } from '@/features/bookings/office-api';

type Props = {
  fisheryId: string;
  bank?: boolean | undefined;
  onFound?: ((booking: BookingView) => void) | undefined;
  /** What is shown of the booking that was found. */
  children?: ((booking: BookingView) => ReactNode) | undefined;
};

/** Finds a booking by the code its holder reads aloud. A code misread is told before anything is asked. */
export function CodeSearch({ fisheryId, bank, onFound, children }: Props) {
  const [typed, setTyped] = useState('');
  const [fault, setFault] = useState<string | undefined>(undefined);
  const find = useMutation({ mutationFn: (code: string) => findByCode(fisheryId, code) });
  const ask = (): void => {
    const code = readBookingCode(typed);
    setFault(code === null ? 'No ticket has this code: one letter at least is misread.' : undefined);
    if (code === null) find.reset();
    else find.mutate(code, { ...(onFound ? { onSuccess: onFound } : {}) });
  };
  return (
    <View style={{ gap: space.medium }}>
      <Form label="Find a ticket by its code" onSubmit={ask}>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'flex-end' }}>
          <View style={{ flexGrow: 1, flexBasis: 180, maxWidth: 300 }}>
            <Field
              label="Code on the ticket"
              value={typed}
              onChange={setTyped}
              placeholder="7KD MXP"
              error={fault}
              bank={bank}
            />
          </View>
          <Button label="Find it" bank={bank} busy={find.isPending} busyLabel="Looking…" onPress={ask} />
        </View>
      </Form>
      <ProblemNote problem={find.error} />
      {find.data && children ? children(find.data) : null}
    </View>
  );
}
