import { useSyncExternalStore } from 'react';
import { z } from 'zod';
import { createPreference } from '@/lib/preference';

/** When something of this device last reached the server, by the device's clock; '' when nothing has. */
const lastSent = createPreference({ key: 'mereward.last-sent', schema: z.string(), fallback: '' });

let reached: boolean | null = null; // null: not tried since this page was opened
const readers = new Set<() => void>();

/** Whether the server answers, as far as sending has shown. */
export const outboxSignal = {
  heard: (answered: boolean): void => {
    if (answered === reached) return;
    reached = answered;
    readers.forEach((tell) => tell());
  },
  sent: lastSent.set,
  useReached: (): boolean | null =>
    useSyncExternalStore(
      (reader) => {
        readers.add(reader);
        return () => readers.delete(reader);
      },
      () => reached,
      () => null,
    ),
  useLastSent: lastSent.use,
};
