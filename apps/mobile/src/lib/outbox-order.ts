import type { OutboxEntry } from '@/lib/outbox-event';

type Placed = Pick<OutboxEntry, 'seq' | 'group' | 'state'>;

/** The refused entry that holds this one back: the oldest refused before it in its own group. */
export function heldBy<E extends Placed>(entries: readonly E[], entry: Placed): E | null {
  return (
    entries
      .filter(({ seq, group, state }) => state === 'refused' && group === entry.group && seq < entry.seq)
      .sort((a, b) => a.seq - b.seq)[0] ?? null
  );
}

/**
 * The entry to send now: the oldest waiting one, save that nothing overtakes within a group. A refused entry holds its
 * own group until a person decides, and one that the server failed at (`pausing`) holds it until its next try.
 */
export function nextToSend<E extends Placed>(
  entries: readonly E[],
  pausing: (entry: E) => boolean = () => false,
): E | null {
  const held = new Set<string>();
  for (const entry of [...entries].sort((a, b) => a.seq - b.seq)) {
    if (entry.state === 'sent' || held.has(entry.group)) continue;
    if (entry.state === 'waiting' && !pausing(entry)) return entry;
    held.add(entry.group);
  }
  return null;
}

const FIRST_PAUSE_MS = 2_000;
const LONGEST_PAUSE_MS = 300_000;

/** How long to leave the server alone after so many tries in a row that came to nothing, ms. */
export const pauseMs = (failures: number): number =>
  Math.min(LONGEST_PAUSE_MS, FIRST_PAUSE_MS * 2 ** Math.max(0, failures - 1));

export type SendOutcome = 'done' | 'refused' | 'sign-in' | 'try-later' | 'server-fault' | 'no-answer';

/**
 * What an answer means for what was sent. A page that stands between (an inn's sign-in page answers 200 with HTML) is no
 * answer of ours; too many is the server's wish to be left alone; the sign-in's end waits for that person.
 */
export function outcomeOf(answer: { status: number; json: boolean; redirected: boolean }): SendOutcome {
  const { status, json, redirected } = answer;
  if (status === 401) return 'sign-in';
  if (status === 429) return 'try-later';
  if (status >= 500) return 'server-fault';
  if (redirected || (status !== 204 && !json)) return 'no-answer';
  return status < 400 ? 'done' : 'refused';
}
