import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import {
  DraftAnswer,
  ReadersView,
  RulesToReadView,
  RulesView,
  SheetList,
  SheetView,
} from '@mereward/shared/rules/sheet-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { aRule, publishRules } from '../support/rules';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let peg: TestPeg;
let tom: Person;

beforeAll(async () => {
  server = await aServer();
});
afterAll(() => server.close());

beforeEach(async () => {
  server.setNow('2027-03-01T09:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  lake = await aLake(server, here);
  peg = await aPeg(server, lake);
  tom = await aPerson(server, { name: 'Tom Wragg', roles: [{ fisheryId: here.id, role: 'bailiff' }] });
});

const six = () => [
  aRule(1, 'Barbless hooks only.', { category: 'tackle' }),
  aRule(12, 'FO3 has an overhead line near it. Take care.', { category: 'safety' }),
  aRule(19, 'No keepnets.', { category: 'fish_welfare' }),
];

const read = async (who: Person, bookingId: string): Promise<RulesToReadView> =>
  RulesToReadView.parse((await who.get(`/bookings/${bookingId}/rules`)).body);
const acknowledge = (who: Person, version: { major: number; minor: number }, at: string) =>
  who
    .post(`/fisheries/${here.id}/rules/acknowledge`)
    .send({ id: randomUUID(), version, at, language: 'en-GB' });

describe('Story 4: a stale rule sheet', () => {
  test('a safety change asks every ticket to come again, a bailiff’s reading makes it good, a typo asks nobody', async () => {
    const colin = await aPerson(server, { name: 'Colin Frayne', email: 'colin@anglers.example' });
    for (let version = 1; version < 6; version += 1)
      await publishRules(here, [aRule(1, `Barbless hooks only, wording ${version}.`)], 'change');
    const rules = six();
    expect((await publishRules(here, rules, 'change')).sheet).toMatchObject({ major: 6, minor: 0 });

    server.setNow('2027-03-20T10:00:00Z');
    expect((await acknowledge(colin, { major: 6, minor: 0 }, '2027-03-20T10:00:00Z')).status).toBe(200);
    const times = { from: '2027-07-17T11:00:00Z', until: '2027-07-18T11:00:00Z' };
    const bookingId = await aTicket(server, { pegId: peg.id, holder: colin, ...times });
    expect(await read(colin, bookingId)).toMatchObject({ needed: false, words: '', blocks: 'nothing' });

    server.setNow('2027-07-01T09:00:00Z');
    const [first, twelve, nineteen] = rules;
    if (!first || !twelve || !nineteen) throw new Error('There are three rules.');
    const seven = [
      first,
      { ...twelve, text: 'FO3 closed: overhead line 24 m away.', severity: 'remove' as const },
      { ...nineteen, text: 'Keepnets only in matches.' },
    ];
    await publishRules(here, seven, 'safety');
    const mail = await server.mailTo('colin@anglers.example');
    expect(mail.subject).toContain('2 rules changed');
    expect(mail.text).toContain('Rule 12 was: FO3 has an overhead line near it. Take care.');
    expect(mail.text).toContain('Rule 12 now is: FO3 closed: overhead line 24 m away.');
    expect(mail.text).toContain('Rule 19 now is: Keepnets only in matches.');

    const stale = await read(colin, bookingId);
    expect(stale).toMatchObject({
      needed: true,
      blocks: 'ticket',
      words: 'Not valid until the rules are read',
      goodFrom: null,
    });
    expect(stale.sheet).toMatchObject({ major: 7, minor: 0 });
    expect(stale.since?.map((change) => change.kind === 'changed' && change.after.number)).toEqual([12, 19]);

    // Tom reads both aloud at 21:52; his phone finds a signal an hour later.
    server.setNow('2027-07-17T21:58:00Z');
    const witnessed = {
      id: randomUUID(),
      version: { major: 7, minor: 0 },
      method: 'verbal',
      at: '2027-07-17T20:52:00Z',
      language: 'en-GB',
    };
    const path = `/bookings/${bookingId}/rules/witnessed`;
    expect((await tom.post(path).send(witnessed)).status).toBe(200);
    expect((await tom.post(path).send(witnessed)).status).toBe(200);
    const good = await read(colin, bookingId);
    expect(good).toMatchObject({ needed: false, goodFrom: '2027-07-17T20:52:00.000Z' });
    expect(good.readings).toHaveLength(2);
    expect(good.readings[0]).toMatchObject({
      method: 'verbal',
      witness: 'Tom Wragg',
      deviceAt: '2027-07-17T20:52:00.000Z',
      at: '2027-07-17T21:58:00.000Z',
    });

    const typo = seven.map((rule) => (rule.number === 1 ? { ...rule, text: 'Barbless hooks only!' } : rule));
    expect((await publishRules(here, typo, 'minor')).sheet).toMatchObject({ major: 7, minor: 1 });
    expect(await read(colin, bookingId)).toMatchObject({
      needed: false,
      goodFrom: '2027-07-17T20:52:00.000Z',
    });
  });

  test('the version somebody accepted stays to be read by them and by staff, and by nobody else', async () => {
    const colin = await aPerson(server, { name: 'Colin Frayne' });
    const rules = six();
    const old = (await publishRules(here, rules, 'change')).sheet;
    await acknowledge(colin, { major: 1, minor: 0 }, '2027-03-01T09:00:00Z');
    await publishRules(here, rules.slice(0, 2), 'change');
    const path = `/rule-sheets/${old?.id}`;
    expect(SheetView.parse((await colin.get(path)).body).rules).toHaveLength(3);
    expect((await tom.get(path)).status).toBe(200);
    const other = await aPerson(server);
    expect((await other.get(path)).status).toBe(404);
    expect((await aStranger(server).get(path)).status).toBe(404);
    const list = async (who: Person) =>
      SheetList.parse((await who.get(`/fisheries/${here.id}/rules/versions`)).body).versions;
    expect((await list(colin)).map(({ major }) => major)).toEqual([1]);
    expect(await list(other)).toEqual([]);
    expect(await list(tom)).toMatchObject([
      { major: 2, words: '1 rule taken away', readers: 0 },
      { major: 1, words: 'The first version', readers: 1 },
    ]);
  });
});

describe('a draft', () => {
  const draftPath = () => `/fisheries/${here.id}/rules/draft`;
  const put = (who: Person, body: object) => who.put(draftPath()).send(body);

  test('is written by office and manager, one at a time, and told by nobody else', async () => {
    const body = { id: randomUUID(), sheet: { rules: six() }, version: null };
    expect((await put(here.people.bailiff, body)).status).toBe(403);
    expect((await put(here.people.owner, body)).status).toBe(403);
    expect((await aStranger(server).get(draftPath())).status).toBe(401);
    expect((await put(here.people.office, body)).status).toBe(200);
    expect((await put(here.people.office, body)).status).toBe(200);
    const second = { ...body, id: randomUUID() };
    expect((await put(here.people.manager, second)).status).toBe(409);
    expect((await put(here.people.manager, { ...body, version: 1 })).status).toBe(200);
    const stale = { ...body, sheet: { rules: six().slice(1) }, version: 1 };
    expect((await put(here.people.office, stale)).status).toBe(409);
    const kept = DraftAnswer.parse((await here.people.owner.get(draftPath())).body);
    expect(kept).toMatchObject({ draft: { version: 2, words: '3 rules added' }, may: { publish: true } });
  });

  test('begun by two at once is begun once', async () => {
    const begin = (who: Person) => put(who, { id: randomUUID(), sheet: { rules: six() }, version: null });
    const answers = await Promise.all([begin(here.people.office), begin(here.people.manager)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  test('with two rules of one number is invalid, and no rule at all is not published', async () => {
    const twice = { id: randomUUID(), sheet: { rules: [aRule(1, 'A'), aRule(1, 'B')] }, version: null };
    const answer = await put(here.people.office, twice);
    expect(ProblemBody.parse(answer.body)).toMatchObject({ kind: 'invalid' });
    const empty = { id: randomUUID(), sheet: { rules: [] }, version: null };
    await put(here.people.office, empty);
    const publish = { draftId: empty.id, version: 1, weight: 'change' };
    const path = `/fisheries/${here.id}/rules/publish`;
    expect((await here.people.manager.post(path).send(publish)).status).toBe(409);
  });
});

describe('publishing', () => {
  const publishPath = () => `/fisheries/${here.id}/rules/publish`;

  test('is for manager and owner, twice at once gives one version, and a new rule is never minor', async () => {
    const rules = six();
    await publishRules(here, rules, 'change');
    const draft = { id: randomUUID(), sheet: { rules: [...rules, aRule(20, 'No fires.')] }, version: null };
    await here.people.office.put(`/fisheries/${here.id}/rules/draft`).send(draft);
    const body = { draftId: draft.id, version: 1, weight: 'change' };
    expect((await here.people.office.post(publishPath()).send(body)).status).toBe(403);
    const minor = await here.people.owner.post(publishPath()).send({ ...body, weight: 'minor' });
    expect(ProblemBody.parse(minor.body)).toMatchObject({
      kind: 'invalid',
      errors: [{ pointer: '/weight' }],
    });
    const both = await Promise.all([
      here.people.owner.post(publishPath()).send(body),
      here.people.manager.post(publishPath()).send(body),
    ]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
    const sheets = await server.server.source.manager.findBy(RuleSheet, { fisheryId: here.id });
    expect(sheets.map(({ major }) => major).sort()).toEqual([1, 2]);
  });

  test('freezes: the database refuses to change what is in force', async () => {
    const { sheet } = await publishRules(here, six(), 'change');
    const change = server.server.source.manager.update(RuleSheet, { id: sheet?.id ?? '' }, { rules: [] });
    await expect(change).rejects.toThrow('what is written here stays');
  });

  test('shows a stranger the rules in force and nothing of a draft', async () => {
    const rules = six();
    await publishRules(here, rules, 'change');
    const draft = { id: randomUUID(), sheet: { rules: rules.slice(1) }, version: null };
    await here.people.office.put(`/fisheries/${here.id}/rules/draft`).send(draft);
    const answer = await aStranger(server).get(`/fisheries/${here.id}/rules`);
    const view = RulesView.parse(answer.body);
    expect(view.sheet?.rules).toHaveLength(3);
    expect(view.may).toEqual({
      acknowledge: false,
      versions: false,
      write: false,
      publish: false,
      readers: false,
    });
    expect(answer.text).not.toContain(draft.id);
  });
});

describe('a reading', () => {
  test('of an old version, of none and by a wrong clock is refused in words', async () => {
    const rules = six();
    await publishRules(here, rules, 'change');
    await publishRules(here, rules.slice(0, 2), 'change');
    const sal = await aPerson(server);
    const old = await acknowledge(sal, { major: 1, minor: 0 }, '2027-03-01T09:00:00Z');
    expect(ProblemBody.parse(old.body).title).toBe('Version 2 of the rules is in force by now');
    expect((await acknowledge(sal, { major: 9, minor: 0 }, '2027-03-01T09:00:00Z')).status).toBe(404);
    expect((await acknowledge(sal, { major: 2, minor: 0 }, '2027-03-02T09:00:00Z')).status).toBe(400);
  });

  test('twice at once is kept once', async () => {
    await publishRules(here, six(), 'change');
    const sal = await aPerson(server);
    const one = () => acknowledge(sal, { major: 1, minor: 0 }, '2027-03-01T09:00:00Z');
    expect((await Promise.all([one(), one()])).map(({ status }) => status)).toEqual([200, 200]);
    const bookingId = await aTicket(server, {
      pegId: peg.id,
      holder: sal,
      from: '2027-03-02T06:00:00Z',
      until: '2027-03-02T18:00:00Z',
    });
    expect((await read(sal, bookingId)).readings).toHaveLength(1);
  });

  test('is witnessed by staff only, never by its own holder, and other fisheries’ people find no booking', async () => {
    await publishRules(here, six(), 'change');
    const times = { from: '2027-03-02T06:00:00Z', until: '2027-03-02T18:00:00Z' };
    const bookingId = await aTicket(server, { pegId: peg.id, holder: tom, ...times });
    const body = {
      id: randomUUID(),
      version: { major: 1, minor: 0 },
      method: 'paper',
      at: '2027-03-01T09:00:00Z',
      language: 'en-GB',
    };
    const path = `/bookings/${bookingId}/rules/witnessed`;
    expect((await tom.post(path).send(body)).status).toBe(403);
    expect((await here.people.member.post(path).send(body)).status).toBe(404);
    const elsewhere = await aFishery(server, { name: 'Upper Sallow' });
    expect((await elsewhere.people.bailiff.post(path).send(body)).status).toBe(404);
    expect((await here.people.bailiff.post(path).send(body)).status).toBe(200);
    const readers = `/fisheries/${here.id}/rules/readers`;
    const list = ReadersView.parse((await here.people.office.get(readers)).body);
    expect(list.readers).toMatchObject([{ bookingId, needed: false, reading: { method: 'paper' } }]);
    expect((await here.people.member.get(readers)).status).toBe(403);
  });

  test('holds only the rules of one’s own water', async () => {
    const other = await aLake(server, here, { name: 'Sedge Cut' });
    const scope = { lakeIds: [other.id], pegIds: null, ticketTypeIds: null };
    await publishRules(here, [aRule(1, 'Everywhere.'), aRule(2, 'On Sedge Cut.', { scope })], 'change');
    const sal = await aPerson(server);
    const times = { from: '2027-03-02T06:00:00Z', until: '2027-03-02T18:00:00Z' };
    const bookingId = await aTicket(server, { pegId: peg.id, holder: sal, ...times });
    expect((await read(sal, bookingId)).sheet?.rules.map(({ number }) => number)).toEqual([1]);
  });
});
