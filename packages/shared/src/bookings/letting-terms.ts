import { z } from 'zod';
import { Version } from '../fisheries/contract';
import { PricePence } from '../money/money';
import { ReadingMode } from '../rules/contract';
import { CancellationPolicy, USUAL_CANCELLATION } from './cancellation';
import { CHALLENGE_HOLD_MINUTES, HOLD_MINUTES, NO_SHOW_AFTER_HOURS } from './hold';

/** How a fishery lets its pegs, whatever the kind of ticket. */
export const LettingTerms = z.strictObject({
  cancellation: CancellationPolicy,
  holdMinutes: z.int().min(5).max(30),
  challengeMinutes: z.int().min(5).max(60), // from the start of the hold, while a card is being checked
  noShowHours: z.int().min(1).max(48),
  claimMinutes: z.int().min(10).max(240), // how long a peg offered from the waiting list is kept
  officeRefundPence: PricePence, // what the office may give back without the manager
  rulesMode: ReadingMode,
  juniorNights: z.boolean(), // a junior may be on the bank at night beside the guardian
  payAtLodge: z.boolean(), // an angler may book now and pay on the day
});
export type LettingTerms = z.infer<typeof LettingTerms>;

/** Terms to begin with, until an owner sets their own. Common practice, no published source. */
export const USUAL_TERMS: LettingTerms = {
  cancellation: USUAL_CANCELLATION,
  holdMinutes: HOLD_MINUTES,
  challengeMinutes: CHALLENGE_HOLD_MINUTES,
  noShowHours: NO_SHOW_AFTER_HOURS,
  claimMinutes: 30,
  officeRefundPence: 10_000,
  rulesMode: 'must_ack_before_ticket_valid',
  juniorNights: false,
  payAtLodge: false,
};

/** PUT /api/fisheries/:fisheryId/letting-terms (owner, manager); GET is open: terms are there to be read. */
export const PutLettingTerms = z.strictObject({ details: LettingTerms, version: Version.nullable() });
export type PutLettingTerms = z.infer<typeof PutLettingTerms>;

export const LettingTermsView = z.object({
  details: LettingTerms,
  version: z.int().nullable(), // null: nothing was set yet, and these are the ones to begin with
  cardPayments: z.boolean(), // cards can be taken on the web
  may: z.object({ change: z.boolean() }),
});
export type LettingTermsView = z.infer<typeof LettingTermsView>;
