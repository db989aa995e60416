import { lodgeDetails } from '@mereward/api/bookings/service';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { TicketType as TicketTypeDetails } from '@mereward/shared/tickets/contract';
import {
  BookingView,
  type BookedTicket,
  type BookForSomebody,
  type FillInBooking,
  type HoldPegs,
} from '@mereward/shared/bookings/contract';
import { Payment } from '@mereward/db/entities/payments/payment';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import type { TestServer } from './server';
import type { TestFishery } from './waters';

type Wishes = {
  pegId: string;
  holder: { id: string; name?: string };
  from: string | Date;
  until: string | Date;
};

/** A confirmed ticket as rows, for tests that need one to be there; answers its id. */
export async function aTicket(test: TestServer, { pegId, holder, from, until }: Wishes): Promise<string> {
  const { manager } = test.server.source;
  const { lakeId } = await manager.findOneByOrFail(Peg, { id: pegId });
  const { fisheryId } = await manager.findOneByOrFail(Lake, { id: lakeId });
  const id = randomUUID();
  const during = `[${new Date(from).toISOString()},${new Date(until).toISOString()})`;
  await manager.insert(Booking, {
    id,
    fisheryId,
    lakeId,
    accountId: holder.id,
    holderName: holder.name ?? 'Somebody',
    during,
    status: 'confirmed',
    people: 1,
    rods: 1,
    grossPence: 0,
    currency: 'GBP',
    source: 'office',
    details: lodgeDetails(during.slice(1, 11)),
    writtenBy: holder.id,
    writtenAt: test.server.clock(),
    version: 1,
  });
  await manager.insert(PegTime, {
    lakeId,
    pegId,
    during,
    state: 'taken',
    bookingId: id,
    people: 1,
    rods: 1,
  });
  return id;
}

/** A kind of ticket that is sold for a lake; what is wished goes over the day ticket of the templates. */
export async function aTicketType(
  test: TestServer,
  lake: { id: string; fisheryId: string },
  wishes: Partial<TicketTypeDetails> = {},
): Promise<{ id: string; details: TicketTypeDetails }> {
  const { manager } = test.server.source;
  const { createdBy } = await manager.findOneByOrFail(Lake, { id: lake.id });
  const id = randomUUID();
  const name = `${wishes.name ?? TICKET_TEMPLATES.day.name} ${id.slice(0, 8)}`;
  const details: TicketTypeDetails = { ...TICKET_TEMPLATES.day, lakeIds: [lake.id], ...wishes, name };
  const createdAt = test.server.clock();
  const row = { id, fisheryId: lake.fisheryId, details, version: 1, withdrawnAt: null, createdBy, createdAt };
  await manager.insert(TicketType, row);
  return { id, details };
}

type HoldWishes = { ticketTypeId: string; lakeId: string; day: string; start?: string | null };

/** What a phone sends to hold some pegs, one ticket on each. */
export const aHold = (
  { ticketTypeId, lakeId, day, start = null }: HoldWishes,
  pegIds: readonly (string | null)[],
  ticket: Partial<BookedTicket> = {},
): HoldPegs => ({
  id: randomUUID(),
  lakeId,
  day,
  start,
  tickets: pegIds.map((pegId, index) => ({
    ticketTypeId,
    pegId,
    rods: 2,
    people: 1,
    kind: index === 0 ? 'holder' : 'guest',
    name: '',
    bornOn: null,
    ...ticket,
  })),
});

/** What is filled in of an adult with a licence. */
export const filledIn = (version: number, wishes: Partial<FillInBooking> = {}): FillInBooking => ({
  version,
  tickets: [{ name: 'Sofia Marsh', bornOn: '1988-05-02' }],
  guardian: null,
  vehicle: 'WE27 OST',
  emergencyContact: 'Jo Marsh, 01632 960 002',
  licence: { held: true, lastSix: '4F7K2M', expiresOn: null },
  note: '',
  ...wishes,
});

/** A ticket written by the office for somebody. */
export async function bookedFor(
  here: TestFishery,
  hold: HoldPegs,
  holder: BookForSomebody['holder'] = { name: 'Ned Bray', email: null },
): Promise<BookingView> {
  const body: BookForSomebody = { ...hold, holder, vehicle: 'WE27 OST', note: '' };
  const answer = await here.people.office.post(`/fisheries/${here.id}/bookings`).send(body);
  return BookingView.parse(answer.body);
}

/** A payment in cash as a row: what it does to the books is the payments’ own test. */
export const paidInCash = (
  test: TestServer,
  here: TestFishery,
  { bookingId, amountPence }: { bookingId: string; amountPence: number },
) =>
  test.server.source.manager.insert(Payment, {
    id: randomUUID(),
    fisheryId: here.id,
    bookingId,
    method: 'cash',
    amountPence,
    currency: 'GBP',
    status: 'captured',
    madeBy: here.people.office.id,
    madeAt: test.server.clock(),
    takenAt: test.server.clock(),
    fault: '',
  });
