import { LettingTerms } from '@mereward/shared/bookings/letting-terms';
import type { CancellationPolicy } from '@mereward/shared/bookings/cancellation';
import { z } from 'zod';
import { typedPence, typedPounds } from '@/lib/typed-money';
import { typedNumber } from '@/lib/typed-schemas';

type Whole = { min: number; max: number; unit?: string };
const whole = (what: string, range: Whole) => typedNumber({ what, ...range }).pipe(z.int('A whole number.'));

const HOURS_OF = { hours: 1, days: 24 } as const;
const MOST_NOTICE_HOURS = 8760;

const TypedTier = z
  .object({
    notice: typedNumber({ what: 'The notice', min: 0, max: MOST_NOTICE_HOURS }),
    unit: z.enum(['hours', 'days']),
    percent: typedNumber({ what: 'What goes back', min: 0, max: 100, unit: '%' }),
    freeMove: z.enum(['yes', 'if_relet', 'no']),
  })
  .transform(({ notice, unit, percent, freeMove }, context): CancellationPolicy['tiers'][number] => {
    const leastNoticeHours = notice * HOURS_OF[unit];
    if (!Number.isInteger(leastNoticeHours) || leastNoticeHours > MOST_NOTICE_HOURS)
      context.issues.push({
        code: 'custom',
        path: ['notice'],
        message: 'Whole hours or days, a year at most',
        input: notice,
      });
    return { leastNoticeHours, refundShareBp: Math.round(percent * 100), freeMove };
  });
export type TypedTier = z.input<typeof TypedTier>;

/** Terms of letting as they are typed, and what is made of them. */
export const TermsDraft = z
  .object({
    cancellation: z.object({
      tiers: z.array(TypedTier).max(8),
      mostMoves: whole('Moves', { min: 0, max: 20 }),
      banRefundsUnused: z.boolean(),
      coolingOffDays: whole('Days', { min: 0, max: 60 }),
    }),
    holdMinutes: whole('The hold', { min: 5, max: 30, unit: 'minutes' }),
    challengeMinutes: whole('The hold', { min: 5, max: 60, unit: 'minutes' }),
    noShowHours: whole('The wait', { min: 1, max: 48, unit: 'hours' }),
    claimMinutes: whole('The offer', { min: 10, max: 240, unit: 'minutes' }),
    officeRefund: typedPence('The limit'),
    rulesMode: LettingTerms.shape.rulesMode,
    juniorNights: z.boolean(),
    payAtLodge: z.boolean(),
  })
  .transform(({ officeRefund, ...rest }) => ({ ...rest, officeRefundPence: officeRefund }))
  .pipe(LettingTerms);
export type TypedTerms = z.input<typeof TermsDraft>;

const DAYS_FROM_HOURS = 72; // shorter notice reads better in hours

const typedTier = ({
  leastNoticeHours,
  refundShareBp,
  freeMove,
}: CancellationPolicy['tiers'][number]): TypedTier => {
  const inDays = leastNoticeHours >= DAYS_FROM_HOURS && leastNoticeHours % 24 === 0;
  return {
    notice: String(inDays ? leastNoticeHours / 24 : leastNoticeHours),
    unit: inDays ? 'days' : 'hours',
    percent: String(refundShareBp / 100),
    freeMove,
  };
};

/** Terms laid into the form. */
export function typedTerms({ cancellation, officeRefundPence, ...rest }: LettingTerms): TypedTerms {
  return {
    cancellation: {
      ...cancellation,
      tiers: cancellation.tiers.map(typedTier),
      mostMoves: String(cancellation.mostMoves),
      coolingOffDays: String(cancellation.coolingOffDays),
    },
    holdMinutes: String(rest.holdMinutes),
    challengeMinutes: String(rest.challengeMinutes),
    noShowHours: String(rest.noShowHours),
    claimMinutes: String(rest.claimMinutes),
    officeRefund: typedPounds(officeRefundPence),
    rulesMode: rest.rulesMode,
    juniorNights: rest.juniorNights,
    payAtLodge: rest.payAtLodge,
  };
}
