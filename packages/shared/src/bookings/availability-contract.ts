import { z } from 'zod';
import { Position } from '../fisheries/contract';
import { PegDetails } from '../lakes/contract';
import { Substrate } from '../surveys/contract';
import { Clock } from '../tickets/contract';
import { BookingState } from './booking-state';

const words = (max: number) => z.string().trim().max(max);

/** How a peg stands for a stretch of time, as anybody may see it: never who has it. */
export const PegState = z.enum(['free', 'held', 'taken', 'blocked', 'closed']);
export type PegState = z.infer<typeof PegState>;

const whole = (least: number, most: number) => z.coerce.number().int().min(least).max(most);

/**
 * GET /api/fisheries/:fisheryId/free (open): which pegs are free. With a kind of ticket its hours are asked for
 * (`start` where it leaves the choice); without one the day from an hour before sunrise to an hour after sunset, or
 * with nights from noon to noon. The filters leave pegs out; what is unknown of a peg fails a filter on it.
 */
export const FreeAsked = z.object({
  day: z.iso.date(),
  ticketTypeId: z.uuid().optional(),
  start: Clock.optional(),
  nights: whole(0, 7).default(0), // only without a kind of ticket
  lakeId: z.uuid().optional(),
  people: whole(1, 20).default(1), // on one peg
  rods: whole(1, 40).default(1), // on one peg
  fromParkingM: whole(0, 10_000).optional(), // at most so far to walk
  barrow: z.literal('yes').optional(),
  stepFree: z.enum(['measured_suitable', 'assisted']).optional(), // assisted: that or better
  leastDepthM: z.coerce.number().min(0).max(60).optional(), // somewhere in its water at least so deep …
  mostDepthM: z.coerce.number().min(0).max(60).optional(), // … and nowhere deeper
  bottom: Substrate.optional(), // found somewhere in its water
});
export type FreeAsked = z.infer<typeof FreeAsked>;

/** What a published chart says of the water in front of a peg, where the reader may see it; depths below chart datum. */
export const PegGround = z.object({
  shallowestM: z.number(),
  deepestM: z.number(),
  bottoms: z.array(Substrate), // the commonest first; empty when not surveyed or not shown to the reader
});
export type PegGround = z.infer<typeof PegGround>;

export const FreePeg = z.object({
  pegId: z.uuid(),
  lakeId: z.uuid(),
  number: z.string(),
  name: z.string(),
  state: PegState,
  whyNot: z.string().nullable(), // in words; null when it is free
  /** The first later day, within 31, on which the same hours are free; null when it is free now or none was found. */
  nextFree: z.object({ day: z.iso.date(), from: z.iso.datetime() }).nullable(),
  position: Position,
  people: z.int(), // it has room for
  rods: z.int(),
  placesLeft: z.int().nullable(), // of a peg that strangers may share; null: it is let whole
  fromParkingM: z.int().nullable(),
  steps: z.int().nullable(),
  surface: z.string(),
  barrow: PegDetails.shape.access.shape.barrow,
  stepFree: PegDetails.shape.stepFree,
  ground: PegGround.nullable(), // null: not surveyed, or not shown to this reader
  priceFromPence: z.int().nullable(), // the kind asked for, else the cheapest sold to the public; null: none
});
export type FreePeg = z.infer<typeof FreePeg>;

/** Pegs in walking order, lake by lake. Where the hours can't be (no such start) there are no pegs and `whyNot` says it. */
export const FreePegs = z.object({
  zone: z.string(),
  from: z.iso.datetime().nullable(), // of the first lake; each lake’s own where the sun sets the hours
  until: z.iso.datetime().nullable(),
  words: z.string(), // the hours, with their days
  whyNot: z.string().nullable(),
  lakes: z.array(
    z.object({
      id: z.uuid(),
      name: z.string(),
      from: z.iso.datetime(),
      until: z.iso.datetime(),
      free: z.int(), // pegs, before the filters
      whyNot: z.string().nullable(), // no nights here, the whole lake is full
      closed: z.string().nullable(), // a closure that lies over these hours, in its own words
    }),
  ),
  currency: z.string(),
  pegs: z.array(FreePeg),
});
export type FreePegs = z.infer<typeof FreePegs>;

/** GET /api/lakes/:lakeId/board (open): pegs and their time from a day on. */
export const BoardAsked = z.object({ from: z.iso.date(), days: whole(1, 31).default(14) });
export type BoardAsked = z.infer<typeof BoardAsked>;

/** Who has a span; null unless the reader is staff who may see it (a bailiff: today and a day either way). */
export const BoardBooking = z.object({
  id: z.uuid(),
  code: z.string(),
  holder: z.string(),
  status: BookingState,
  people: z.int(),
  rods: z.int(),
});
export type BoardBooking = z.infer<typeof BoardBooking>;

export const BoardSpan = z.object({
  from: z.iso.datetime(),
  until: z.iso.datetime().nullable(), // null: until lifted. Turnaround included
  fishingUntil: z.iso.datetime().nullable(), // earlier than `until` by the turnaround
  state: z.enum(['held', 'taken', 'blocked', 'closed']),
  words: z.string(), // of a closure, what everybody is told; of a block, its title for staff; else empty
  closureId: z.uuid().nullable(),
  blockId: z.uuid().nullable(), // for those who may take it away
  booking: BoardBooking.nullable(),
});
export type BoardSpan = z.infer<typeof BoardSpan>;

export const BoardPeg = z.object({
  pegId: z.uuid(),
  number: z.string(),
  name: z.string(),
  shut: z.string().nullable(), // why it can’t be let at all, whatever the day
  shared: z.boolean(), // let place by place: its spans may lie over one another
  spans: z.array(BoardSpan), // in order of their start
});
export type BoardPeg = z.infer<typeof BoardPeg>;

export const BoardView = z.object({
  lakeId: z.uuid(),
  lakeName: z.string(),
  fisheryId: z.uuid(),
  zone: z.string(),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  pegs: z.array(BoardPeg), // in walking order
  choosing: z.array(BoardSpan), // tickets that take a peg on arrival; for strangers without who
  may: z.object({ seeWho: z.boolean(), block: z.boolean(), book: z.boolean() }),
});
export type BoardView = z.infer<typeof BoardView>;

/**
 * GET /api/fisheries/:fisheryId/board/events (open, text/event-stream): `event: board` with this as its data whenever
 * the calendar of a lake changed; never what or who. After a gap in the stream a `board` for every lake comes first.
 */
export const BoardEvent = z.object({ lakeId: z.uuid() });
export type BoardEvent = z.infer<typeof BoardEvent>;

/** POST /api/fisheries/:fisheryId/blocks (office and up): keeps pegs back, all of them or none. */
export const BlockPegs = z.strictObject({
  id: z.uuid(),
  title: words(80).min(1), // seen by staff only
  pegIds: z.array(z.uuid()).min(1).max(200),
  from: z.iso.datetime(),
  until: z.iso.datetime(), // half-open, at most 32 days
});
export type BlockPegs = z.infer<typeof BlockPegs>;

/** DELETE /api/fisheries/:fisheryId/blocks/:blockId gives the pegs back. */
export const BlockView = z.object({
  id: z.uuid(),
  title: z.string(),
  pegs: z.array(z.object({ pegId: z.uuid(), number: z.string(), lakeName: z.string() })),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  madeBy: z.string(),
  may: z.object({ remove: z.boolean() }),
});
export type BlockView = z.infer<typeof BlockView>;

/** GET /api/fisheries/:fisheryId/blocks (staff): those that are not over, the next first. */
export const BlockList = z.object({ blocks: z.array(BlockView) });
export type BlockList = z.infer<typeof BlockList>;
