import { z } from 'zod';

/** A day on which everything of a booking finds a place, with the free pegs that could take it. */
export const PlaceOffered = z.object({
  day: z.iso.date(),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  words: z.string(),
  free: z.int(), // pegs that could take it
});
export type PlaceOffered = z.infer<typeof PlaceOffered>;

/**
 * GET /api/choices/:token (no sign-in: whoever holds the letter): what becomes of a booking that a closure lies over.
 * `moveLake` is null where no other lake was offered or none of its tickets fits.
 */
export const ChoiceView = z.object({
  bookingCode: z.string(),
  ticketName: z.string(),
  fisheryName: z.string(),
  lakeName: z.string(),
  pegs: z.array(z.string()), // numbers
  zone: z.string(),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  closedWords: z.string(),
  reasonWords: z.string(),
  chooseUntil: z.iso.datetime(),
  paidPence: z.int(),
  currency: z.string(),
  moveDate: z.array(PlaceOffered),
  moveLake: z
    .object({
      lakeId: z.uuid(),
      lakeName: z.string(),
      ticketName: z.string(),
      grossPence: z.int(),
      backPence: z.int(), // the difference, given back
      days: z.array(PlaceOffered),
    })
    .nullable(),
  refundPence: z.int(), // what goes back when they don't come, and after the deadline
  chosen: z
    .object({
      choice: z.enum(['move_date', 'move_lake', 'refund', 'cancel', 'kept']),
      by: z.enum(['angler', 'office', 'deadline']),
      at: z.iso.datetime(),
      words: z.string(),
    })
    .nullable(),
});
export type ChoiceView = z.infer<typeof ChoiceView>;

/**
 * POST /api/choices/:token: one choice, until the deadline. No room any more: `conflict`, with the days that are left
 * in `errors`. The same choice again is no fault; another after it is.
 */
export const Choose = z.discriminatedUnion('choice', [
  z.strictObject({ choice: z.literal('move_date'), day: z.iso.date() }),
  z.strictObject({ choice: z.literal('move_lake'), day: z.iso.date() }),
  z.strictObject({ choice: z.literal('refund') }),
]);
export type Choose = z.infer<typeof Choose>;
