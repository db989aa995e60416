import type { BookingDetails, MoveBooking } from '@mereward/shared/bookings/contract';
import { whyNotMove, type MoveCause } from '@mereward/shared/bookings/moving';
import { Problem } from '@mereward/shared/problems/problem';
import { isDeepStrictEqual } from 'node:util';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { staleVersion } from '../repeat';
import { allow, lockBooking } from './access';
import { refuseUnlet } from './let-faults';
import { letGoOfExpired } from './let-go';
import { occasionOf, type Wanted } from './occasion';
import { freePegs } from './peg-calendar';
import { placePegs } from './place-pegs';
import { postMoved } from './post-ticket';
import { refuseFaulty, sellFaults } from './sell-faults';
import { step, type Stay } from './stay';
import { tellTomorrowLater } from './tell-ahead';
import { ticketPaper } from './ticket-paper';
import { placeWords, zonedWords } from './ticket-words';

/** The same tickets at another time or on other pegs. It keeps its id, its code and its price. */
export async function moveBooking(ctx: Ctx, bookingId: string, input: MoveBooking): Promise<void> {
  const { tx, now } = ctx;
  const { stay, standing } = await lockBooking(ctx, bookingId);
  allow(standing.holder || standing.moves, 'its holder, the office and the head bailiff');
  const { tickets } = stay.details;
  if (tickets.length === 0)
    throw new Problem('conflict', 'This ticket has no kind and can’t be moved', {
      detail: 'Cancel it and write another.',
    });
  if (tickets.length !== input.pegIds.length)
    throw new Problem('invalid', 'Choose a peg for every ticket', {
      detail: `This booking has ${tickets.length} ${tickets.length === 1 ? 'ticket' : 'tickets'}.`,
      errors: [{ pointer: '/pegIds', detail: 'One for each ticket, in their order.' }],
    });
  const wanted = {
    lakeId: input.lakeId,
    day: input.day,
    start: input.start,
    tickets: tickets.map((ticket, index) => ({ ...ticket, pegId: input.pegIds[index] ?? null })),
  };
  if (isThere(stay, wanted)) return;
  if (stay.version !== input.version) throw staleVersion();
  const cause: MoveCause = standing.holder ? 'angler' : 'staff';
  const { from: start, until, status: state } = stay;
  const moved = { state, start, until, movesMade: await movesMade(tx, bookingId), relet: false };
  const fault = whyNotMove(stay.details.cancellation, cause, { ...moved, now });
  if (fault)
    throw new Problem('conflict', fault, { detail: 'It stays as it is. You may cancel it instead.' });
  const was = await ticketPaper(ctx, bookingId);
  await moveTo(ctx, stay, { wanted, cause, reason: input.reason });
  await tellTomorrowLater(ctx, bookingId);
  await postMoved(ctx, bookingId, {
    was: `${placeWords(was)}, ${zonedWords(was.from, was.zone)}`,
    reason: input.reason,
    byHolder: standing.holder,
  });
}

const isThere = ({ lakeId, details }: Stay, { lakeId: to, day, start, tickets }: Wanted): boolean =>
  isDeepStrictEqual(
    { lakeId, day: details.day, start: details.start, tickets: details.tickets },
    { lakeId: to, day, start, tickets: [...tickets] },
  );

async function movesMade(tx: EntityManager, bookingId: string): Promise<number> {
  const rows: { moves: number }[] = await tx.query(
    `SELECT count(*)::int AS moves FROM booking_event
      WHERE booking_id = $1 AND kind = 'moved' AND told->>'cause' = 'angler'`,
    [bookingId],
  );
  return rows[0]?.moves ?? 0;
}

export type Move = {
  wanted: Wanted;
  cause: MoveCause;
  reason: string;
  details?: Partial<BookingDetails>; // what else changes of what it says of itself
};

/**
 * Puts a locked booking elsewhere, everything about the new place looked at as for a new one; its old pegs are free at
 * once, and nothing is kept if the new ones can't be had. One that was choosing is a ticket again.
 */
export async function moveTo(ctx: Ctx, stay: Stay, { wanted, cause, reason, details }: Move): Promise<Stay> {
  const { tx, now } = ctx;
  const occasion = await occasionOf(ctx, wanted, { sold: true });
  if (occasion.fisheryId !== stay.fisheryId)
    throw new Problem('invalid', 'This lake belongs to another fishery', {
      detail: 'A ticket moves within its own fishery.',
      errors: [{ pointer: '/lakeId', detail: 'Not a lake of this fishery.' }],
    });
  await refuseUnlet(ctx, { ...occasion, pegs: occasion.tickets.map(({ peg }) => peg) });
  const buyer = { accountId: stay.accountId, name: stay.holderName, bookingId: stay.id, said: stay.details };
  const leniency = cause === 'angler' ? 'asked_later' : 'office';
  refuseFaulty(await sellFaults(ctx, occasion, { buyer, leniency }));
  await letGoOfExpired(ctx, occasion.lake.id);
  await freePegs(tx, stay.id);
  // Of a stay that has begun only what is left is wanted on the new peg.
  const hours = { from: occasion.hours.from < now ? now : occasion.hours.from, until: occasion.hours.until };
  if (!occasion.season) await placePegs(ctx, { ...occasion, hours, bookingId: stay.id, state: 'taken' });
  const { from, until } = occasion.hours;
  const next: BookingDetails = {
    ...stay.details,
    day: occasion.day,
    start: occasion.start,
    tickets: [...wanted.tickets],
    turnaroundMinutes: occasion.turnaroundMinutes,
    ...details,
  };
  return step(ctx, stay, {
    to: stay.status === 'choosing' ? 'confirmed' : stay.status,
    kind: 'moved',
    change: { from, until, lakeId: occasion.lake.id, details: next },
    told: {
      cause,
      reason,
      was: placeOf(stay),
      is: placeOf({ from, until, lakeId: occasion.lake.id, details: next }),
    },
  });
}

const placeOf = ({ from, until, lakeId, details }: Pick<Stay, 'from' | 'until' | 'lakeId' | 'details'>) => ({
  from: from.toISOString(),
  until: until.toISOString(),
  lakeId,
  pegIds: details.tickets.map(({ pegId }) => pegId),
});
