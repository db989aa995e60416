import { z } from 'zod';
import { EmailAddress } from '../accounts/contract';
import { Version } from '../fisheries/contract';
import { OfficeMethod, PaymentView, ReceiptView, RefundView } from '../payments/contract';
import { Clock, PriceLineView } from '../tickets/contract';
import { BookingState } from './booking-state';
import { CancellationPolicy } from './cancellation';

const words = (max: number) => z.string().trim().max(max);

export const BookingSource = z.enum(['web', 'bailiff', 'office', 'match']);
export type BookingSource = z.infer<typeof BookingSource>;

/** One ticket of a booking. `pegId` null: a peg is chosen on arrival. */
export const BookedTicket = z.strictObject({
  ticketTypeId: z.uuid(),
  pegId: z.uuid().nullable(),
  rods: z.int().min(0).max(10),
  people: z.int().min(1).max(20), // on this ticket, its angler among them
  kind: z.enum(['holder', 'guest', 'junior']),
  name: words(120), // of its angler; empty until the details are filled in
  bornOn: z.iso.date().nullable(), // asked of juniors and of tickets with an age
});
export type BookedTicket = z.infer<typeof BookedTicket>;

/**
 * POST /api/bookings: takes the pegs for ten minutes, all of them or none. The first ticket sets the times; every other
 * must run as long. Somebody else was quicker: `conflict`, with pegs like them in `errors`.
 */
export const HoldPegs = z.strictObject({
  id: z.uuid(),
  lakeId: z.uuid(),
  day: z.iso.date(),
  start: Clock.nullable(),
  tickets: z.array(BookedTicket).min(1).max(40),
});
export type HoldPegs = z.infer<typeof HoldPegs>;

/** The rod licence as its holder declares it. The last six characters at most, and never checked by us. */
export const LicenceDeclaration = z.strictObject({
  held: z.boolean(),
  lastSix: words(6),
  expiresOn: z.iso.date().nullable(),
});
export type LicenceDeclaration = z.infer<typeof LicenceDeclaration>;

/** PUT /api/bookings/:bookingId/details while it is held. */
export const FillInBooking = z.strictObject({
  version: Version,
  tickets: z
    .array(z.strictObject({ name: words(120).min(1), bornOn: z.iso.date().nullable() }))
    .min(1)
    .max(40), // in the order they were held
  guardian: z
    .strictObject({ name: words(120).min(1), phone: words(40).min(1), consent: z.boolean() })
    .nullable(), // with juniors: who stays beside them
  vehicle: words(20),
  emergencyContact: words(120),
  licence: LicenceDeclaration.nullable(),
  note: words(500),
});
export type FillInBooking = z.infer<typeof FillInBooking>;

/** What travels whole with a booking: what was chosen and said, and the terms as they stood. */
export const BookingDetails = z.object({
  ticketName: z.string(),
  day: z.iso.date(),
  start: Clock.nullable(),
  tickets: z.array(BookedTicket),
  lines: z.array(PriceLineView),
  turnaroundMinutes: z.int(),
  cancellation: CancellationPolicy, // as it was when sold
  guardian: z.object({ name: z.string(), phone: z.string(), consent: z.boolean() }).nullable(), // no phone for bailiffs
  vehicle: z.string(),
  emergencyContact: z.string(),
  licence: LicenceDeclaration.nullable(),
  note: z.string(),
});
export type BookingDetails = z.infer<typeof BookingDetails>;

export const BookedPeg = z.object({ pegId: z.uuid(), number: z.string(), name: z.string() });
export type BookedPeg = z.infer<typeof BookedPeg>;

/** GET /api/bookings/:bookingId (its holder, staff); the answer of every deed on one. */
export const BookingView = z.object({
  id: z.uuid(),
  code: z.string(), // six characters to be read aloud
  qr: z.string(), // what the ticket's square says
  fisheryId: z.uuid(),
  fisheryName: z.string(),
  lakeId: z.uuid().nullable(),
  lakeName: z.string().nullable(),
  zone: z.string(),
  pegs: z.array(BookedPeg),
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  status: BookingState,
  holder: z.string(),
  people: z.int(),
  rods: z.int(),
  details: BookingDetails,
  grossPence: z.int(),
  paidPence: z.int(),
  refundedPence: z.int(),
  currency: z.string(),
  holdUntil: z.iso.datetime().nullable(),
  payments: z.array(PaymentView),
  refunds: z.array(RefundView),
  receipts: z.array(ReceiptView),
  /** Why the ticket doesn't count yet, in words: rules to be read, a licence to be declared. None: it is good. */
  notYet: z.array(z.string()),
  rulesToRead: z.boolean(),
  gateCode: z.string().default(''), // inside the hours of a good ticket; else ''
  version: z.int(),
  may: z.object({
    fillIn: z.boolean(),
    pay: z.boolean(),
    confirm: z.boolean(), // nothing is to be paid now
    cancel: z.boolean(),
    move: z.boolean(),
    finish: z.boolean(),
    claimPeg: z.boolean(),
    checkIn: z.boolean(),
    noShow: z.boolean(), // staff: nobody came
    letGo: z.boolean(), // staff: let the peg of one who did not come to others
    takeMoney: z.boolean(), // at the lodge
    refund: z.boolean(),
  }),
});
export type BookingView = z.infer<typeof BookingView>;

/** GET /api/bookings/mine; GET /api/fisheries/:fisheryId/bookings?day=… (staff; bailiffs today ± a day). */
export const BookingListItem = BookingView.pick({
  id: true,
  code: true,
  fisheryName: true,
  lakeName: true,
  zone: true,
  pegs: true,
  from: true,
  until: true,
  status: true,
  holder: true,
  people: true,
  rods: true,
  grossPence: true,
  paidPence: true,
  currency: true,
  notYet: true,
}).extend({ ticketName: z.string() });
export type BookingListItem = z.infer<typeof BookingListItem>;
export const BookingList = z.object({ bookings: z.array(BookingListItem) });
export type BookingList = z.infer<typeof BookingList>;

/** The day whose tickets staff look at: those that run on any part of it, at the lake. */
export const BookingsOfDay = z.strictObject({ day: z.iso.date(), lakeId: z.uuid().optional() });
export type BookingsOfDay = z.infer<typeof BookingsOfDay>;

/*
 * One deed a route, each answered with the BookingView:
 * GET /api/bookings/by-code/:code (its holder, staff of its fishery);
 * GET /api/fisheries/:fisheryId/bookings/by-code/:code (staff; bailiffs today ± a day);
 * POST /api/bookings/:bookingId/confirm (nothing to pay now), /finish, /check-in (holder or staff),
 * /no-show and /let-go (staff). DELETE /api/bookings/:bookingId/hold and DELETE /api/bookings/:bookingId answer nothing.
 */

/** POST /api/bookings/:bookingId/page → where to pay; DELETE /api/bookings/:bookingId/hold lets go of a hold. */
export const PaymentPage = z.object({ url: z.string() });
export type PaymentPage = z.infer<typeof PaymentPage>;

/** POST /api/bookings/:bookingId/taken (office and up): paid at the lodge. */
export const TakeMoney = z.strictObject({ id: z.uuid(), method: OfficeMethod, amountPence: z.int().min(0) });
export type TakeMoney = z.infer<typeof TakeMoney>;

/**
 * POST /api/fisheries/:fisheryId/bookings (office and up): a ticket for somebody who asks at the lodge or on the
 * phone, with or without an account. Confirmed at once; what is to be paid is taken with `TakeMoney`.
 */
export const BookForSomebody = HoldPegs.extend({
  holder: z.strictObject({ name: words(120).min(1), email: EmailAddress.nullable() }),
  vehicle: words(20),
  note: words(500),
});
export type BookForSomebody = z.infer<typeof BookForSomebody>;

/** On whose account staff cancel: as the angler asked, by the terms, or by the fishery, all back. Holders: the former. */
export const CancelAsked = z.strictObject({ cause: z.enum(['angler', 'fishery']).optional() });
export type CancelAsked = z.infer<typeof CancelAsked>;

/** GET /api/bookings/:bookingId/cancellation: what would go back now. DELETE /api/bookings/:bookingId does it. */
export const CancellationQuote = z.object({ refundPence: z.int(), percent: z.int(), words: z.string() });
export type CancellationQuote = z.infer<typeof CancellationQuote>;

/** POST /api/bookings/:bookingId/move: the same tickets at another time or on other pegs; the price stays. */
export const MoveBooking = z.strictObject({
  version: Version,
  day: z.iso.date(),
  start: Clock.nullable(),
  lakeId: z.uuid(),
  pegIds: z.array(z.uuid().nullable()).min(1).max(40), // one for each ticket
  reason: words(300),
});
export type MoveBooking = z.infer<typeof MoveBooking>;

/** POST /api/bookings/:bookingId/claim: a peg for a ticket that chooses on arrival. The first to claim has it. */
export const ClaimPeg = z.strictObject({ pegId: z.uuid() });
export type ClaimPeg = z.infer<typeof ClaimPeg>;

/** What somebody waiting would take. */
export const WaitingWish = z.strictObject({
  ticketTypeId: z.uuid(),
  start: Clock.nullable(),
  rods: z.int().min(0).max(10),
  pegIds: z.array(z.uuid()).max(200), // none: any
});
export type WaitingWish = z.infer<typeof WaitingWish>;

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
