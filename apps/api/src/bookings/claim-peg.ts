import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { BookedTicket } from '@mereward/shared/bookings/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { findLake } from '../lakes/found';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { allow, lockBooking } from './access';
import { refuseUnlet } from './let-faults';
import { letGoOfExpired } from './let-go';
import { refuseOutside } from './on-the-bank';
import { placePegs } from './place-pegs';
import { noStep, step, type Stay } from './stay';

/** A peg for a ticket that chooses on arrival: from now to its end. The first to claim has it. */
export async function claimPeg(ctx: Ctx, bookingId: string, pegId: string): Promise<void> {
  const { stay, standing, zone } = await lockBooking(ctx, bookingId);
  allow(standing.holder || standing.checks, 'its holder and the bailiffs');
  const { tickets } = stay.details;
  if (tickets.some((ticket) => ticket.pegId === pegId)) return;
  if (stay.status !== 'confirmed' && stay.status !== 'checked_in') throw noStep(stay.status);
  refuseOutside(stay, ctx.now);
  const index = tickets.findIndex((ticket) => ticket.pegId === null);
  const ticket = tickets[index];
  if (!ticket || stay.lakeId === null)
    throw new Problem('conflict', 'Every ticket of this booking has its peg', {
      detail: 'Ask the bailiff if you want to move.',
    });
  const lake = await findLake(ctx.tx, stay.lakeId);
  await takeClaimed(ctx, stay, { lake, zone, ticket: { ...ticket, pegId } });
  const details = {
    ...stay.details,
    tickets: tickets.map((each, at) => (at === index ? { ...each, pegId } : each)),
  };
  await step(ctx, stay, { to: stay.status, kind: 'peg-claimed', change: { details }, told: { pegId } });
}

type Claimed = { lake: Lake; zone: string; ticket: BookedTicket };

async function takeClaimed(ctx: Ctx, stay: Stay, { lake, zone, ticket }: Claimed): Promise<void> {
  const { tx, now } = ctx;
  const peg = await tx.findOneBy(Peg, { id: ticket.pegId ?? '', lakeId: lake.id });
  if (!peg) throw notFound('peg on this lake');
  const type = await tx.findOneBy(TicketType, { id: ticket.ticketTypeId });
  if (type?.details.pegIds && !type.details.pegIds.includes(peg.id))
    throw new Problem('conflict', `“${type.details.name}” is not sold for peg ${peg.number}`, {
      detail: 'Choose another peg.',
    });
  const hours = { from: now, until: stay.until };
  await refuseUnlet(ctx, { fisheryId: lake.fisheryId, zone, lake, hours, season: false, pegs: [peg] });
  await letGoOfExpired(ctx, lake.id);
  await tx.query(
    `DELETE FROM peg_time WHERE id = (
       SELECT id FROM peg_time WHERE booking_id = $1 AND peg_id IS NULL AND people = $2 AND rods = $3 LIMIT 1)`,
    [stay.id, ticket.people, ticket.rods],
  );
  const { turnaroundMinutes } = stay.details;
  const tickets = [{ ticket, peg }];
  await placePegs(ctx, { bookingId: stay.id, lake, zone, hours, turnaroundMinutes, state: 'taken', tickets });
}
