import { useState } from 'react';
import type { TicketView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { ProblemNote } from '@/components/problem-note';
import { useCancelTicket } from '@/features/bookings/api';
import { ticketTimes } from '@/features/bookings/ticket-words';

/** Cancels one ticket, asking first. Shown only where it may be done. */
export function CancelTicket({ ticket }: { ticket: TicketView }) {
  const [asking, setAsking] = useState(false);
  const cancel = useCancelTicket();
  if (!ticket.may.cancel) return null;
  const which = `Peg ${ticket.pegNumber}, ${ticketTimes(ticket)}`;
  return (
    <View style={{ alignItems: 'flex-start' }}>
      <Button
        label="Cancel"
        kind="quiet"
        spoken={`Cancel the ticket: ${which}`}
        onPress={() => setAsking(true)}
      />
      <ProblemNote problem={cancel.error} />
      <Confirm
        open={asking}
        title="Cancel this ticket?"
        words={`${which}. The peg is free again for that time. Money, if any was taken, is settled at the lodge.`}
        act="Cancel the ticket"
        danger
        busy={cancel.isPending}
        onClose={() => setAsking(false)}
        onAct={() => cancel.mutate(ticket.id, { onSettled: () => setAsking(false) })}
      />
    </View>
  );
}
