import { Booking } from '@mereward/db/entities/bookings/booking';
import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import { Closure } from '@mereward/db/entities/closures/closure';
import type { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { ChoiceView } from '@mereward/shared/bookings/choosing-contract';
import { CLOSURE_REASON_WORDS } from '@mereward/shared/closures/closure-effect';
import { moneyWords } from '@mereward/shared/money/money';
import { civilDay } from '@mereward/shared/time/civil-day';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import { secretHash } from '../accounts/secret-token';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { currencyOf } from '../payments/currency';
import { daysWithRoom, pegNumbers, ticketOnLake, type OtherTicket, type Seeking } from './choice-places';
import { leftOfBooking } from './refund-closed';

/** What was kept of a booking when a closure took its pegs, and what became of it. */
export const Outcome = z.object({
  was: z.array(
    z.object({
      pegId: z.uuid().nullable(),
      number: z.string().nullable(),
      people: z.int(),
      rods: z.int(),
      turnaroundMinutes: z.int(),
    }),
  ),
  lakeId: z.uuid(),
  from: z.coerce.date(),
  until: z.coerce.date(),
  backPence: z.int().optional(),
  words: z.string().optional(),
  asked: z.unknown().optional(),
});
export type Outcome = z.infer<typeof Outcome>;

export type Chooser = {
  choice: ClosureChoice;
  outcome: Outcome;
  closure: Closure;
  booking: Booking;
  fishery: Fishery;
  type: TicketType | null;
  lake: Lake;
};

/** What a secret link opens; `lock` holds booking and choice still until the deed is done. */
export async function chooserOf(tx: EntityManager, token: string, lock: boolean): Promise<Chooser> {
  const found = await tx.findOneBy(ClosureChoice, { tokenDigest: secretHash(token) });
  if (!found) throw notFound('choice');
  return chooser(tx, found.id, lock);
}

/** The booking is locked before its choice, as closing and settling do. */
export async function chooser(tx: EntityManager, choiceId: string, lock: boolean): Promise<Chooser> {
  const first = await tx.findOneByOrFail(ClosureChoice, { id: choiceId });
  const held = lock ? { lock: { mode: 'for_no_key_update' as const } } : {};
  const booking = await tx.findOneOrFail(Booking, { where: { id: first.bookingId }, ...held });
  const choice = await tx.findOneOrFail(ClosureChoice, { where: { id: choiceId }, ...held });
  const closure = await tx.findOneByOrFail(Closure, { id: choice.closureId });
  const outcome = Outcome.parse(choice.outcome);
  return {
    choice,
    outcome,
    closure,
    booking,
    fishery: await fisheryFound(tx, booking.fisheryId),
    type: booking.ticketTypeId === null ? null : await tx.findOneBy(TicketType, { id: booking.ticketTypeId }),
    lake: await tx.findOneByOrFail(Lake, { id: outcome.lakeId }),
  };
}

/** What looks for another day on the booking's own lake. */
export const sameLake = ({ fishery, lake, type, booking, outcome }: Chooser, now: Date): Seeking => ({
  fisheryId: fishery.id,
  zone: fishery.zone,
  lake,
  type: type?.details ?? null,
  start: booking.details.start,
  was: outcome.was,
  from: outcome.from,
  until: outcome.until,
  now,
});

export type OtherLake = { seeking: Seeking; ticket: OtherTicket; backPence: number };

/** What looks for a place on the lake that was offered, or null where none was, or it sells nothing that fits. */
export async function otherLake(
  tx: EntityManager,
  chooser: Chooser,
  { now, paidPence }: { now: Date; paidPence: number },
): Promise<OtherLake | null> {
  const { closure, type, booking, outcome, fishery } = chooser;
  if (closure.moveToLakeId === null || outcome.was.some(({ pegId }) => pegId === null)) return null;
  const lake = await tx.findOneByOrFail(Lake, { id: closure.moveToLakeId });
  const was = outcome.was;
  const day = civilDay(outcome.from, fishery.zone);
  const at = { ticketTypeId: booking.ticketTypeId, paidPence, day };
  const ticket = await ticketOnLake(tx, { type: type?.details ?? null, was, lake }, at);
  if (!ticket) return null;
  const seeking = { ...sameLake(chooser, now), lake, type: ticket.row.details, start: null, was };
  return { seeking, ticket, backPence: Math.max(0, paidPence - ticket.grossPence) };
}

/** What whoever holds the link may choose. */
export async function choiceView({ tx, now }: Ctx, token: string): Promise<ChoiceView> {
  const chooser = await chooserOf(tx, token, false);
  const { booking, fishery, lake, closure, choice, outcome } = chooser;
  const open = choice.choice === null && now < choice.chooseUntil && booking.status === 'choosing';
  const paidPence = await leftOfBooking(tx, booking.id);
  const other = open ? await otherLake(tx, chooser, { now, paidPence }) : null;
  return {
    bookingCode: booking.code,
    ticketName: booking.details.ticketName,
    fisheryName: fishery.name,
    lakeName: lake.name,
    pegs: await pegNumbers(
      tx,
      outcome.was.map(({ pegId }) => pegId),
    ),
    zone: fishery.zone,
    from: outcome.from.toISOString(),
    until: outcome.until.toISOString(),
    closedWords: closure.details.publicWords,
    reasonWords: CLOSURE_REASON_WORDS[closure.reason],
    chooseUntil: choice.chooseUntil.toISOString(),
    paidPence,
    currency: booking.currency,
    moveDate: open ? await daysWithRoom(tx, sameLake(chooser, now)) : [],
    moveLake: other && {
      lakeId: other.seeking.lake.id,
      lakeName: other.seeking.lake.name,
      ticketName: other.ticket.row.details.name,
      grossPence: other.ticket.grossPence,
      backPence: other.backPence,
      days: await daysWithRoom(tx, other.seeking),
    },
    refundPence: paidPence,
    chosen: chosenOf(chooser),
  };
}

function chosenOf({ choice, outcome, booking, fishery }: Chooser): ChoiceView['chosen'] {
  const { choice: chosen, chosenBy: by, chosenAt } = choice;
  if (chosen === null || by === null || chosenAt === null) return null;
  const back = moneyWords(outcome.backPence ?? 0, currencyOf(booking.currency));
  const words =
    outcome.words ??
    (chosen === 'refund'
      ? `${back} is given back to you.`
      : chosen === 'kept'
        ? `The water is open again: your ticket stands, ${dayAndClock(outcome.from.toISOString(), fishery.zone)}.`
        : 'The booking is ended. Nothing had been paid for it.');
  return { choice: chosen, by, at: chosenAt.toISOString(), words };
}
