import { Booking } from '@mereward/db/entities/bookings/booking';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { Closure } from '@mereward/db/entities/closures/closure';
import type { ClosureDetails } from '@mereward/shared/closures/contract';
import { randomUUID } from 'node:crypto';
import type { TestServer } from './server';
import { aTicket } from './tickets';
import type { TestFishery } from './waters';

type Hours = { from: Date; until: Date };
type Wishes = Hours & { pegId: string; holder: { id: string; name?: string } };

/** A hold on a peg as rows, good until an instant; answers the booking’s id. */
export async function aHold(test: TestServer, wishes: Wishes & { holdUntil: Date }): Promise<string> {
  const id = await aTicket(test, wishes);
  const { manager } = test.server.source;
  await manager.update(Booking, { id }, { status: 'hold', holdUntil: wishes.holdUntil });
  await manager.update(PegTime, { bookingId: id }, { state: 'held' });
  return id;
}

type Shut = Partial<ClosureDetails> & { lakeIds: string[]; pegIds: string[]; from: string };

/** A closure as rows, with the pegs it closes in the calendar. */
export async function aClosure(test: TestServer, here: TestFishery, wishes: Shut): Promise<string> {
  const id = randomUUID();
  const { lakeIds, pegIds, ...rest } = wishes;
  const { manager } = test.server.source;
  const details: ClosureDetails = {
    scope: { kind: 'pegs', pegIds },
    reason: 'works',
    effect: 'block',
    until: null,
    publicWords: 'Closed for works',
    liftConditions: [],
    ...rest,
  };
  const during = `[${details.from},${details.until ?? ''})`;
  await manager.insert(Closure, {
    id,
    fisheryId: here.id,
    lakeIds,
    reason: details.reason,
    effect: details.effect,
    during,
    details,
    decidedBy: here.people.manager.id,
    decidedAt: test.server.clock(),
    version: 1,
  });
  for (const pegId of pegIds)
    await manager.insert(PegTime, {
      lakeId: lakeIds[0] ?? '',
      pegId,
      during,
      lane: '0',
      state: 'closed',
      closureId: id,
    });
  return id;
}
