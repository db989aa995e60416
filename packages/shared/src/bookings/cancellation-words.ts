import { dayAndClock } from '../time/day-names';
import { HOUR_MS } from '../time/zoned';
import type { CancellationPolicy } from './cancellation';

type When = { start: Date; now: Date; zone: string };

/**
 * A policy as it falls for one ticket: until which instant what goes back, the steps that are over left out. For before
 * paying and on the ticket; instants by the fishery's clock.
 */
export function cancellationSteps({ tiers }: CancellationPolicy, { start, now, zone }: When): string[] {
  if (now >= start) return ['It has begun: nothing is given back.'];
  const ordered = [...tiers].sort((a, b) => b.leastNoticeHours - a.leastNoticeHours);
  const open = ordered
    .map((tier) => ({ ...tier, until: new Date(start.getTime() - tier.leastNoticeHours * HOUR_MS) }))
    .filter(({ until }) => until >= now);
  if (open.length === 0) return ['So near to the start nothing is given back.'];
  const lines = open.map(
    ({ until, refundShareBp, freeMove }) =>
      `Until ${dayAndClock(until.toISOString(), zone)}: ${shareWords(refundShareBp)}${MOVES[freeMove]}.`,
  );
  const last = ordered.at(-1);
  return last && last.leastNoticeHours > 0 ? [...lines, 'After that: nothing back.'] : lines;
}

const MOVES = {
  yes: ', or a move to another date',
  if_relet: ', but a move if the peg is let again',
  no: '',
} as const;

const shareWords = (shareBp: number): string =>
  shareBp === 0 ? 'nothing back' : shareBp === 10_000 ? 'all of it back' : `${shareBp / 100} % back`;
