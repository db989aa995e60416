import type { ClosureEffect } from '@mereward/shared/closures/contract';
import type { ClosureTally, ClosureView } from '@mereward/shared/closures/deeds-contract';
import { money } from '@/lib/format';
import { dayAndTime } from '@/lib/format-time';

export const EFFECTS: Readonly<Record<ClosureEffect, { label: string; note: string }>> = {
  move: { label: 'Let them choose', note: 'Another date, another lake, or the money back.' },
  refund: { label: 'Cancel and give back', note: 'All of the money goes back at once.' },
  block: { label: 'No new bookings only', note: 'Bookings already made stand.' },
  allow_with_warning: { label: 'Warn only', note: 'Bookings stand and are told.' },
};

export const METHODS = { keepnets: 'Keepnets', boats: 'Boats', night: 'Night fishing' } as const;

/** What is closed: "Far Ostle", "Pegs FO1, FO2 on Far Ostle", "No keepnets on Ostle Pool". */
export function scopeWords({ details: { scope }, lakes, pegs }: ClosureView): string {
  const names = lakes.map(({ name }) => name).join(', ');
  switch (scope.kind) {
    case 'fishery':
      return 'The whole fishery';
    case 'lakes':
      return names;
    case 'pegs':
      return `${pegs.length === 1 ? 'Peg' : 'Pegs'} ${pegs.map(({ number }) => number).join(', ')} on ${names}`;
    case 'method':
      return `${METHODS[scope.method]} on ${names}`;
  }
}

export function timesWords({ details: { from, until }, zone, liftedAt }: ClosureView): string {
  const end =
    liftedAt !== null
      ? `lifted ${dayAndTime(liftedAt, zone)}`
      : until === null
        ? 'until lifted'
        : `until ${dayAndTime(until, zone)}`;
  return `From ${dayAndTime(from, zone)}, ${end}`;
}

/** What became of the bookings it hit, line by line. */
export function tallyFacts(tally: ClosureTally): { term: string; fact: string }[] {
  const { currency } = tally;
  const count = (term: string, n: number): { term: string; fact: string }[] =>
    n === 0 ? [] : [{ term, fact: String(n) }];
  return [
    ...(tally.bookings === 0
      ? []
      : [
          {
            term: 'Bookings hit',
            fact: `${String(tally.bookings)}, worth ${money(tally.valuePence, currency)}`,
          },
        ]),
    ...count('Still to choose', tally.waiting),
    ...count('Moved to another date', tally.movedDate),
    ...count('Moved to another lake', tally.movedLake),
    ...count('All money back', tally.refunded),
    ...count('Ended, nothing paid', tally.cancelled),
    ...count('Told only', tally.told),
    ...(tally.refundedPence > 0 ? [{ term: 'Given back', fact: money(tally.refundedPence, currency) }] : []),
    ...(tally.bookings > 0 ? [{ term: 'Kept', fact: money(tally.keptPence, currency) }] : []),
    ...count('Refunds that failed', tally.refundFailed),
  ];
}
