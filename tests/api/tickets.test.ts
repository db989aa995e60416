import { LettingTermsView, USUAL_TERMS } from '@mereward/shared/bookings/letting-terms';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { TicketTypeList, TicketTypeView, type TicketType } from '@mereward/shared/tickets/contract';
import { TicketQuoteAnswer } from '@mereward/shared/tickets/quote-contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, aStranger } from '../support/people';
import type { TestServer } from '../support/server';
import { aTicketType } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
});
afterAll(() => server.close());

let made = 0;
const stay = (wishes: Partial<TicketType> = {}): TicketType => ({
  ...TICKET_TEMPLATES.stay24,
  lakeIds: [lake.id],
  name: `24 hours no ${(made += 1)}`,
  ...wishes,
});
const path = () => `/fisheries/${here.id}/ticket-types`;
const problem = (body: unknown) => ProblemBody.parse(body);

describe('a kind of ticket', () => {
  test('is made by the office, read by everybody, changed and taken off sale', async () => {
    const body = { id: randomUUID(), details: stay() };
    const answer = await here.people.office.post(path()).send(body);
    expect(answer.status).toBe(201);
    expect(TicketTypeView.parse(answer.body)).toMatchObject({ version: 1, may: { change: true } });
    expect((await here.people.office.post(path()).send(body)).status).toBe(201);
    const other = { ...body, details: { ...body.details, description: 'another' } };
    expect((await here.people.office.post(path()).send(other)).status).toBe(409);
    const seen = TicketTypeList.parse((await aStranger(server).get(path())).body);
    expect(seen.ticketTypes.find(({ id }) => id === body.id)?.may).toEqual({ change: false });
    const change = { details: { ...body.details, rodsMost: 2 }, version: 1 };
    const put = () => here.people.manager.put(`/ticket-types/${body.id}`).send(change);
    expect((await put()).status).toBe(200);
    expect(problem((await put()).body).kind).toBe('conflict');
    for (let times = 0; times < 2; times += 1)
      expect((await here.people.owner.delete(`/ticket-types/${body.id}`)).status).toBe(204);
    const after = TicketTypeList.parse((await aStranger(server).get(path())).body);
    expect(after.ticketTypes.map(({ id }) => id)).not.toContain(body.id);
  });

  test('has a name of its own, also when two are made at once', async () => {
    const details = stay();
    const send = () => here.people.office.post(path()).send({ id: randomUUID(), details });
    const answers = await Promise.all([send(), send(), send()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
  });

  test('is for lakes and pegs of the fishery only, and every fault is told', async () => {
    const theirs = await aLake(server, elsewhere, { name: 'Their Water' });
    const send = async (details: TicketType) =>
      problem((await here.people.office.post(path()).send({ id: randomUUID(), details })).body);
    expect(await send(stay({ lakeIds: [theirs.id] }))).toMatchObject({
      kind: 'invalid',
      errors: [{ pointer: '/details/lakeIds/0' }],
    });
    const peg = await aPeg(server, theirs);
    expect(await send(stay({ pegIds: [peg.id] }))).toMatchObject({
      errors: [{ pointer: '/details/pegIds/0' }],
    });
    expect(await send(stay({ rodsMost: 1, prices: [] }))).toMatchObject({ kind: 'invalid' });
  });

  test('is set by owner, manager and office, by nobody else', async () => {
    const type = await aTicketType(server, lake);
    const deeds = (who: ReturnType<typeof aStranger>) => [
      who.post(path()).send({ id: randomUUID(), details: stay() }),
      who.put(`/ticket-types/${type.id}`).send({ details: type.details, version: 99 }),
      who.delete(`/ticket-types/${randomUUID()}`),
      who.post(`/fisheries/${here.id}/ticket-quote`).send({
        details: stay(),
        lakeId: lake.id,
        choice: { day: '2027-07-17', start: '12:00', rods: 2, people: 1 },
      }),
    ];
    const statuses = async (who: ReturnType<typeof aStranger>) =>
      (await Promise.all(deeds(who))).map(({ status }) => status);
    const { owner, manager, office, head_bailiff, bailiff, member, angler } = here.people;
    for (const who of [owner, manager, office]) expect(await statuses(who)).toEqual([201, 409, 404, 200]);
    for (const who of [head_bailiff, bailiff, member, angler])
      expect(await statuses(who)).toEqual([403, 403, 404, 403]);
    expect(await statuses(elsewhere.people.owner)).toEqual([404, 404, 404, 404]);
    expect(await statuses(aStranger(server))).toEqual([401, 401, 401, 401]);
  });
});

describe('a quote', () => {
  const ask = async (details: TicketType, day: string) => {
    const choice = { day, start: '12:00', rods: 2, people: 1 };
    const answer = await here.people.office
      .post(`/fisheries/${here.id}/ticket-quote`)
      .send({ details, lakeId: lake.id, choice });
    return TicketQuoteAnswer.parse(answer.body);
  };

  test('of 24 hours over a clock change says how long they are', async () => {
    const { quote } = await ask(stay({ name: '24 hours' }), '2027-10-30');
    expect(quote).toMatchObject({
      from: '2027-10-30T11:00:00.000Z',
      until: '2027-10-31T12:00:00.000Z',
      grossPence: 2800,
      lines: [{ grossPence: 2800, vatPence: 467, netPence: 2333 }],
    });
    expect(quote?.words).toContain('would cost £28.00 and end Sun 31 October 2027, 12:00');
    expect(quote?.words).toContain('25 hours');
    const { duration } = TICKET_TEMPLATES.stay24;
    if (duration.kind !== 'elapsed') throw new Error('the template has no start to choose');
    const counted = stay({ duration: { ...duration, clockChange: 'elapsed_hours' } });
    expect((await ask(counted, '2027-10-30')).quote?.until).toBe('2027-10-31T11:00:00.000Z');
  });

  test('says why there is none, and what stands against this reader', async () => {
    const type = await aTicketType(server, lake, { ...TICKET_TEMPLATES.stay24, audience: 'member' });
    const at = `/ticket-types/${type.id}/quote?lakeId=${lake.id}&day=`;
    const none = await aStranger(server).get(`${at}2027-04-10&start=03:00`);
    expect(TicketQuoteAnswer.parse(none.body)).toMatchObject({
      quote: null,
      fault: expect.stringContaining('can’t start at 03:00'),
    });
    const codes = async (who: ReturnType<typeof aStranger>, day: string) => {
      const answer = TicketQuoteAnswer.parse((await who.get(`${at}${day}&start=12:00`)).body);
      return answer.quote?.reasons.map(({ code }) => code);
    };
    expect(await codes(aStranger(server), '2027-04-10')).toEqual(['members-only']);
    expect(await codes(here.people.member, '2027-04-10')).toEqual([]);
    expect(await codes(here.people.member, '2027-12-10')).toEqual(['too-early']);
    expect(
      (await aStranger(server).get(`/ticket-types/${type.id}/quote?lakeId=${randomUUID()}&day=2027-04-10`))
        .status,
    ).toBe(400);
  });
});

describe('letting terms', () => {
  const at = () => `/fisheries/${here.id}/letting-terms`;

  test('are the usual ones until set, and everybody reads them', async () => {
    const before = LettingTermsView.parse((await aStranger(server).get(at())).body);
    expect(before).toMatchObject({ version: null, details: USUAL_TERMS, may: { change: false } });
    const details = { ...USUAL_TERMS, holdMinutes: 12 };
    const put = (version: number | null) => here.people.manager.put(at()).send({ details, version });
    const answers = await Promise.all([put(null), put(null)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await put(1)).status).toBe(200);
    expect((await put(1)).status).toBe(409);
    const after = LettingTermsView.parse((await here.people.owner.get(at())).body);
    expect(after).toMatchObject({ version: 2, details: { holdMinutes: 12 }, may: { change: true } });
  });

  test('are set by owner and manager alone', async () => {
    const body = { details: USUAL_TERMS, version: 77 };
    const status = async (who: ReturnType<typeof aStranger>) => (await who.put(at()).send(body)).status;
    const { owner, manager, office, head_bailiff, bailiff, member, angler } = here.people;
    expect(await Promise.all([owner, manager].map(status))).toEqual([409, 409]);
    expect(await Promise.all([office, head_bailiff, bailiff, member, angler].map(status))).toEqual(
      Array.from({ length: 5 }, () => 403),
    );
    const stranger = await aPerson(server);
    expect(await Promise.all([stranger, aStranger(server)].map(status))).toEqual([404, 401]);
  });
});
