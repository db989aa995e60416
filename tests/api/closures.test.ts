import { settleChoices } from '@mereward/api/bookings/settle-choices';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { ChoiceView } from '@mereward/shared/bookings/choosing-contract';
import { ClosureList, ClosureView } from '@mereward/shared/closures/deeds-contract';
import { NoticeList } from '@mereward/shared/notices/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let peg: TestPeg;
let sal: Person;

beforeAll(async () => {
  server = await aServer();
});
afterAll(() => server.close());
beforeEach(async () => {
  server.setNow('2027-07-15T09:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  lake = await aLake(server, here, { name: 'Ostle Pool', nights: true });
  peg = await aPeg(server, lake, { number: 'OP1' });
  sal = await aPerson(server, { name: 'Sal Marsh' });
});

const path = () => `/fisheries/${here.id}/closures`;
const closing = (details: object = {}, more: object = {}) => ({
  id: randomUUID(),
  details: {
    scope: { kind: 'lakes', lakeIds: [lake.id] },
    reason: 'oxygen',
    effect: 'move',
    from: '2027-07-16T06:00:00Z',
    until: null,
    publicWords: 'The fish are short of oxygen.',
    liftConditions: [],
    ...details,
  },
  moveToLakeId: null,
  chooseUntil: null,
  ...more,
});
const close = async (body: object, who = here.people.manager): Promise<ClosureView> => {
  const answer = await who.post(path()).send(body);
  expect(answer.status, answer.text).toBe(201);
  return ClosureView.parse(answer.body);
};
const lift = (closure: { id: string; version: number }, who: Person, more: object = {}) =>
  who
    .post(`/closures/${closure.id}/lift`)
    .send({ version: closure.version, ticked: [], reason: '', ...more });
const saturday = { from: '2027-07-17T06:00:00Z', until: '2027-07-17T18:00:00Z' };
const aBooking = (times: { from: string; until: string } = saturday, on = peg, holder = sal) =>
  aTicket(server, { pegId: on.id, holder, ...times });
const statusOf = async (id: string) =>
  (await server.server.source.manager.findOneByOrFail(Booking, { id })).status;
const pegTimes = (on = peg): Promise<{ state: string; from: Date; until: Date | null }[]> =>
  server.server.source.manager.query(
    `SELECT state, lower(during) AS "from", upper(during) AS until FROM peg_time WHERE peg_id = $1 ORDER BY lower(during)`,
    [on.id],
  );

describe('closing water', () => {
  test('is for owner, manager, office and head bailiff; another fishery’s lake and a time gone by are refused', async () => {
    const { people } = here;
    for (const who of [people.bailiff, people.member])
      expect((await who.post(path()).send(closing())).status).toBe(403);
    expect((await aStranger(server).post(path()).send(closing())).status).toBe(401);
    expect((await sal.post(path()).send(closing())).status).toBe(404);
    const elsewhere = await aFishery(server, { name: 'Upper Sallow' });
    const theirs = await aLake(server, elsewhere);
    const scope = { kind: 'lakes', lakeIds: [theirs.id] };
    expect((await people.manager.post(path()).send(closing({ scope }))).status).toBe(404);
    const past = closing({ from: '2027-07-01T06:00:00Z', until: '2027-07-02T06:00:00Z' });
    const refused = await people.manager.post(path()).send(past);
    expect(ProblemBody.parse(refused.body)).toMatchObject({ errors: [{ pointer: '/details/until' }] });
    await close(closing(), people.head_bailiff);
  });

  test('under an id used for something else is a conflict', async () => {
    const body = closing();
    await close(body);
    const other = { ...body, details: { ...body.details, publicWords: 'Something else.' } };
    expect((await here.people.manager.post(path()).send(other)).status).toBe(409);
  });

  test('for new bookings only leaves those made, and closes round them', async () => {
    const id = await aBooking();
    await close(closing({ effect: 'block', until: '2027-07-18T06:00:00Z' }));
    expect(await statusOf(id)).toBe('confirmed');
    expect((await pegTimes()).map(({ state }) => state)).toEqual(['closed', 'taken', 'closed']);
  });

  test('with a refund ends the bookings at once and asks nobody', async () => {
    const id = await aBooking();
    const closure = await close(closing({ effect: 'refund' }));
    expect(await statusOf(id)).toBe('cancelled_by_fishery');
    expect(closure.tally).toMatchObject({ bookings: 1, waiting: 0, cancelled: 1 });
    const mail = await server.mailTo(sal.email);
    expect(mail.subject).toContain('is cancelled');
  });

  test('to keepnets only tells, and takes no peg away', async () => {
    const id = await aBooking();
    const scope = { kind: 'method', method: 'keepnets', lakeIds: null };
    const closure = await close(closing({ scope, effect: 'allow_with_warning' }));
    expect(await statusOf(id)).toBe('confirmed');
    expect(closure.tally).toMatchObject({ bookings: 0, told: 1, pegs: 0 });
    await close({ ...closing({ scope, effect: 'allow_with_warning' }), id: closure.id });
    await server.settle();
    expect(server.mails.filter(({ to }) => to === sal.email)).toHaveLength(1);
  });

  test('to nights lets a day stand and asks whoever stays over midnight', async () => {
    const night = { from: '2027-07-17T18:00:00Z', until: '2027-07-18T06:00:00Z' };
    const [day, over] = [await aBooking(), await aBooking(night)];
    await close(closing({ scope: { kind: 'method', method: 'night', lakeIds: [lake.id] } }));
    expect(await statusOf(day)).toBe('confirmed');
    expect(await statusOf(over)).toBe('choosing');
  });

  test('lets an unpaid hold run out, and meets one that ends as it begins with nothing', async () => {
    const held = await aBooking();
    await server.server.source.manager.update(
      Booking,
      { id: held },
      { status: 'hold', holdUntil: new Date('2027-07-15T09:10:00Z') },
    );
    const before = await aBooking({ from: '2027-07-15T18:00:00Z', until: '2027-07-16T06:00:00Z' });
    await close(closing());
    expect(await statusOf(held)).toBe('expired');
    expect(await statusOf(before)).toBe('confirmed');
  });

  test('shows strangers what is closed and why, and no figures', async () => {
    await aBooking();
    const { id } = await close(closing());
    const list = ClosureList.parse((await aStranger(server).get(path())).body);
    expect(list.closures).toMatchObject([{ id, reasonWords: 'Low oxygen', tally: null, lift: null }]);
    const { notices } = NoticeList.parse((await aStranger(server).get(`/fisheries/${here.id}/notices`)).body);
    expect(notices).toMatchObject([{ severity: 'closed', details: { title: 'Ostle Pool: low oxygen' } }]);
  });
});

describe('lifting', () => {
  test('gives those who have not chosen their own pegs back and takes the notice down', async () => {
    const id = await aBooking();
    const closure = await close(closing());
    expect(await statusOf(id)).toBe('choosing');
    const answer = await lift(closure, here.people.manager);
    expect(answer.status).toBe(200);
    expect(await statusOf(id)).toBe('confirmed');
    expect(await pegTimes()).toMatchObject([{ state: 'taken', from: new Date(saturday.from) }]);
    const { notices } = NoticeList.parse((await sal.get(`/fisheries/${here.id}/notices`)).body);
    expect(notices).toEqual([]);
    server.setNow('2027-07-17T12:00:00Z');
    await settleChoices(server.server, closure.id);
    expect(await statusOf(id)).toBe('confirmed');
    expect((await lift(closure, here.people.manager)).status).toBe(200);
  });

  test('wants its conditions ticked; only the owner passes over one, with a reason', async () => {
    const tick = { kind: 'tick', id: randomUUID(), words: 'Paths walked' };
    const closure = await close(closing({ liftConditions: [tick] }));
    const refused = await lift(closure, here.people.manager);
    expect(ProblemBody.parse(refused.body)).toMatchObject({ errors: [{ detail: 'Paths walked' }] });
    expect((await lift(closure, here.people.owner)).status).toBe(400);
    expect((await lift(closure, here.people.bailiff, { ticked: [tick.id] })).status).toBe(403);
    const done = await lift(closure, here.people.manager, { ticked: [tick.id] });
    expect(ClosureView.parse(done.body)).toMatchObject({ state: 'over', lift: { ticked: [tick.id] } });
  });

  test('before two good dawns says that no readings are kept here, and the owner answers for it', async () => {
    const dawns = { kind: 'dawn_oxygen', leastMgL: 5, dawns: 2 };
    const closure = await close(closing({ liftConditions: [dawns] }));
    expect(closure.standsAgainstLifting).toEqual([
      '2 dawn readings running of 5.0 mg/l or more: so far 0. Oxygen readings are not kept here yet: the owner may lift it with a reason.',
    ]);
    expect((await lift(closure, here.people.manager, { reason: 'It looks fine' })).status).toBe(409);
    const reason = 'Meter read 5.4 and 5.8 on Sunday and Monday';
    const done = await lift(closure, here.people.owner, { reason });
    expect(ClosureView.parse(done.body).lift?.reason).toBe(reason);
  });

  test('of law in force is refused to everybody', async () => {
    server.setNow('2027-07-16T09:00:00Z');
    const law = closing({ reason: 'byelaw_close_season', until: '2027-08-01T00:00:00Z' });
    const closure = await close(law);
    expect(closure).toMatchObject({ legal: true, may: { lift: false, override: false } });
    expect((await lift(closure, here.people.owner, { reason: 'I say so' })).status).toBe(403);
  });

  test('with a version behind, and by two at once, is done once', async () => {
    const closure = await close(closing());
    expect((await lift({ ...closure, version: 9 }, here.people.manager)).status).toBe(409);
    const both = await Promise.all([lift(closure, here.people.manager), lift(closure, here.people.office)]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
  });
});

describe('the link of a choice', () => {
  const linkOf = async (who: Person): Promise<string> => {
    const mail = await server.mailTo(who.email);
    return `/choices/${/\/choose\/([\w-]+)/.exec(mail.text)?.[1] ?? ''}`;
  };

  test('opens one booking to whoever holds it, and a wrong one nothing', async () => {
    await aBooking();
    await close(closing());
    const view = ChoiceView.parse((await aStranger(server).get(await linkOf(sal))).body);
    expect(view).toMatchObject({ lakeName: 'Ostle Pool', pegs: ['OP1'], paidPence: 0, moveLake: null });
    expect(view.chooseUntil).toBe('2027-07-16T09:00:00.000Z'); // ten the next morning in British summer time
    expect((await aStranger(server).get(`/choices/${'x'.repeat(43)}`)).status).toBe(404);
  });

  test('chosen by two at once is one choice', async () => {
    const id = await aBooking();
    await close(closing({ until: '2027-07-18T06:00:00Z' }));
    const link = await linkOf(sal);
    const answers = await Promise.all([
      aStranger(server).post(link).send({ choice: 'move_date', day: '2027-07-20' }),
      aStranger(server).post(link).send({ choice: 'refund' }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(['confirmed', 'cancelled_by_fishery']).toContain(await statusOf(id));
  });

  test('into the closed time itself, or a day gone by, is refused', async () => {
    await aBooking();
    await close(closing({ until: '2027-07-18T06:00:00Z' }));
    const link = await linkOf(sal);
    for (const day of ['2027-07-17', '2027-07-10'])
      expect((await aStranger(server).post(link).send({ choice: 'move_date', day })).status).toBe(409);
  });
});
