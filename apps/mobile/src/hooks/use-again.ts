import { useLocalSearchParams } from 'expo-router';
import { readDraft } from '@/lib/draft-text';
import { useOutbox } from '@/lib/outbox';

export type Again = {
  /** Its number in the queue, whose place the corrected one takes; null when the form is a fresh one. */
  instead: number | null;
  /** The form's start with what had been typed laid over it. */
  over: <V extends Readonly<Record<string, unknown>>>(start: V) => V;
  /** It was refused for its time: the corrected one is made now. */
  timeRefused: boolean;
};

const FRESH: Again = { instead: null, over: (start) => start, timeRefused: false };
const TIMES = ['/observedAt', '/startedAt', '/endedAt', '/at'];

/** The refused thing a form was opened for again (`?again=7`). Null until the device's queue has been looked at. */
export function useAgain(): Again | null {
  const { again } = useLocalSearchParams<{ again?: string }>();
  const { entries, looked } = useOutbox();
  if (again === undefined) return FRESH;
  if (!looked) return null;
  const entry = entries.find(({ seq, state }) => String(seq) === again && state === 'refused');
  if (!entry?.again) return FRESH;
  const typed = JSON.stringify(entry.again.typed);
  return {
    instead: entry.seq,
    over: (start) => ({ ...start, ...readDraft(typed, start) }),
    timeRefused: entry.refusal?.errors?.some(({ pointer }) => TIMES.includes(pointer)) ?? false,
  };
}

/** The name of a form's draft: one opened again has its own, so that a half-typed fresh one stays as it is. */
export const draftName = (form: string, { instead }: Again): string =>
  instead === null ? form : `${form}:again:${String(instead)}`;
