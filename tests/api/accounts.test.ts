import { SignedIn } from '@mereward/shared/accounts/contract';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aBrowser } from '../support/browser';
import { aPerson, aStranger, PASSWORD } from '../support/people';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
beforeAll(async () => {
  here = await aServer();
});
afterAll(() => here.close());

const tokenOf = (link: string | undefined): string => new URL(link ?? '').searchParams.get('token') ?? '';
const newPassword = 'seven wet otters sleep';

async function mailedToken(address: string): Promise<string> {
  return tokenOf((await here.mailTo(address)).links[0]);
}

const signUp = (email: string, password = PASSWORD, name = 'Ivy Marsh') =>
  aStranger(here).post('/accounts').send({ name, email, password });

describe('making an account', () => {
  test('goes from sign-up over the mailed link to a sign-in', async () => {
    expect((await signUp('Ivy@Anglers.example')).status).toBe(202);
    const early = await aBrowser(here).signIn('ivy@anglers.example', PASSWORD);
    expect(early.status).toBe(403);
    expect(early.body).toMatchObject({ kind: 'forbidden', title: 'This address is not confirmed yet' });
    const token = await mailedToken('ivy@anglers.example');
    expect((await aStranger(here).post('/accounts/verify').send({ token })).status).toBe(204);
    expect((await aStranger(here).post('/accounts/verify').send({ token })).status).toBe(204);
    const answer = await aBrowser(here).signIn('IVY@anglers.example ', PASSWORD);
    expect(answer.status).toBe(200);
    const { account } = SignedIn.parse(answer.body);
    expect(account).toMatchObject({ name: 'Ivy Marsh', email: 'ivy@anglers.example', roles: [] });
  });

  test('says the same to a known address, and tells its holder by mail', async () => {
    const known = await aPerson(here, { name: 'Known' });
    const [fresh, taken] = [await signUp('fresh@anglers.example'), await signUp(known.email, newPassword)];
    expect([taken.status, taken.text]).toEqual([fresh.status, fresh.text]);
    expect((await here.mailTo(known.email)).subject).toBe('You already have a Mereward account');
    expect((await aBrowser(here).signIn(known.email, PASSWORD)).status).toBe(200);
    expect((await aBrowser(here).signIn(known.email, newPassword)).status).toBe(401);
  });

  test('leaves nothing of whoever signed an unconfirmed address up before', async () => {
    await signUp('twice@anglers.example', 'the first one waiting', 'Lurker');
    const first = await mailedToken('twice@anglers.example');
    await signUp('twice@anglers.example', PASSWORD, 'Holder');
    const second = await mailedToken('twice@anglers.example');
    expect((await aStranger(here).post('/accounts/verify').send({ token: first })).status).toBe(400);
    expect((await aStranger(here).post('/accounts/verify').send({ token: second })).status).toBe(204);
    expect((await aBrowser(here).signIn('twice@anglers.example', 'the first one waiting')).status).toBe(401);
    const answer = await aBrowser(here).signIn('twice@anglers.example', PASSWORD);
    expect(SignedIn.parse(answer.body).account.name).toBe('Holder');
  });

  test('of two at once with one address makes one account', async () => {
    const both = await Promise.all([signUp('pair@anglers.example'), signUp('pair@anglers.example')]);
    expect(both.map(({ status }) => status)).toEqual([202, 202]);
    const token = await mailedToken('pair@anglers.example');
    expect((await aStranger(here).post('/accounts/verify').send({ token })).status).toBe(204);
  });

  test('names everything that is wrong with it', async () => {
    const answer = await aStranger(here)
      .post('/accounts')
      .send({ name: ' ', email: 'nobody', password: 'short', role: 'owner' });
    expect(answer.status).toBe(400);
    expect(answer.type).toBe('application/problem+json');
    const pointers = answer.body.errors.map(({ pointer }: { pointer: string }) => pointer).sort();
    expect(pointers).toEqual(['', '/email', '/name', '/password']);
  });

  test('refuses a link that ran out, and mails another when asked', async () => {
    await signUp('late@anglers.example');
    const old = await mailedToken('late@anglers.example');
    here.pass(24 * 3600);
    const dead = await aStranger(here).post('/accounts/verify').send({ token: old });
    expect(dead.body).toMatchObject({ kind: 'invalid', title: 'This link no longer works' });
    const again = await aStranger(here)
      .post('/accounts/verify-again')
      .send({ email: 'late@anglers.example' });
    expect(again.status).toBe(202);
    const token = await mailedToken('late@anglers.example');
    expect(token).not.toBe(old);
    expect((await aStranger(here).post('/accounts/verify').send({ token })).status).toBe(204);
  });

  test('mails nothing again to a confirmed or an unknown address, and answers the same', async () => {
    const known = await aPerson(here);
    const before = here.mails.length;
    const ask = (email: string) => aStranger(here).post('/accounts/verify-again').send({ email });
    const answers = [await ask(known.email), await ask('unknown@anglers.example')];
    expect(answers.map(({ status, text }) => [status, text])).toEqual([
      [202, ''],
      [202, ''],
    ]);
    await here.settle();
    expect(here.mails).toHaveLength(before);
  });
});

describe('signing in', () => {
  test('sets a cookie no script and no other site can use', async () => {
    const person = await aPerson(here);
    const answer = await aBrowser(here).signIn(person.email, PASSWORD);
    const [cookie = ''] = answer.get('Set-Cookie') ?? [];
    expect(cookie).toMatch(/^mereward_refresh_4310=[\w-]{43};/);
    expect(cookie).toMatch(/; Path=\/api\/accounts;/);
    expect(cookie).toMatch(/; HttpOnly;/);
    expect(cookie).toMatch(/; SameSite=Strict/);
    expect(cookie).not.toMatch(/Secure/);
    expect(answer.get('Cache-Control')).toBe('no-store');
    expect(answer.text).not.toContain(cookie.slice(23, 60));
  });

  test('answers a wrong password and an unknown address alike', async () => {
    const person = await aPerson(here);
    const wrong = await aBrowser(here).signIn(person.email, 'not the password');
    const unknown = await aBrowser(here).signIn('unknown@anglers.example', PASSWORD);
    expect(wrong.status).toBe(401);
    expect({ ...wrong.body, instance: '' }).toEqual({ ...unknown.body, instance: '' });
  });

  test('takes one password typed in two Unicode forms', async () => {
    const composed = 'p\u00EAche \u00E0 l\u2019\u00E9tang';
    await signUp('form@anglers.example', composed);
    const token = await mailedToken('form@anglers.example');
    await aStranger(here).post('/accounts/verify').send({ token });
    expect((await aBrowser(here).signIn('form@anglers.example', composed.normalize('NFD'))).status).toBe(200);
  });

  test('shows the account and changes its details', async () => {
    const person = await aPerson(here, { name: 'Old Name' });
    const units = { length: 'ft', stickSpacingM: 4 };
    const changed = await person.patch('/accounts/me').send({ name: 'New Name', units });
    expect(changed.body).toMatchObject({ name: 'New Name', units });
    expect((await person.get('/accounts/me')).body).toEqual(changed.body);
    expect((await person.patch('/accounts/me').send({ name: '', units })).status).toBe(400);
    expect((await aStranger(here).get('/accounts/me')).status).toBe(401);
    expect((await aStranger(here).patch('/accounts/me').send({ name: 'X', units })).status).toBe(401);
  });
});

describe('a new password', () => {
  test('comes by a link that works once and ends every sign-in', async () => {
    const person = await aPerson(here);
    const browser = aBrowser(here);
    const before = SignedIn.parse((await browser.signIn(person.email, PASSWORD)).body);
    here.pass(1);
    await aStranger(here).post('/accounts/reset-request').send({ email: person.email }).expect(202);
    const token = await mailedToken(person.email);
    const set = () => aStranger(here).post('/accounts/reset').send({ token, password: newPassword });
    expect((await set()).status).toBe(204);
    expect((await set()).status).toBe(400);
    expect((await browser.refresh()).status).toBe(401);
    const me = request(here.app).get('/api/accounts/me').set('authorization', `Bearer ${before.accessToken}`);
    expect((await me).status).toBe(401);
    expect((await aBrowser(here).signIn(person.email, PASSWORD)).status).toBe(401);
    expect((await aBrowser(here).signIn(person.email, newPassword)).status).toBe(200);
    expect((await here.mailTo(person.email)).subject).toBe('Your Mereward password was changed');
  });

  test('is set by one of two uses of a link at once', async () => {
    const person = await aPerson(here);
    await aStranger(here).post('/accounts/reset-request').send({ email: person.email });
    const token = await mailedToken(person.email);
    const set = (password: string) => aStranger(here).post('/accounts/reset').send({ token, password });
    const answers = await Promise.all([set('password of the first'), set('password of the other')]);
    expect(answers.map(({ status }) => status).sort()).toEqual([204, 400]);
  });

  test('is not set by a link that ran out, nor by one for another purpose', async () => {
    const person = await aPerson(here);
    await aStranger(here).post('/accounts/reset-request').send({ email: person.email });
    const token = await mailedToken(person.email);
    expect((await aStranger(here).post('/accounts/verify').send({ token })).status).toBe(400);
    here.pass(3600);
    const late = await aStranger(here).post('/accounts/reset').send({ token, password: newPassword });
    expect(late.status).toBe(400);
  });

  test('is mailed five times in a quarter of an hour at most, whoever asks', async () => {
    const person = await aPerson(here);
    for (let n = 0; n < 7; n += 1)
      await aStranger(here).post('/accounts/reset-request').send({ email: person.email }).expect(202);
    await here.settle();
    expect(here.mails.filter(({ to }) => to === person.email)).toHaveLength(5);
  });

  test('is answered alike for an unknown address', async () => {
    const answer = await aStranger(here)
      .post('/accounts/reset-request')
      .send({ email: 'who@anglers.example' });
    expect([answer.status, answer.text]).toEqual([202, '']);
  });
});
