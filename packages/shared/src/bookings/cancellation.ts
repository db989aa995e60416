import { z } from 'zod';
import { wholePence } from '../money/money';
import { shareOf } from '../money/sharing';
import { HOUR_MS } from '../time/zoned';

/** What an angler who cancels gets back, by elapsed hours before the start. Kept with the booking as it was when sold. */
export const CancellationPolicy = z.strictObject({
  tiers: z
    .array(
      z.strictObject({
        leastNoticeHours: z.int().min(0).max(8760), // this much notice or more
        refundShareBp: z.int().min(0).max(10_000), // hundredths of a per cent of what was taken
        freeMove: z.enum(['yes', 'if_relet', 'no']), // another date in place of the money
      }),
    )
    .max(8)
    .refine((tiers) => new Set(tiers.map(({ leastNoticeHours }) => leastNoticeHours)).size === tiers.length, {
      error: 'Two steps begin at the same notice',
    }),
  mostMoves: z.int().min(0).max(20), // by the angler, of one booking
  banRefundsUnused: z.boolean(), // a ban gives back what was paid for tickets not begun
  coolingOffDays: z.int().min(0).max(60), // season tickets: full refund so long after buying
});
export type CancellationPolicy = z.infer<typeof CancellationPolicy>;

/**
 * Where an owner starts: a week or more in full, two days or more half or a free move, less nothing but a free move if
 * the peg is let again. Common practice, no published source; fourteen days for a season ticket is a cautious reading
 * from memory of the Consumer Contracts Regulations 2013.
 */
export const USUAL_CANCELLATION: CancellationPolicy = {
  tiers: [
    { leastNoticeHours: 168, refundShareBp: 10_000, freeMove: 'yes' },
    { leastNoticeHours: 48, refundShareBp: 5_000, freeMove: 'yes' },
    { leastNoticeHours: 0, refundShareBp: 0, freeMove: 'if_relet' },
  ],
  mostMoves: 1,
  banRefundsUnused: true,
  coolingOffDays: 14,
};

export const CancellationCause = z.enum(['angler', 'fishery', 'ban', 'paid_too_late']);
export type CancellationCause = z.infer<typeof CancellationCause>;

/** A booking’s money and times. `boughtAt` counts for season tickets only, null for others. */
export type Cancelled = {
  takenPence: number; // captured or put in the tin
  refundedPence: number; // given back already, or on its way
  start: Date;
  now: Date;
  seasonBoughtAt: Date | null;
};

export type Refund = { refundPence: number; shareBp: number; words: string };
type Tier = CancellationPolicy['tiers'][number];

/** The step that holds at a notice: the longest that is reached. Null once it has begun, or where no step holds. */
export function tierAt({ tiers }: CancellationPolicy, start: Date, now: Date): Tier | null {
  const noticeMs = start.getTime() - now.getTime();
  if (noticeMs <= 0) return null;
  return tiers
    .filter(({ leastNoticeHours }) => leastNoticeHours * HOUR_MS <= noticeMs)
    .reduce<Tier | null>(
      (best, tier) => (best === null || tier.leastNoticeHours > best.leastNoticeHours ? tier : best),
      null,
    );
}

/**
 * What a cancellation gives back, whole pence, half pence up: a share of what was taken less what went back already,
 * never below nought and never more than is left. A closure and a payment that came too late give back all of it.
 */
export function refundFor(policy: CancellationPolicy, cause: CancellationCause, booking: Cancelled): Refund {
  const { takenPence, refundedPence } = booking;
  if (wholePence(takenPence) < 0 || wholePence(refundedPence) < 0)
    throw new RangeError('What was taken and what was given back are not below nought.');
  const { shareBp, words } = shareFor(policy, cause, booking);
  const left = Math.max(0, takenPence - refundedPence);
  const due = Math.max(0, shareOf(takenPence, shareBp) - refundedPence);
  return { refundPence: Math.min(due, left), shareBp, words };
}

type Share = { shareBp: number; words: string };

function shareFor(policy: CancellationPolicy, cause: CancellationCause, booking: Cancelled): Share {
  const whole = (words: string): Share => ({ shareBp: 10_000, words });
  const none = (words: string): Share => ({ shareBp: 0, words });
  switch (cause) {
    case 'fishery':
      return whole('The fishery cancelled: all of it is given back.');
    case 'paid_too_late':
      return whole('The payment came after the peg was let to somebody else: all of it is given back.');
    case 'ban':
      return policy.banRefundsUnused && booking.now < booking.start
        ? whole('The ticket was not begun: all of it is given back.')
        : none('Nothing is given back.');
    case 'angler':
      return anglersShare(policy, booking);
  }
}

function anglersShare(policy: CancellationPolicy, { start, now, seasonBoughtAt }: Cancelled): Share {
  const days = policy.coolingOffDays;
  if (seasonBoughtAt && now.getTime() < seasonBoughtAt.getTime() + days * 24 * HOUR_MS)
    return {
      shareBp: 10_000,
      words: `Within ${days} days of buying a season ticket all of it is given back.`,
    };
  if (now >= start) return { shareBp: 0, words: 'It has begun: nothing is given back.' };
  const tier = tierAt(policy, start, now);
  if (!tier || tier.refundShareBp === 0)
    return { shareBp: 0, words: 'So near to the start nothing is given back.' };
  const share = tier.refundShareBp === 10_000 ? 'all of it' : `${tier.refundShareBp / 100} %`;
  return {
    shareBp: tier.refundShareBp,
    words: `${hoursWords(tier.leastNoticeHours)} or more before the start ${share} is given back.`,
  };
}

const hoursWords = (hours: number): string =>
  hours % 24 === 0 && hours >= 72 ? `${hours / 24} days` : `${hours} hours`;

/** A policy in words, the longest notice first, for beside the button that buys. */
export function policyWords({ tiers }: CancellationPolicy): string[] {
  const move = {
    yes: ' or a move to another date',
    if_relet: ', but a move if the peg is let again',
    no: '',
  };
  const ordered = [...tiers].sort((a, b) => b.leastNoticeHours - a.leastNoticeHours);
  const lines = ordered.map(({ leastNoticeHours, refundShareBp, freeMove }) => {
    const share =
      refundShareBp === 0 ? 'nothing' : refundShareBp === 10_000 ? 'all' : `${refundShareBp / 100} %`;
    const when = leastNoticeHours === 0 ? 'Later' : `${hoursWords(leastNoticeHours)} or more before`;
    return `${when}: ${share} back${move[freeMove]}.`;
  });
  return [...lines, 'If the fishery closes: all back or a move, as you choose.'];
}
