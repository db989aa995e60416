import { takesPeg } from '@mereward/shared/bookings/booking-state';
import type { BookingState } from '@mereward/shared/bookings/booking-state';
import { BookingView, type BookedTicket } from '@mereward/shared/bookings/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import fc from 'fast-check';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, filledIn } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let anglers: Person[];

const MORNING = Date.parse('2027-07-10T06:00:00Z');

beforeAll(async () => {
  ({ server, here } = await aLakeGround());
  server.setNow(new Date(MORNING));
  anglers = await Promise.all(['Ann Oak', 'Ben Ash', 'Cal Elm'].map((name) => aPerson(server, { name })));
});
afterAll(() => server.close());

const FREE = [
  {
    fromDay: '2026-01-01',
    pricePence: 0,
    extraRodPence: 0,
    extraPersonPence: 0,
    vatCode: 'standard',
    vatRateBp: 2000,
  },
] as const;

let waters = 0;

type Ground = { lake: TestLake; pegs: TestPeg[]; day: { id: string }; rover: { id: string } };

/** Two pegs let whole, one let by place, in a lake with room for four. */
async function aGround(): Promise<Ground> {
  const lake = await aLake(server, here, { name: `Any Water ${(waters += 1)}`, maxPeople: 4, maxRods: 9 });
  const pegs = [
    await aPeg(server, lake, { number: 'A1', people: 2, rods: 4 }),
    await aPeg(server, lake, { number: 'A2' }),
    await aPeg(server, lake, { number: 'A3', people: 2, rods: 4, letting: 'by_place' }),
  ];
  const open = {
    prices: [...FREE],
    duration: { kind: 'fixed_hours', starts: '07:00', ends: '19:00' } as const,
    turnaroundMinutes: 30,
  };
  const day = await aTicketType(server, lake, { ...TICKET_TEMPLATES.day, ...open });
  const pegChoice = 'book_the_lake_choose_on_arrival' as const;
  const rover = await aTicketType(server, lake, { ...TICKET_TEMPLATES.day, ...open, pegChoice });
  return { lake, pegs, day, rover };
}

const DAYS = ['2027-07-10', '2027-07-11'];

const deeds = fc.record({
  kind: fc.constantFrom(
    'hold',
    'hold',
    'hold',
    'rove',
    'confirm',
    'confirm',
    'let-go-hold',
    'cancel',
    'move',
    'claim',
    'check-in',
    'finish',
    'no-show',
    'let-go',
    'wait',
    'jobs',
  ),
  which: fc.nat({ max: 30 }),
  peg: fc.nat({ max: 2 }),
  two: fc.boolean(),
  day: fc.nat({ max: 1 }),
  rods: fc.integer({ min: 1, max: 3 }),
  minutes: fc.constantFrom(5, 11, 45, 130),
  beside: fc.boolean(), // asked at the same moment as the next
});
type Deed = typeof deeds extends fc.Arbitrary<infer D> ? D : never;

type Run = { ground: Ground; made: { id: string; who: Person }[]; now: number };

async function act(run: Run, deed: Deed): Promise<number> {
  const { ground, made } = run;
  const { lake, pegs, day, rover } = ground;
  const who = anglers[deed.which % anglers.length];
  const pegId = pegs[deed.peg]?.id ?? null;
  const on = DAYS[deed.day] ?? '';
  const { bailiff, office } = here.people;
  if (!who) throw new Error('there are anglers');
  if (deed.kind === 'hold' || deed.kind === 'rove') {
    const pegIds =
      deed.kind === 'rove' ? [null] : deed.two ? [pegId, pegs[(deed.peg + 1) % 3]?.id ?? null] : [pegId];
    const type = deed.kind === 'rove' ? rover : day;
    const body = aHold({ ticketTypeId: type.id, lakeId: lake.id, day: on }, pegIds, { rods: deed.rods });
    made.push({ id: body.id, who });
    return (await who.post('/bookings').send(body)).status;
  }
  if (deed.kind === 'wait') {
    server.setNow(new Date((run.now += deed.minutes * 60_000)));
    return 200;
  }
  if (deed.kind === 'jobs') return 200;
  const chosen = made[deed.which % Math.max(1, made.length)];
  if (!chosen) return 200;
  const at = `/bookings/${chosen.id}`;
  switch (deed.kind) {
    case 'confirm': {
      const seen = await chosen.who.get(at);
      if (seen.status !== 200) return seen.status;
      const { version, details } = BookingView.parse(seen.body);
      const tickets = details.tickets.map((_: BookedTicket, i: number) => ({
        name: `Angler ${i}`,
        bornOn: null,
      }));
      await chosen.who.put(`${at}/details`).send(filledIn(version, { tickets }));
      return (await chosen.who.post(`${at}/confirm`)).status;
    }
    case 'let-go-hold':
      return (await chosen.who.delete(`${at}/hold`)).status;
    case 'cancel':
      return (await (deed.two ? office : chosen.who).delete(at)).status;
    case 'move': {
      const seen = await chosen.who.get(at);
      if (seen.status !== 200) return seen.status;
      const { version, details } = BookingView.parse(seen.body);
      const pegIds = details.tickets.map(
        (ticket: BookedTicket, i: number) => ticket.pegId && (pegs[(deed.peg + i) % 3]?.id ?? null),
      );
      const body = { version, day: on, start: null, lakeId: lake.id, pegIds, reason: '' };
      return (await office.post(`${at}/move`).send(body)).status;
    }
    case 'claim':
      return (await bailiff.post(`${at}/claim`).send({ pegId })).status;
    case 'check-in':
    case 'finish':
    case 'no-show':
    case 'let-go':
      return (await bailiff.post(`${at}/${deed.kind}`)).status;
  }
}

type Kept = { id: string; status: BookingState; tickets: BookedTicket[]; letGo: boolean; rows: number };

/** What must be so whatever was done: rows where a peg is taken and nowhere else, and never more than there is room for. */
async function refuseWrong({ lake }: Ground): Promise<void> {
  const { source } = server.server;
  const bookings: Kept[] = await source.query(
    `SELECT b.id, b.status, b.details->'tickets' AS tickets,
            EXISTS (SELECT 1 FROM booking_event e WHERE e.booking_id = b.id AND e.kind = 'peg-let-go') AS "letGo",
            (SELECT count(*)::int FROM peg_time t WHERE t.booking_id = b.id) AS rows
       FROM booking b WHERE b.lake_id = $1`,
    [lake.id],
  );
  for (const { id, status, tickets, letGo, rows } of bookings) {
    if (status === 'completed') continue; // what is left is its turnaround
    const onPegs = new Set(tickets.flatMap(({ pegId }) => pegId ?? [])).size;
    const roving = tickets.filter(({ pegId }) => pegId === null).length;
    expect({ id, status, rows }).toEqual({ id, status, rows: takesPeg(status, letGo) ? onPegs + roving : 0 });
  }
  const wrongState: unknown = await source.query(
    `SELECT b.status, t.state FROM peg_time t JOIN booking b ON b.id = t.booking_id
      WHERE t.lake_id = $1 AND (t.state = 'held') <> (b.status IN ('hold', 'pending_payment'))`,
    [lake.id],
  );
  expect(wrongState).toEqual([]);
  const twice: unknown = await source.query(
    `SELECT p.number FROM peg_time a JOIN peg_time b ON a.peg_id = b.peg_id AND a.id < b.id AND a.during && b.during
       JOIN peg p ON p.id = a.peg_id WHERE a.lake_id = $1 AND p.details->>'letting' IS DISTINCT FROM 'by_place'`,
    [lake.id],
  );
  expect(twice).toEqual([]);
  const crowded: unknown = await source.query(
    `WITH fishing AS (
       SELECT t.id, t.peg_id, tstzrange(lower(during), upper(during) - turnaround) AS during, people, rods FROM peg_time t WHERE lake_id = $1),
     moments AS (
       SELECT s.peg_id, sum(f.people) AS people, sum(f.rods) AS rods,
              (SELECT sum(l.people) FROM fishing l WHERE l.during @> lower(s.during)) AS all_people,
              (SELECT sum(l.rods) FROM fishing l WHERE l.during @> lower(s.during)) AS all_rods
         FROM fishing s JOIN fishing f ON f.peg_id IS NOT DISTINCT FROM s.peg_id AND f.during @> lower(s.during)
        GROUP BY s.id, s.peg_id, s.during)
     SELECT m.* FROM moments m LEFT JOIN peg p ON p.id = m.peg_id
      WHERE m.all_people > 4 OR m.all_rods > 9 OR m.people > (p.details->>'people')::int OR m.rods > (p.details->>'rods')::int`,
    [lake.id],
  );
  expect(crowded).toEqual([]);
}

const done = new Map<string, number>();

test('whatever is done in whatever order, no peg is taken twice, none is crowded and none is kept for nobody', async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(deeds, { minLength: 12, maxLength: 40 }), async (all) => {
      const run: Run = { ground: await aGround(), made: [], now: MORNING };
      server.setNow(new Date(MORNING));
      const asked: Promise<number>[] = [];
      for (const deed of all) {
        asked.push(
          act(run, deed).then((status) => {
            if (status < 300) done.set(deed.kind, (done.get(deed.kind) ?? 0) + 1);
            return status;
          }),
        );
        if (deed.beside) continue;
        const statuses = await Promise.all(asked.splice(0));
        for (const status of statuses) expect(status).toBeLessThan(500);
        if (deed.kind === 'jobs') await server.settle();
      }
      for (const status of await Promise.all(asked)) expect(status).toBeLessThan(500);
      await refuseWrong(run.ground);
    }),
    { numRuns: 12 },
  );
  for (const kind of ['hold', 'rove', 'confirm', 'cancel', 'move', 'claim', 'check-in', 'finish'])
    expect(done.get(kind), kind).toBeGreaterThan(0); // else nothing was tried
});
