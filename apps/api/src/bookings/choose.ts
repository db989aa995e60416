import { Booking } from '@mereward/db/entities/bookings/booking';
import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import type { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { Choose, PlaceOffered } from '@mereward/shared/bookings/choosing-contract';
import { moneyWords } from '@mereward/shared/money/money';
import { Problem } from '@mereward/shared/problems/problem';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { Interval } from '@mereward/shared/time/interval';
import { isDeepStrictEqual } from 'node:util';
import { rangeOf } from '../closures/closure-times';
import { orConflict } from '../conflict';
import type { Ctx } from '../ctx';
import { currencyOf } from '../payments/currency';
import { queueRefund } from '../payments/refunds';
import { daysWithRoom, detailsMoved, hoursOn, pegNumbers, pegsOn, type Seeking } from './choice-places';
import { writeEvent } from './closure-history';
import { chooserOf, otherLake, sameLake, type Chooser } from './closure-choices';
import { choiceKeptLetter, postIf } from './closure-letters';
import { freePegs, takePegs } from './peg-calendar';
import { endByRefund, leftOfBooking, refundCause } from './refund-closed';

/** Does what was chosen, once. A second choice, or one after the deadline, is told how things stand. */
export async function choose(ctx: Ctx, token: string, asked: Choose): Promise<void> {
  const { tx, now } = ctx;
  const chooser = await chooserOf(tx, token, true);
  const { choice, booking, outcome } = chooser;
  if (choice.choice !== null) {
    if (isDeepStrictEqual(outcome.asked, asked)) return;
    throw new Problem('conflict', 'This booking has been settled already', {
      detail: 'Nothing was changed. Load the page again to see how it stands.',
    });
  }
  if (booking.status !== 'choosing')
    throw new Problem('conflict', 'There is nothing to choose for this booking any more', {
      detail: 'It was cancelled or moved another way.',
    });
  if (now >= choice.chooseUntil)
    throw new Problem('conflict', 'The time to choose is over', {
      detail: 'All of your money is given back. Ask the fishery’s office if that is not right.',
    });
  const words = await settled(ctx, chooser, asked);
  await keepAsked(ctx, choice.id, { asked, words });
  const to = { ...booking, holder: booking.holderName, lakeName: chooser.lake.name, from: outcome.from };
  await postIf(ctx, booking.holderEmail, (email) => choiceKeptLetter({ ...to, email }, chooser, words));
}

async function settled(ctx: Ctx, chooser: Chooser, asked: Choose): Promise<string> {
  const { booking, choice } = chooser;
  const paidPence = await leftOfBooking(ctx.tx, booking.id);
  switch (asked.choice) {
    case 'refund': {
      const back = await endByRefund(ctx, choice, 'angler');
      return back > 0
        ? `${moneyWords(back, currencyOf(booking.currency))} is on its way back to you.`
        : 'The booking is ended. Nothing had been paid for it.';
    }
    case 'move_date': {
      const seeking = sameLake(chooser, ctx.now);
      const to = { seeking, day: asked.day, type: null, grossPence: booking.grossPence };
      const pegs = await moveTo(ctx, chooser, to);
      return movedWords(pegs, seeking);
    }
    case 'move_lake': {
      const other = await otherLake(ctx.tx, chooser, { now: ctx.now, paidPence });
      if (!other)
        throw new Problem('conflict', 'No other lake is offered', { detail: 'Choose another way.' });
      const { seeking, ticket, backPence } = other;
      const grossPence = Math.min(ticket.grossPence, paidPence);
      const pegs = await moveTo(ctx, chooser, { seeking, day: asked.day, type: ticket.row, grossPence });
      await queueRefund(ctx, {
        bookingId: booking.id,
        amountPence: backPence,
        cause: refundCause(choice.closureId),
        reason: `Moved to ${seeking.lake.name}: the difference is given back.`,
      });
      const back = moneyWords(backPence, currencyOf(booking.currency));
      return `${movedWords(pegs, seeking)}${backPence > 0 ? ` ${back} is on its way back to you.` : ''}`;
    }
  }
}

type Moved = { numbers: string[]; hours: Interval };

const movedWords = ({ numbers, hours }: Moved, { lake, zone }: Seeking): string => {
  const where = numbers.length > 0 ? `Peg ${numbers.join(', ')} on ${lake.name}` : lake.name;
  return `${where} is yours, ${dayAndClock(hours.from.toISOString(), zone)} to ${dayAndClock(hours.until.toISOString(), zone)}.`;
};

type To = { seeking: Seeking; day: string; type: TicketType | null; grossPence: number };

/** Somebody may be quicker at every peg; after so many tries another day is offered. */
const MOST_TRIES = 12;

/** Moves a booking to another day or lake: on the pegs it had where they are free, else on the nearest. */
async function moveTo(ctx: Ctx, chooser: Chooser, to: To): Promise<Moved> {
  const { tx } = ctx;
  const { seeking, day, type } = to;
  const hours = hoursOn(seeking, day);
  if (!hours || hours.from <= ctx.now) throw await full(ctx, seeking);
  const turnaroundMinutes = seeking.type?.turnaroundMinutes ?? chooser.outcome.was[0]?.turnaroundMinutes ?? 0;
  for (let tries = 0; tries < MOST_TRIES; tries += 1) {
    const pegIds = await pegsOn(tx, seeking, hours);
    if (!pegIds) break;
    const pegs = pegIds.map((pegId, index) => ({
      pegId,
      people: seeking.was[index]?.people ?? 1,
      rods: seeking.was[index]?.rods ?? 1,
    }));
    const wanted = { bookingId: chooser.booking.id, lakeId: seeking.lake.id, ...hours, turnaroundMinutes };
    const taking = takePegs(tx, { ...wanted, state: 'taken', pegs });
    const lost = await orConflict(taking, 'peg_time_lake_room', 'The lake has no room left that day');
    if (lost.length === 0) {
      await keepMoved(ctx, chooser, { hours, pegIds, to });
      return { numbers: await pegNumbers(tx, pegIds), hours };
    }
    await freePegs(tx, chooser.booking.id);
  }
  throw await full(ctx, seeking, type ? seeking.lake.name : undefined);
}

async function full({ tx }: Ctx, seeking: Seeking, lakeName?: string): Promise<Problem> {
  const left = await daysWithRoom(tx, seeking);
  return new Problem('conflict', `${lakeName ?? seeking.lake.name} is full that day`, {
    detail:
      left.length > 0
        ? 'Somebody was quicker. Choose one of the days that are left.'
        : 'No other day has room. Choose another way.',
    errors: left.slice(0, 5).map((place: PlaceOffered) => ({ pointer: '/day', detail: place.words })),
  });
}

async function keepMoved(
  ctx: Ctx,
  { booking, choice, outcome }: Chooser,
  moved: { hours: Interval; pegIds: (string | null)[]; to: To },
): Promise<void> {
  const { tx, now } = ctx;
  const { hours, pegIds, to } = moved;
  const { seeking, day, type } = to;
  await tx.update(
    Booking,
    { id: booking.id },
    {
      status: 'confirmed',
      lakeId: seeking.lake.id,
      ...(type ? { ticketTypeId: type.id } : {}),
      during: rangeOf(hours.from, hours.until),
      grossPence: to.grossPence,
      details: detailsMoved(booking.details, { day, start: seeking.start, pegIds, type }),
      version: booking.version + 1,
    },
  );
  const kind = type ? 'move_lake' : 'move_date';
  await tx.update(ClosureChoice, { id: choice.id }, { choice: kind, chosenBy: 'angler', chosenAt: now });
  await writeEvent(ctx, booking.id, {
    kind: 'moved',
    told: {
      closureId: choice.closureId,
      from: { lakeId: outcome.lakeId, from: outcome.from, until: outcome.until, pegs: outcome.was },
      to: { lakeId: seeking.lake.id, ...hours, pegIds },
      reason: 'closure',
    },
  });
}

/** What was asked stays with the choice, so that the same sent again is known. */
async function keepAsked(
  { tx }: Ctx,
  choiceId: string,
  kept: { asked: Choose; words: string },
): Promise<void> {
  await tx.query('UPDATE closure_choice SET outcome = outcome || $2::jsonb WHERE id = $1', [choiceId, kept]);
}
