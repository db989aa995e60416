import type { Role } from '@mereward/shared/accounts/contract';

/** Who writes and cancels tickets for others, and sees all of them. */
export const TICKET_WRITERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];
/** Who checks tickets on the bank: yesterday's, today's and tomorrow's. */
export const TICKET_CHECKERS = ['head_bailiff', 'bailiff'] as const satisfies readonly Role[];
/** Who settles how pegs are let: money, cancelling, holds. */
export const TERMS_SETTERS = ['owner', 'manager'] as const satisfies readonly Role[];
