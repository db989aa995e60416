import type { TypedTicketType } from '@/features/tickets/ticket-type-draft';

/** What a form that holds a kind of ticket has at least. */
export type HoldsTicketType = { details: TypedTicketType };
