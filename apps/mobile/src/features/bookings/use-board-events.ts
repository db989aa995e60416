import { useEffect } from 'react';
import { boardKeys } from '@/features/bookings/board-api';
import { bookingKeys } from '@/features/bookings/booking-api';
import { apiUrl } from '@/lib/api';
import { watchStream } from '@/lib/event-stream';
import { queryClient } from '@/lib/queries';

const SETTLE_MS = 400; // a party's pegs change one after another; one reading is enough for them

/** Reads afresh what is free, and the boards, whenever the calendar of one of the fishery's lakes changes. */
export function useBoardEvents(fisheryId: string): void {
  useEffect(() => {
    if (fisheryId === '') return;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const changed = (): void => {
      clearTimeout(timer);
      timer = setTimeout(() => {
        void queryClient.invalidateQueries({ queryKey: bookingKeys.free(fisheryId) });
        void queryClient.invalidateQueries({ queryKey: boardKeys.all });
      }, SETTLE_MS);
    };
    const leave = watchStream(apiUrl(`/fisheries/${fisheryId}/board/events`), {
      event: 'board',
      heard: changed,
      missed: changed,
    });
    return () => {
      clearTimeout(timer);
      leave();
    };
  }, [fisheryId]);
}
