import { outboxSignal } from '@/lib/outbox-signal';

/** True when the server gave no answer at the last try to send. */
export const useNoSignal = (): boolean => outboxSignal.useReached() === false;
