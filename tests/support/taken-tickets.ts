import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { Payment } from '@mereward/db/entities/payments/payment';
import type { TicketType as TicketTypeDetails } from '@mereward/shared/tickets/contract';
import { randomUUID } from 'node:crypto';
import type { Person } from './people';
import type { TestServer } from './server';
import { aTicket } from './tickets';
import type { TestFishery, TestLake, TestPeg } from './waters';

/** A kind of ticket as rows. Story prices unless told otherwise: a day of 07:00–19:00, two rods, VAT 20 %. */
export async function aTicketType(
  test: TestServer,
  fishery: TestFishery,
  wishes: Partial<TicketTypeDetails> & { lakeIds: string[]; name: string; pricePence: number },
): Promise<{ id: string; details: TicketTypeDetails }> {
  const { pricePence, ...given } = wishes;
  const details: TicketTypeDetails = {
    description: '',
    audience: 'public',
    duration: { kind: 'fixed_hours', starts: '07:00', ends: '19:00' },
    pegChoice: 'book_a_peg',
    pegIds: null,
    currency: 'GBP',
    prices: [
      {
        fromDay: '2027-01-01',
        pricePence,
        extraRodPence: 400,
        extraPersonPence: 0,
        vatCode: pricePence === 0 ? 'outside_scope' : 'standard',
        vatRateBp: pricePence === 0 ? 0 : 2000,
      },
    ],
    rodsIncluded: 2,
    rodsMost: 3,
    peopleMost: 1,
    leastNoticeHours: 0,
    mostNoticeDays: 365,
    mostNightsInARow: null,
    restHours: 0,
    mostBookings: null,
    turnaroundMinutes: 0,
    ages: { leastAge: null, mostAge: null, guardianBelowAge: null },
    concessionProof: '',
    needs: { rodLicence: false, vehicle: false, emergencyContact: false },
    firstDay: null,
    lastDay: null,
    ...given,
  };
  const id = randomUUID();
  await test.server.source.manager.insert(TicketType, {
    id,
    fisheryId: fishery.id,
    details,
    version: 1,
    withdrawnAt: null,
    createdBy: fishery.people.owner.id,
    createdAt: test.server.clock(),
  });
  return { id, details };
}

type Sold = {
  fishery: TestFishery;
  lake: TestLake;
  peg: TestPeg;
  holder: Person;
  type: { id: string; details: TicketTypeDetails };
  from: string;
  until: string;
  day: string;
  start: string | null;
  paidPence: number;
};

/** A confirmed booking of a kind of ticket with what was paid for it, as rows; answers its id. */
export async function aPaidTicket(test: TestServer, sold: Sold): Promise<string> {
  const { peg, holder, type, from, until, day, start, paidPence } = sold;
  const { manager } = test.server.source;
  const id = await aTicket(test, { pegId: peg.id, holder, from, until });
  const booking = await manager.findOneByOrFail(Booking, { id });
  await manager.update(
    Booking,
    { id },
    {
      ticketTypeId: type.id,
      holderEmail: holder.email,
      grossPence: paidPence,
      rods: 2,
      details: {
        ...booking.details,
        ticketName: type.details.name,
        day,
        start,
        turnaroundMinutes: type.details.turnaroundMinutes,
        tickets: [
          {
            ticketTypeId: type.id,
            pegId: peg.id,
            rods: 2,
            people: 1,
            kind: 'holder',
            name: holder.name,
            bornOn: null,
          },
        ],
      },
    },
  );
  if (paidPence > 0)
    await manager.insert(Payment, {
      id: randomUUID(),
      fisheryId: sold.fishery.id,
      bookingId: id,
      method: 'card_online',
      amountPence: paidPence,
      currency: 'GBP',
      status: 'captured',
      providerSession: null,
      providerIntent: `pi_${id}`,
      pageUrl: null,
      madeBy: holder.id,
      madeAt: test.server.clock(),
      takenAt: test.server.clock(),
      lookedAt: null,
      fault: '',
    });
  return id;
}
