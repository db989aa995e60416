import { BOARD_PEGS } from '@mereward/api/bookings/board';
import { BlockList, BoardView, type BoardPeg } from '@mereward/shared/bookings/availability-contract';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aClosure, aHold } from '../support/peg-times';
import { aPerson, aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  elsewhere = await aFishery(server);
  lake = await aLake(server, here, { name: 'Long Wend' });
  server.setNow('2027-07-10T09:00:00Z');
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (wishes: Parameters<typeof aPeg>[2] = {}): Promise<TestPeg> =>
  aPeg(server, lake, { number: `B${(pegs += 1)}`, ...wishes });
const noon = (day: number) => new Date(Date.UTC(2027, 6, day, 11));

async function board(who: Asker, query = 'from=2027-07-10&days=14'): Promise<BoardView> {
  const answer = await who.get(`/lakes/${lake.id}/board?${query}`);
  expect(answer.status).toBe(200);
  expect(answer.headers['content-type']).toMatch(/^application\/json/);
  return BoardView.parse(answer.body);
}
const find = (view: BoardView, peg: TestPeg): BoardPeg | undefined =>
  view.pegs.find(({ pegId }) => pegId === peg.id);
const stranger = () => aStranger(server);

describe('the board', () => {
  test('shows each peg’s spans in order, and to a stranger never who or what', async () => {
    const peg = await freshPeg({ name: 'The Point' });
    const sofia = { id: here.people.angler.id, name: 'Sofia Marsh' };
    const id = await aTicket(server, { pegId: peg.id, holder: sofia, from: noon(12), until: noon(13) });
    await server.server.source.manager.update(
      PegTime,
      { bookingId: id },
      { during: `[${noon(12).toISOString()},${noon(13).toISOString()})`, turnaround: '60 minutes' },
    );
    const closureId = await aClosure(server, here, {
      ...{ lakeIds: [lake.id], pegIds: [peg.id], from: noon(20).toISOString() },
    });
    const block = { id: randomUUID(), title: 'Gwen’s match', pegIds: [peg.id] };
    const times = { from: noon(14).toISOString(), until: noon(15).toISOString() };
    await here.people.office.post(`/fisheries/${here.id}/blocks`).send({ ...block, ...times });
    const seen = find(await board(stranger()), peg);
    expect(seen).toMatchObject({ name: 'The Point', shut: null, shared: false });
    expect(seen?.spans).toEqual([
      {
        ...{ from: noon(12).toISOString(), until: noon(13).toISOString(), state: 'taken', words: '' },
        fishingUntil: new Date(noon(13).getTime() - 3_600_000).toISOString(),
        ...{ closureId: null, blockId: null, booking: null },
      },
      {
        ...{ ...times, fishingUntil: times.until, state: 'blocked', words: '' },
        ...{ closureId: null, blockId: null, booking: null },
      },
      {
        ...{ from: noon(20).toISOString(), until: null, fishingUntil: null, state: 'closed' },
        ...{ words: 'Closed for works', closureId, blockId: null, booking: null },
      },
    ]);
    const office = find(await board(here.people.office), peg);
    expect(office?.spans[0]?.booking).toMatchObject({
      id,
      holder: 'Sofia Marsh',
      status: 'confirmed',
      rods: 1,
    });
    expect(office?.spans[1]).toMatchObject({ words: 'Gwen’s match', blockId: block.id });
  });

  test('names holders to those who answer for tickets, to bailiffs for a day either way, to nobody else', async () => {
    const peg = await freshPeg();
    const holder = { id: here.people.angler.id, name: 'Colin Frayne' };
    for (const day of [8, 10, 11, 13])
      await aTicket(server, { pegId: peg.id, holder, from: noon(day), until: noon(day + 1) });
    const named = async (who: Asker) =>
      find(await board(who, 'from=2027-07-08&days=10'), peg)?.spans.map(({ booking }) => booking !== null);
    for (const role of ['owner', 'manager', 'office', 'head_bailiff'] as const)
      expect(await named(here.people[role])).toEqual([true, true, true, true]);
    expect(await named(here.people.bailiff)).toEqual([true, true, true, false]);
    const outsiders = [stranger(), await aPerson(server), here.people.angler, here.people.member];
    for (const who of [...outsiders, elsewhere.people.owner]) {
      expect(await named(who)).toEqual([false, false, false, false]);
      expect(JSON.stringify(await board(who))).not.toContain('Colin');
    }
  });

  test('shows a hold while it lasts, and tickets that choose a peg on arrival apart', async () => {
    const peg = await freshPeg();
    const holdUntil = new Date('2027-07-10T09:05:00Z');
    const who = { holder: here.people.angler, from: noon(12), until: noon(13) };
    await aHold(server, { pegId: peg.id, ...who, holdUntil });
    expect(find(await board(stranger()), peg)?.spans.map(({ state }) => state)).toEqual(['held']);
    server.setNow(holdUntil);
    expect(find(await board(stranger()), peg)?.spans).toEqual([]);
    server.setNow('2027-07-10T09:00:00Z');
    const rover = await aTicket(server, { pegId: (await freshPeg()).id, ...who });
    await server.server.source.query('UPDATE peg_time SET peg_id = NULL WHERE booking_id = $1', [rover]);
    expect((await board(stranger())).choosing).toHaveLength(1);
  });

  test('leaves out what ended before or begins after, and reads at most 31 days', async () => {
    const peg = await freshPeg();
    for (const day of [1, 10, 24])
      await aTicket(server, {
        pegId: peg.id,
        holder: here.people.angler,
        from: noon(day),
        until: noon(day + 1),
      });
    const spans = find(await board(stranger()), peg)?.spans;
    expect(spans?.map(({ from }) => from)).toEqual([noon(10).toISOString()]);
    expect((await stranger().get(`/lakes/${lake.id}/board?from=2027-07-10&days=32`)).status).toBe(400);
    expect((await stranger().get(`/lakes/${randomUUID()}/board?from=2027-07-10`)).status).toBe(404);
  });

  test('finds open spans by peg and start and closures by their own index', async () => {
    const plan = await server.server.source.transaction(async (tx) => {
      await tx.query('SET LOCAL enable_seqscan = off');
      const values = [lake.id, noon(1), noon(15), noon(1), false, null, null];
      const rows: Record<string, string>[] = await tx.query(`EXPLAIN ${BOARD_PEGS}`, values);
      return rows.map((row) => row['QUERY PLAN']).join('\n');
    });
    expect(plan).toContain('peg_time_from');
    expect(plan).toContain('peg_time_closed');
    expect(plan).not.toContain('peg_time_once');
  });
});

describe('pegs kept back', () => {
  const path = () => `/fisheries/${here.id}/blocks`;
  const block = (pegIds: string[], more: object = {}) => ({
    ...{ id: randomUUID(), title: 'Club match', pegIds },
    ...{ from: noon(16).toISOString(), until: noon(17).toISOString(), ...more },
  });

  test('are all kept or none, told by number when one is let, and given back', async () => {
    const [a, b] = [await freshPeg(), await freshPeg()];
    await aTicket(server, { pegId: b.id, holder: here.people.angler, from: noon(16), until: noon(17) });
    const refused = await here.people.office.post(path()).send(block([a.id, b.id]));
    expect(refused.status).toBe(409);
    expect(refused.body).toMatchObject({ errors: [{ pointer: '/pegIds/1' }] });
    expect(find(await board(stranger()), a)?.spans).toEqual([]);
    const kept = block([a.id]);
    expect((await here.people.office.post(path()).send(kept)).status).toBe(201);
    expect((await here.people.office.post(path()).send(kept)).status).toBe(201);
    expect((await here.people.office.post(path()).send({ ...kept, title: 'Other' })).status).toBe(409);
    const list = BlockList.parse((await here.people.bailiff.get(path())).body);
    expect(list.blocks.find(({ id }) => id === kept.id)).toMatchObject({
      ...{ title: 'Club match', pegs: [{ pegId: a.id, lakeName: 'Long Wend' }], may: { remove: false } },
    });
    expect((await here.people.manager.delete(`${path()}/${kept.id}`)).status).toBe(204);
    expect(find(await board(stranger()), a)?.spans).toEqual([]);
    expect((await here.people.manager.delete(`${path()}/${kept.id}`)).status).toBe(404);
  });

  test('go to one of two who keep the same ones back at once, in either order', async () => {
    const [a, b] = [await freshPeg(), await freshPeg()];
    const answers = await Promise.all(
      Array.from({ length: 8 }, (_, i) =>
        here.people.office.post(path()).send(block(i % 2 ? [a.id, b.id] : [b.id, a.id])),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, ...Array<number>(7).fill(409)]);
  });

  test('are kept back by the office and up, in time to come, at their own fishery', async () => {
    const peg = await freshPeg();
    const send = (who: Asker, body: object = block([peg.id])) => who.post(path()).send(body);
    expect((await send(stranger())).status).toBe(401);
    for (const role of ['bailiff', 'head_bailiff', 'member'] as const)
      expect((await send(here.people[role])).status).toBe(403);
    expect((await send(elsewhere.people.owner)).status).toBe(404);
    expect((await elsewhere.people.owner.get(path())).status).toBe(404);
    const past = { from: noon(1).toISOString(), until: noon(2).toISOString() };
    expect((await send(here.people.office, block([peg.id], past))).status).toBe(400);
    expect((await send(here.people.office, block([randomUUID()]))).status).toBe(404);
    const theirs = await aPeg(server, await aLake(server, elsewhere, { name: 'Their Water' }));
    expect((await send(here.people.office, block([theirs.id]))).status).toBe(404);
  });
});
