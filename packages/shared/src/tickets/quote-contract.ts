import { z } from 'zod';
import { Clock, TicketChoice, TicketQuoteView, TicketType } from './contract';

/**
 * POST /api/fisheries/:fisheryId/ticket-quote (office, manager, owner): what a kind of ticket that is still being
 * written would cost and when it would end. Where the lake's sun counts, `lakeId` says whose.
 */
export const QuoteDraft = z.strictObject({ details: TicketType, lakeId: z.uuid(), choice: TicketChoice });
export type QuoteDraft = z.infer<typeof QuoteDraft>;

/**
 * GET /api/ticket-types/:ticketTypeId/quote?lakeId&day&start&rods&people (open): what it would cost and when it would
 * end, with every reason why this reader can't have it that could be told without knowing who comes along.
 */
export const QuoteQuery = z.strictObject({
  lakeId: z.uuid(),
  day: z.iso.date(),
  start: Clock.optional(),
  rods: z.coerce.number().int().min(1).max(10).default(1),
  people: z.coerce.number().int().min(1).max(20).default(1),
});
export type QuoteQuery = z.infer<typeof QuoteQuery>;

/** `fault` says why there are no such hours or no price, and the rest is null then. */
export const TicketQuoteAnswer = z.object({ quote: TicketQuoteView.nullable(), fault: z.string() });
export type TicketQuoteAnswer = z.infer<typeof TicketQuoteAnswer>;
