import {
  BookForSomebody,
  BookingView,
  CancelAsked,
  CancellationQuote,
  ClaimPeg,
  MoveBooking,
} from '@mereward/shared/bookings/contract';
import type { Ctx } from '../ctx';
import { deed, read, type Route } from '../http/route';
import { bookForSomebody } from './book-for-somebody';
import { bookingView } from './booking-view';
import { cancelBooking, cancellationQuote } from './cancel';
import { claimPeg } from './claim-peg';
import { moveBooking } from './move';
import { checkIn, finishEarly, letPegGo, markNoShow } from './on-the-bank';

const signIn = 'needed';

type BankDeed = [name: string, summary: string, run: (ctx: Ctx, bookingId: string) => Promise<void>];

const BANK_DEEDS: readonly BankDeed[] = [
  ['check-in', 'Say that they are there', checkIn],
  ['no-show', 'Say that nobody came', markNoShow],
  ['let-go', 'Let the peg of a no-show to others', letPegGo],
  ['finish', 'End a ticket early and free the peg', finishEarly],
];

/** What becomes of a ticket: cancelled, moved, come to, finished; and tickets written by the office. */
export const bankRoutes: Route[] = [
  ...BANK_DEEDS.map(([name, summary, run]) =>
    deed(
      {
        method: 'post',
        path: `/bookings/:bookingId/${name}`,
        summary,
        signIn,
        answer: BookingView,
      },
      async (ctx, { id }) => {
        await run(ctx, id('bookingId'));
        return bookingView(ctx, id('bookingId'));
      },
    ),
  ),
  read(
    {
      method: 'get',
      path: '/bookings/:bookingId/cancellation',
      summary: 'What would go back if it were cancelled now',
      signIn,
      query: CancelAsked,
      answer: CancellationQuote,
    },
    (ctx, { id, query }) => cancellationQuote(ctx, id('bookingId'), query),
  ),
  deed(
    {
      method: 'delete',
      path: '/bookings/:bookingId',
      summary: 'Cancel a ticket and give back what is due',
      signIn,
      query: CancelAsked,
    },
    (ctx, { id, query }) => cancelBooking(ctx, id('bookingId'), query),
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/move',
      summary: 'Move a ticket to another time or other pegs',
      signIn,
      body: MoveBooking,
      answer: BookingView,
    },
    async (ctx, { id, body }) => {
      await moveBooking(ctx, id('bookingId'), body);
      return bookingView(ctx, id('bookingId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/claim',
      summary: 'Claim a peg for a ticket that chooses on arrival',
      signIn,
      body: ClaimPeg,
      answer: BookingView,
    },
    async (ctx, { id, body }) => {
      await claimPeg(ctx, id('bookingId'), body.pegId);
      return bookingView(ctx, id('bookingId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/bookings',
      summary: 'Book for somebody at the lodge or on the phone',
      signIn,
      body: BookForSomebody,
      answer: BookingView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await bookForSomebody(ctx, id('fisheryId'), body);
      return bookingView(ctx, body.id);
    },
  ),
];
