import type { Role } from '@mereward/shared/accounts/contract';
import { FisheryList, FisheryView, InvitationView, PeopleView } from '@mereward/shared/fisheries/contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aPerson, aStranger, signedIn, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { fisheryDetails } from '../support/water-details';
import { aFishery, aLake, aPeg, type TestFishery } from '../support/waters';

let here: TestServer;
let ours: TestFishery;
let theirs: TestFishery;
beforeAll(async () => {
  here = await aServer();
  ours = await aFishery(here, { name: 'Wend Bottom Waters', gateCode: '4711' });
  theirs = await aFishery(here, { name: 'Alder Carr Fishery' });
});
afterAll(() => here.close());

const NOBODY = '00000000-0000-4000-8000-000000000000';

describe('a fishery', () => {
  test('belongs to whoever makes it, and is made once', async () => {
    const maker = await aPerson(here);
    const made = { id: randomUUID(), details: fisheryDetails({ name: 'New Fen' }) };
    const answers = await Promise.all([
      maker.post('/fisheries').send(made),
      maker.post('/fisheries').send(made),
    ]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    const view = FisheryView.parse((await maker.get(`/fisheries/${made.id}`)).body);
    expect(view).toMatchObject({ version: 1, details: made.details });
    expect(view.may).toEqual({
      change: true,
      invite: true,
      addLakes: true,
      seePeople: true,
      readFeels: true,
    });
    expect(answers.map(({ body }) => body)).toEqual([view, view]);
    const me = await maker.get('/accounts/me');
    expect(me.body.roles).toEqual([{ fisheryId: made.id, fisheryName: 'New Fen', role: 'owner' }]);
    const other = { ...made, details: { ...made.details, name: 'Other Fen' } };
    expect((await maker.post('/fisheries').send(other)).status).toBe(409);
    expect((await (await aPerson(here)).post('/fisheries').send(made)).status).toBe(404);
  });

  test('is made by nobody without a sign-in, nor with a zone that is none', async () => {
    const made = { id: randomUUID(), details: fisheryDetails() };
    expect((await aStranger(here).post('/fisheries').send(made)).status).toBe(401);
    const wrong = { ...made, details: fisheryDetails({ zone: 'Europe/Nowhere', name: ' ' }) };
    const answer = await (await aPerson(here)).post('/fisheries').send(wrong);
    expect(answer.status).toBe(400);
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer).sort()).toEqual([
      '/details/name',
      '/details/zone',
    ]);
  });

  test('shows its gate code to its staff alone', async () => {
    const codeFor = async (asker: Asker) =>
      FisheryView.parse((await asker.get(`/fisheries/${ours.id}`)).body).details.gateCode;
    for (const role of ['owner', 'manager', 'head_bailiff', 'bailiff', 'office'] as const)
      expect(await codeFor(ours.people[role]), role).toBe('4711');
    for (const asker of [ours.people.member, ours.people.angler, theirs.people.owner, aStranger(here)])
      expect(await codeFor(asker)).toBe('');
    expect((await aStranger(here).get('/fisheries')).text).not.toContain('4711');
  });

  test('is listed with its lakes for everybody', async () => {
    const lake = await aLake(here, ours, { name: 'Long Wend', nights: true });
    await aPeg(here, lake, { number: 'LW1' });
    await aPeg(here, lake, { number: 'LW2' });
    const { fisheries } = FisheryList.parse((await aStranger(here).get('/fisheries')).body);
    const listed = fisheries.find(({ id }) => id === ours.id);
    expect(listed?.lakes).toEqual([
      {
        id: lake.id,
        name: 'Long Wend',
        areaM2: expect.closeTo(14_000, -4),
        pegs: 2,
        nights: true,
        chart: null,
      },
    ]);
    expect(fisheries.find(({ id }) => id === theirs.id)?.lakes).toEqual([]);
    const names = fisheries.map(({ name }) => name);
    expect(names).toEqual([...names].sort());
  });

  test('is changed by its owner or manager from the version they saw', async () => {
    const changed = { details: fisheryDetails({ dutyPhone: '01632 960 002' }), version: 1 };
    const both = await Promise.all([
      ours.people.owner.put(`/fisheries/${ours.id}`).send(changed),
      ours.people.manager.put(`/fisheries/${ours.id}`).send(changed),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    const view = FisheryView.parse((await aStranger(here).get(`/fisheries/${ours.id}`)).body);
    expect([view.version, view.details.dutyPhone]).toEqual([2, '01632 960 002']);
    const again = { ...changed, version: 2 };
    for (const role of ['head_bailiff', 'bailiff', 'office', 'member', 'angler'] as const)
      expect((await ours.people[role].put(`/fisheries/${ours.id}`).send(again)).status, role).toBe(403);
    expect((await theirs.people.owner.put(`/fisheries/${ours.id}`).send(again)).status).toBe(404);
    expect((await aStranger(here).put(`/fisheries/${ours.id}`).send(again)).status).toBe(401);
    expect((await ours.people.owner.put(`/fisheries/${NOBODY}`).send(again)).status).toBe(404);
    expect((await aStranger(here).get('/fisheries/7')).status).toBe(404);
  });
});

const peopleOf = async (asker: Asker, fisheryId: string) =>
  PeopleView.parse((await asker.get(`/fisheries/${fisheryId}/people`)).body);

describe('its people', () => {
  test('are listed for owner, manager and office', async () => {
    const view = await peopleOf(ours.people.office, ours.id);
    expect(view.people.map(({ roles }) => roles.join()).sort()).toEqual([
      'angler',
      'bailiff',
      'head_bailiff',
      'manager',
      'member',
      'office',
      'owner',
    ]);
    expect(view.mayGive).toEqual(['member', 'angler']);
    for (const role of ['head_bailiff', 'bailiff', 'member', 'angler'] as const)
      expect((await ours.people[role].get(`/fisheries/${ours.id}/people`)).status, role).toBe(403);
    expect((await theirs.people.owner.get(`/fisheries/${ours.id}/people`)).status).toBe(404);
    expect((await aStranger(here).get(`/fisheries/${ours.id}/people`)).status).toBe(401);
  });

  test('get and lose roles at once, by whoever may give them', async () => {
    const fishery = await aFishery(here);
    const { owner, manager, bailiff, office, member } = fishery.people;
    const set = (asker: Asker, accountId: string, roles: Role[]) =>
      asker.put(`/fisheries/${fishery.id}/people/${accountId}`).send({ roles });
    expect((await set(manager, bailiff.id, ['bailiff', 'head_bailiff'])).status).toBe(200);
    expect((await bailiff.get('/accounts/me')).body.roles).toHaveLength(2);
    expect((await set(manager, owner.id, ['manager'])).status).toBe(403);
    expect((await set(manager, bailiff.id, ['owner'])).status).toBe(403);
    expect((await set(office, bailiff.id, ['bailiff'])).status).toBe(403);
    expect((await set(office, member.id, ['member', 'angler'])).status).toBe(200);
    expect((await set(member, member.id, ['owner'])).status).toBe(403);
    expect((await set(theirs.people.owner, member.id, [])).status).toBe(404);
    expect((await set(owner, theirs.people.member.id, ['member'])).status).toBe(404);
    expect((await set(aStranger(here), member.id, [])).status).toBe(401);
    expect((await set(owner, member.id, ['king' as Role])).status).toBe(400);
    const out = PeopleView.parse((await set(owner, bailiff.id, [])).body);
    expect(out.people.map(({ accountId }) => accountId)).not.toContain(bailiff.id);
    const codeNow = (await bailiff.get(`/fisheries/${fishery.id}`)).body.details.gateCode;
    expect(codeNow).toBe('');
  });

  test('never lose their last owner, not even when two take each other’s role at once', async () => {
    const fishery = await aFishery(here);
    const { owner } = fishery.people;
    const second = await signedIn(here, fishery.id, 'owner');
    const takeFrom = (asker: Asker, accountId: string) =>
      asker.put(`/fisheries/${fishery.id}/people/${accountId}`).send({ roles: ['member'] });
    const both = await Promise.all([takeFrom(owner, second.id), takeFrom(second, owner.id)]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 403]);
    const left = both[0]?.status === 200 ? owner : second;
    const last = await takeFrom(left, left.id);
    expect([last.status, last.body.title]).toEqual([409, 'A fishery keeps at least one owner']);
    const owners = (await peopleOf(left, fishery.id)).people.filter(({ roles }) => roles.includes('owner'));
    expect(owners).toHaveLength(1);
  });

  test('hold their roles at that fishery only', async () => {
    const { owner } = theirs.people;
    const view = FisheryView.parse((await owner.get(`/fisheries/${ours.id}`)).body);
    expect(view.may).toEqual({
      change: false,
      invite: false,
      addLakes: false,
      seePeople: false,
      readFeels: false,
    });
  });
});

describe('an invitation', () => {
  const inviteTo = (asker: Asker, email: string, role: Role, fisheryId = ours.id) =>
    asker.post(`/fisheries/${fisheryId}/invitations`).send({ email, role });
  const tokenFor = async (email: string) =>
    new URL((await here.mailTo(email)).links[0] ?? '').searchParams.get('token') ?? '';

  test('goes out by mail and is taken up by the address it was for', async () => {
    const guest = await aPerson(here, { email: 'guest@anglers.example' });
    const answer = await inviteTo(ours.people.manager, 'Guest@anglers.example', 'bailiff');
    expect(answer.status).toBe(201);
    const row = InvitationView.parse(answer.body);
    expect(row).toMatchObject({ email: guest.email, role: 'bailiff', state: 'waiting' });
    const token = await tokenFor(guest.email);
    const shown = await aStranger(here).get(`/invitations/${token}`);
    expect(shown.body).toEqual({ fisheryName: 'Wend Bottom Waters', role: 'bailiff', email: guest.email });
    const other = await (await aPerson(here)).post('/invitations/accept').send({ token });
    expect([other.status, other.body.kind]).toEqual([403, 'forbidden']);
    expect((await aStranger(here).post('/invitations/accept').send({ token })).status).toBe(401);
    const both = await Promise.all([
      guest.post('/invitations/accept').send({ token }),
      guest.post('/invitations/accept').send({ token }),
    ]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
    expect(both[0]?.body.roles).toEqual([
      { fisheryId: ours.id, fisheryName: 'Wend Bottom Waters', role: 'bailiff' },
    ]);
    expect((await aStranger(here).get(`/invitations/${token}`)).status).toBe(404);
    const { invitations } = await peopleOf(ours.people.owner, ours.id);
    expect(invitations.find(({ id }) => id === row.id)?.state).toBe('accepted');
    expect((await inviteTo(ours.people.manager, guest.email, 'bailiff')).status).toBe(409);
    const withdrawn = await ours.people.owner.delete(`/fisheries/${ours.id}/invitations/${row.id}`);
    expect(withdrawn.status).toBe(409);
  });

  test('sent again ends the link before', async () => {
    const email = 'again@anglers.example';
    await inviteTo(ours.people.owner, email, 'member');
    const first = await tokenFor(email);
    await inviteTo(ours.people.owner, email, 'member');
    const second = await tokenFor(email);
    expect((await aStranger(here).get(`/invitations/${first}`)).status).toBe(404);
    expect((await aStranger(here).get(`/invitations/${second}`)).status).toBe(200);
  });

  test('withdrawn or run out opens nothing', async () => {
    const [one, other] = ['one@anglers.example', 'other@anglers.example'];
    const row = InvitationView.parse((await inviteTo(ours.people.owner, one, 'member')).body);
    await inviteTo(ours.people.owner, other, 'member');
    const [tokenOne, tokenOther] = [await tokenFor(one), await tokenFor(other)];
    const withdraw = (asker: Asker) => asker.delete(`/fisheries/${ours.id}/invitations/${row.id}`);
    expect((await withdraw(ours.people.bailiff)).status).toBe(403);
    expect((await withdraw(theirs.people.owner)).status).toBe(404);
    const elsewhere = theirs.people.owner.delete(`/fisheries/${theirs.id}/invitations/${row.id}`);
    expect((await elsewhere).status).toBe(404);
    expect((await withdraw(ours.people.office)).status).toBe(204);
    const late = await aPerson(here, { email: one });
    expect((await late.post('/invitations/accept').send({ token: tokenOne })).status).toBe(404);
    here.pass(14 * 24 * 3600);
    const later = await aPerson(here, { email: other });
    const answer = await later.post('/invitations/accept').send({ token: tokenOther });
    expect([answer.status, answer.body.kind]).toEqual([404, 'not-found']);
    const { invitations } = await peopleOf(ours.people.owner, ours.id);
    const states = new Map(invitations.map(({ email, state }) => [email, state]));
    expect([states.get(one), states.get(other)]).toEqual(['withdrawn', 'expired']);
  });

  test('is sent by those alone who may give that role', async () => {
    const email = 'asked@anglers.example';
    expect((await inviteTo(ours.people.manager, email, 'owner')).status).toBe(403);
    expect((await inviteTo(ours.people.office, email, 'bailiff')).status).toBe(403);
    expect((await inviteTo(ours.people.member, email, 'member')).status).toBe(403);
    expect((await inviteTo(theirs.people.owner, email, 'member')).status).toBe(404);
    expect((await inviteTo(aStranger(here), email, 'member')).status).toBe(401);
    expect((await inviteTo(ours.people.owner, 'no address', 'member')).status).toBe(400);
    expect((await inviteTo(ours.people.owner, email, 'member', NOBODY)).status).toBe(404);
    await here.settle();
    expect(here.mails.filter(({ to }) => to === email)).toEqual([]);
  });
});
