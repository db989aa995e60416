import { freePegs, takePegs, type PegsWanted } from '@mereward/api/bookings/peg-calendar';
import { brokenConstraint } from '@mereward/api/conflict';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { Closure } from '@mereward/db/entities/closures/closure';
import { PaymentsAndLedger1780000021000 } from '@mereward/db/migrations/1780000021000-PaymentsAndLedger';
import { FreedPegs1780000031000 } from '@mereward/db/migrations/1780000031000-FreedPegs';
import { RulesNoticesAndWaiting1780000022000 } from '@mereward/db/migrations/1780000022000-RulesNoticesAndWaiting';
import { TicketsAndPegTime1780000020000 } from '@mereward/db/migrations/1780000020000-TicketsAndPegTime';
import { BOOKING_CODES, bookingCode, readBookingCode } from '@mereward/shared/bookings/booking-code';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  lake = await aLake(server, here);
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (wishes: Parameters<typeof aPeg>[2] = {}, on = lake): Promise<TestPeg> =>
  aPeg(server, on, { number: `K${(pegs += 1)}`, ...wishes });
const noon = (day: number) => new Date(Date.UTC(2027, 6, day, 11));

/** A booking without pegs yet, so that the calendar can be asked for some. */
async function aBooking(from: Date, until: Date): Promise<string> {
  const peg = await freshPeg();
  const id = await aTicket(server, { pegId: peg.id, holder: here.people.angler, from, until });
  await freePegs(server.server.source.manager, id);
  return id;
}

const ask = async (wanted: Partial<PegsWanted> & Pick<PegsWanted, 'pegs'>): Promise<string[]> => {
  const bookingId = await aBooking(wanted.from ?? noon(10), wanted.until ?? noon(11));
  const ready: PegsWanted = {
    bookingId,
    lakeId: lake.id,
    from: noon(10),
    until: noon(11),
    turnaroundMinutes: 60,
    state: 'held',
    ...wanted,
  };
  return server.server.source.transaction((tx) => takePegs(tx, ready));
};
const one = (peg: TestPeg, people = 1, rods = 2) => [{ pegId: peg.id, people, rods }];

async function close(peg: TestPeg, from: Date, until: Date | null): Promise<void> {
  const id = randomUUID();
  const during = `[${from.toISOString()},${until?.toISOString() ?? ''})`;
  const { manager } = server.server.source;
  await manager.insert(Closure, {
    id,
    fisheryId: here.id,
    lakeIds: [lake.id],
    reason: 'works',
    effect: 'block',
    during,
    details: {
      scope: { kind: 'pegs', pegIds: [peg.id] },
      reason: 'works',
      effect: 'block',
      from: from.toISOString(),
      until: until?.toISOString() ?? null,
      publicWords: 'Closed for works',
      liftConditions: [],
    },
    decidedBy: here.people.manager.id,
    decidedAt: server.server.clock(),
    version: 1,
  });
  await manager.insert(PegTime, {
    lakeId: lake.id,
    pegId: peg.id,
    during,
    lane: '0',
    state: 'closed',
    closureId: id,
  });
}

const constraintOf = async (deed: Promise<unknown>): Promise<string | null> => {
  try {
    await deed;
  } catch (error) {
    return brokenConstraint(error);
  }
  return null;
};

describe('a peg in the calendar', () => {
  test('is taken once, turnaround and all, and free again from its end', async () => {
    const peg = await freshPeg();
    expect(await ask({ pegs: one(peg) })).toEqual([]);
    const halfPast = new Date(noon(11).getTime() + 30 * 60_000);
    expect(await ask({ pegs: one(peg), from: halfPast, until: noon(12) })).toEqual([peg.id]);
    const anHour = new Date(noon(11).getTime() + 60 * 60_000);
    expect(await ask({ pegs: one(peg), from: anHour, until: noon(12) })).toEqual([]);
  });

  test('that is closed is not let, may be closed twice over, and can’t be closed over a ticket', async () => {
    const peg = await freshPeg();
    await close(peg, noon(10), noon(12));
    await close(peg, noon(11), null);
    expect(await ask({ pegs: one(peg) })).toEqual([peg.id]);
    expect(await ask({ pegs: one(peg), from: noon(20), until: noon(21) })).toEqual([peg.id]);
    expect(await ask({ pegs: one(peg), from: noon(8), until: noon(9) })).toEqual([]);
    expect(await constraintOf(close(peg, noon(8), noon(9)))).toBe('peg_time_once');
  });

  test('of fifty who ask at once for two pegs in either order, one gets both and nobody one', async () => {
    const [a, b] = [await freshPeg(), await freshPeg()];
    const both = [...one(a), ...one(b)];
    const asked = Array.from({ length: 50 }, (_, i) =>
      constraintOrTaken(ask({ pegs: i % 2 ? both : both.toReversed() })),
    );
    const answers = await Promise.all(asked);
    expect(answers.filter((each) => each === 'got')).toHaveLength(1);
    expect(answers.filter((each) => each !== 'got' && each !== 'taken')).toEqual([]);
  });

  test('holds no more people and rods than it has room for', async () => {
    const peg = await freshPeg({ people: 1, rods: 3 });
    expect(await constraintOf(ask({ pegs: one(peg, 2, 2) }))).toBe('peg_time_peg_room');
    expect(await constraintOf(ask({ pegs: one(peg, 1, 4) }))).toBe('peg_time_peg_room');
  });

  test('let by place is shared up to its room, and the last place goes to one of two at once', async () => {
    const peg = await freshPeg({ people: 3, rods: 6, letting: 'by_place' });
    expect(await ask({ pegs: one(peg) })).toEqual([]);
    expect(await ask({ pegs: one(peg), from: noon(9), until: noon(12) })).toEqual([]);
    const last = await Promise.all([1, 2].map(() => constraintOf(ask({ pegs: one(peg) }))));
    expect(last.sort()).toEqual(['peg_time_peg_room', null].sort());
    await constraintOf(close(peg, noon(10), noon(11))).then((name) => expect(name).toBe('peg_time_once'));
  });
});

const constraintOrTaken = async (deed: Promise<string[]>): Promise<string> => {
  const taken = await deed.then(
    (ids) => (ids.length === 0 ? 'got' : 'taken'),
    (error) => brokenConstraint(error) ?? String(error),
  );
  return taken;
};

describe('a lake’s room', () => {
  test('counts everybody there at the same moment, whether a peg is chosen or not', async () => {
    const small = await aLake(server, here, { name: 'Small Water', maxPeople: 2 });
    const peg = await freshPeg({}, small);
    const rover = [{ pegId: null, people: 1, rods: 2 }];
    expect(await ask({ lakeId: small.id, pegs: one(peg) })).toEqual([]);
    expect(await ask({ lakeId: small.id, pegs: rover, from: noon(11), until: noon(12) })).toEqual([]);
    const atOnce = await Promise.all(
      Array.from({ length: 6 }, () => constraintOf(ask({ lakeId: small.id, pegs: rover }))),
    );
    expect(atOnce.filter((each) => each === null)).toHaveLength(1);
    expect(atOnce.filter((each) => each === 'peg_time_lake_room')).toHaveLength(5);
  });
});

test('the database draws codes as they are read', async () => {
  for (const drawn of [0, 1, 22, 23, 4711, BOOKING_CODES - 1]) {
    const rows: unknown = await server.server.source.query('SELECT booking_code_of($1) AS code', [drawn]);
    expect(rows).toEqual([{ code: bookingCode(drawn) }]);
  }
});

test('tickets from before the calendar keep their peg, and going back keeps them too', async () => {
  const peg = await freshPeg();
  const id = await aTicket(server, {
    pegId: peg.id,
    holder: here.people.angler,
    from: noon(1),
    until: noon(2),
  });
  const q = server.server.source.createQueryRunner();
  const migrations = [
    new TicketsAndPegTime1780000020000(),
    new PaymentsAndLedger1780000021000(),
    new RulesNoticesAndWaiting1780000022000(),
    new FreedPegs1780000031000(),
  ];
  for (const each of migrations.toReversed()) await each.down(q);
  const before: unknown = await q.query('SELECT peg_id, status FROM booking WHERE id = $1', [id]);
  expect(before).toEqual([{ peg_id: peg.id, status: 'confirmed' }]);
  for (const each of migrations) await each.up(q);
  await q.release();
  const { manager } = server.server.source;
  const row = await manager.findOneByOrFail(Booking, { id });
  expect(row).toMatchObject({ fisheryId: here.id, lakeId: lake.id, status: 'confirmed', source: 'office' });
  expect(readBookingCode(row.code)).toBe(row.code);
  expect(row.details).toMatchObject({ ticketName: 'Ticket from the lodge', day: '2027-07-01' });
  expect(await manager.findOneBy(PegTime, { bookingId: id })).toMatchObject({
    pegId: peg.id,
    state: 'taken',
  });
});
