import type { LogListItem } from '@mereward/shared/surveys/log-contract';
import { figure } from '@/lib/format';

/** How a log stands, in a word or two. */
export function logStateWords({ state, goal, kept }: Pick<LogListItem, 'state' | 'goal' | 'kept'>): string {
  switch (state) {
    case 'queued':
    case 'running':
      return goal === 'look' ? 'being read' : 'being taken in';
    case 'looked':
      return 'read, not taken in';
    case 'done':
      return `${figure(kept ?? 0)} soundings`;
    case 'failed':
      return goal === 'look' ? 'could not be read' : 'could not be taken in';
    case 'cancelled':
      return 'stopped';
  }
}
