import { z } from 'zod';

/**
 * A ticket written at the lodge: the first, plainest way a peg is let. POST /api/pegs/:pegId/bookings (office,
 * manager, owner). A peg is never let twice for the same time; the database settles a race.
 */
export const WriteTicket = z.strictObject({
  id: z.uuid(),
  email: z.string().trim().toLowerCase().pipe(z.email()), // of an account that exists
  from: z.iso.datetime(),
  until: z.iso.datetime(), // half-open
});
export type WriteTicket = z.infer<typeof WriteTicket>;

export const TicketView = z.object({
  id: z.uuid(),
  pegId: z.uuid(),
  pegNumber: z.string(),
  lakeName: z.string(),
  fisheryName: z.string(),
  zone: z.string(),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  holder: z.string().nullable(), // name, for staff who may see it
  may: z.object({ cancel: z.boolean() }),
});
export type TicketView = z.infer<typeof TicketView>;

/**
 * GET /api/bookings/mine; GET /api/pegs/:pegId/bookings (office, manager, owner; bailiffs today ± a day).
 * DELETE /api/bookings/:bookingId cancels (those who may write tickets; the holder until it starts).
 */
export const TicketList = z.object({ tickets: z.array(TicketView) });
export type TicketList = z.infer<typeof TicketList>;
