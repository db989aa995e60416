import { useEffect } from 'react';
import { boardKeys } from '@/features/bookings/board-api';
import { bookingKeys } from '@/features/bookings/booking-api';
import { apiUrl } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const SETTLE_MS = 400; // a party's pegs change one after another; one reading is enough for them

/** Reads afresh what is free whenever the calendar of one of the fishery's lakes changes, while the page is looked at. */
export function useBoardEvents(fisheryId: string): void {
  useEffect(() => {
    const events = new EventSource(apiUrl(`/fisheries/${fisheryId}/board/events`));
    let timer: ReturnType<typeof setTimeout> | undefined;
    const changed = (): void => {
      clearTimeout(timer);
      timer = setTimeout(() => {
        void queryClient.invalidateQueries({ queryKey: bookingKeys.free(fisheryId) });
        void queryClient.invalidateQueries({ queryKey: boardKeys.all });
      }, SETTLE_MS);
    };
    events.addEventListener('board', changed);
    return () => {
      clearTimeout(timer);
      events.close();
    };
  }, [fisheryId]);
}
