import { lodgeDetails } from '@mereward/api/bookings/service';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { randomUUID } from 'node:crypto';
import type { TestServer } from './server';

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
