import type { Role } from '@mereward/shared/accounts/contract';

/** Who writes and cancels tickets for others, and sees all of them. */
export const TICKET_WRITERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];
/** Who checks tickets on the bank: yesterday's, today's and tomorrow's. */
export const TICKET_CHECKERS = ['head_bailiff', 'bailiff'] as const satisfies readonly Role[];
/** Who settles how pegs are let: money, cancelling, holds. */
export const TERMS_SETTERS = ['owner', 'manager'] as const satisfies readonly Role[];
/** Who sees on the board who has a peg, whatever the day. */
export const BOARD_READERS = [...TICKET_WRITERS, 'head_bailiff'] as const satisfies readonly Role[];
/** Who keeps pegs back. */
export const PEG_BLOCKERS = TICKET_WRITERS;
