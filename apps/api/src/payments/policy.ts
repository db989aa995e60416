import type { Role } from '@mereward/shared/accounts/contract';
import { accountOrNull, holdsAny, type Actor } from '../ctx';

/** Who sees a fishery's money: takings, receipts, the ledger, disputes. */
export const MONEY_READERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];
/** Who takes money at the lodge and hands it back. */
export const MONEY_HANDLERS = MONEY_READERS;
/** Who gives back more than the office's limit, when somebody else has asked for it. */
export const LARGE_GIVERS = ['owner', 'manager'] as const satisfies readonly Role[];
/** Who may ask that money be given back, besides its payer. */
export const REFUND_PROPOSERS = [
  'owner',
  'manager',
  'office',
  'head_bailiff',
] as const satisfies readonly Role[];

export type RefundAsked = { fisheryId: string; amountPence: number; askedBy: string | null };

/** Gives it without asking anybody: up to the limit, whoever handles money. Above it nobody alone. */
export const mayGiveAlone = (actor: Actor, asked: RefundAsked, limitPence: number): boolean =>
  asked.amountPence <= limitPence && holdsAny(actor, asked.fisheryId, MONEY_HANDLERS);

/** Approves or declines what somebody else has proposed. */
export function mayDecide(actor: Actor, asked: RefundAsked, limitPence: number): boolean {
  const roles = asked.amountPence <= limitPence ? MONEY_HANDLERS : LARGE_GIVERS;
  return holdsAny(actor, asked.fisheryId, roles) && accountOrNull(actor) !== asked.askedBy;
}
