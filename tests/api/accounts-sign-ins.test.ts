import { SignedIn } from '@mereward/shared/accounts/contract';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aBrowser } from '../support/browser';
import { aPerson, PASSWORD } from '../support/people';
import { handMadeToken } from '../support/hand-made-token';
import { aServer, type TestServer } from '../support/server';

const SECRET = 'a secret of more than thirty-two bytes';

let here: TestServer;
beforeAll(async () => {
  here = await aServer({ env: { ACCESS_TOKEN_SECRET: SECRET } });
});
afterAll(() => here.close());

async function aSignIn() {
  const person = await aPerson(here);
  const browser = aBrowser(here);
  const { accessToken } = SignedIn.parse((await browser.signIn(person.email, PASSWORD)).body);
  return { person, browser, accessToken };
}

const meWith = (accessToken: string) =>
  request(here.app).get('/api/accounts/me').set('authorization', `Bearer ${accessToken}`);

/** A second window that holds what the first held at that moment. */
function copyOf(browser: ReturnType<typeof aBrowser>) {
  const copy = aBrowser(here);
  copy.holdCookie(browser.cookie() ?? '');
  return copy;
}

describe('the refresh token', () => {
  test('brings a new access token and a new cookie each time', async () => {
    const { browser, person } = await aSignIn();
    const cookies = new Set([browser.cookie()]);
    for (let n = 0; n < 3; n += 1) {
      here.pass(600);
      const { accessToken, account } = SignedIn.parse((await browser.refresh()).body);
      expect(account.id).toBe(person.id);
      expect((await meWith(accessToken)).status).toBe(200);
      cookies.add(browser.cookie());
    }
    expect(cookies.size).toBe(4);
  });

  test('found in use a second time ends the whole sign-in, the newest token too', async () => {
    const { browser, person } = await aSignIn();
    const thief = copyOf(browser);
    const elsewhere = aBrowser(here);
    await elsewhere.signIn(person.email, PASSWORD);
    expect((await browser.refresh()).status).toBe(200);
    here.pass(11);
    expect((await thief.refresh()).status).toBe(401);
    expect((await browser.refresh()).status).toBe(401);
    expect((await elsewhere.refresh()).status).toBe(200);
  });

  test('still works within ten seconds when its answer was lost', async () => {
    const { browser } = await aSignIn();
    const again = copyOf(browser);
    expect((await browser.refresh()).status).toBe(200);
    here.pass(10);
    expect((await again.refresh()).status).toBe(200);
    here.pass(60);
    expect([(await browser.refresh()).status, (await again.refresh()).status]).toEqual([200, 200]);
  });

  test('asked for by two windows at once leaves both signed in', async () => {
    const { browser } = await aSignIn();
    const other = copyOf(browser);
    const both = await Promise.all([browser.refresh(), other.refresh()]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
    expect(browser.cookie()).not.toBe(other.cookie());
    here.pass(600);
    expect([(await browser.refresh()).status, (await other.refresh()).status]).toEqual([200, 200]);
  });

  test('runs out after ninety days without use, and its cookie is cleared', async () => {
    const { browser } = await aSignIn();
    here.pass(90 * 24 * 3600);
    const answer = await browser.refresh();
    expect(answer.status).toBe(401);
    expect(answer.body.kind).toBe('not-signed-in');
    expect(browser.cookie()).toBeNull();
  });

  test('is kept as a hash only', async () => {
    const { browser } = await aSignIn();
    const token = (browser.cookie() ?? '').split('=')[1] ?? '';
    expect(token).toHaveLength(43);
    const rows = await here.server.source.query(
      `SELECT count(*)::int AS n FROM session
       WHERE encode(token_hash, 'escape') LIKE '%' || $1 || '%' OR token_hash = convert_to($1, 'UTF8')`,
      [token],
    );
    const hashed = await here.server.source.query(
      `SELECT count(*)::int AS n FROM session WHERE token_hash = sha256(convert_to($1, 'UTF8'))`,
      [token],
    );
    expect([rows[0].n, hashed[0].n]).toEqual([0, 1]);
  });

  test('is not taken from a request that another site could have made', async () => {
    const { browser, accessToken } = await aSignIn();
    const cookie = browser.cookie() ?? '';
    const headers = { Cookie: cookie, authorization: `Bearer ${accessToken}` };
    const bare = (method: 'post' | 'delete', path: string) => {
      const ask = request(here.app);
      return (method === 'post' ? ask.post(path) : ask.delete(path)).set(headers);
    };
    for (const answer of [
      await bare('post', '/api/accounts/session/refresh'),
      await bare('delete', '/api/accounts/session'),
      await bare('delete', '/api/accounts/sessions'),
    ])
      expect([answer.status, answer.body.kind]).toEqual([403, 'forbidden']);
    expect((await browser.refresh()).status).toBe(200);
  });

  test('is not read from anything but the cookie, and nonsense in it opens nothing', async () => {
    const nonsense = aBrowser(here);
    expect((await nonsense.refresh()).status).toBe(401);
    nonsense.holdCookie('mereward_refresh_4310=%00%ff%fe');
    expect((await nonsense.refresh()).status).toBe(401);
  });
});

describe('signing out', () => {
  test('ends this sign-in and leaves the others', async () => {
    const { browser, person } = await aSignIn();
    const elsewhere = aBrowser(here);
    await elsewhere.signIn(person.email, PASSWORD);
    const kept = copyOf(browser);
    expect((await browser.signOut()).status).toBe(204);
    expect(browser.cookie()).toBeNull();
    expect((await kept.refresh()).status).toBe(401);
    expect((await elsewhere.refresh()).status).toBe(200);
    expect((await browser.signOut()).status).toBe(204);
  });

  test('everywhere ends every sign-in and every access token at once', async () => {
    const { browser, person, accessToken } = await aSignIn();
    const elsewhere = aBrowser(here);
    await elsewhere.signIn(person.email, PASSWORD);
    here.pass(1);
    const everywhere = (token: string) =>
      request(here.app)
        .delete('/api/accounts/sessions')
        .set({ 'X-Mereward': '1', authorization: `Bearer ${token}` });
    expect((await everywhere(accessToken)).status).toBe(204);
    expect([(await browser.refresh()).status, (await elsewhere.refresh()).status]).toEqual([401, 401]);
    expect((await meWith(accessToken)).status).toBe(401);
    const back = await aBrowser(here).signIn(person.email, PASSWORD);
    expect((await meWith(SignedIn.parse(back.body).accessToken)).status).toBe(200);
    expect((await everywhere('')).status).toBe(401);
  });
});

describe('an access token', () => {
  test('opens nothing once ten minutes are over', async () => {
    const { accessToken } = await aSignIn();
    here.pass(599);
    expect((await meWith(accessToken)).status).toBe(200);
    here.pass(1);
    const answer = await meWith(accessToken);
    expect(answer.body).toMatchObject({ kind: 'not-signed-in', title: 'Your sign-in has run out' });
  });

  test('that was changed, unsigned, signed by another key or for nobody opens nothing', async () => {
    const { person, accessToken } = await aSignIn();
    const other = await aPerson(here);
    const iat = here.server.clock().getTime() / 1000;
    const claims = { sub: person.id, iat, exp: iat + 600 };
    const [head = '', , signature = ''] = accessToken.split('.');
    const changed = Buffer.from(JSON.stringify({ ...claims, sub: other.id })).toString('base64url');
    const made = (payload: object, key = SECRET, alg = 'HS256') =>
      handMadeToken({ alg, typ: 'JWT' }, payload, key);
    const forged = [
      `${head}.${changed}.${signature}`,
      made(claims, '', 'none'),
      made(claims, SECRET, 'none'),
      made(claims, 'another key of more than thirty-two bytes'),
      made(claims, SECRET, 'HS512'),
      made({ iat, exp: iat + 600 }),
      made({ ...claims, sub: 'owner' }),
      made({ ...claims, sub: '00000000-0000-4000-8000-000000000000' }),
      made({ ...claims, nbf: iat + 300 }),
      made(claims).split('.').slice(0, 2).join('.'),
      'nonsense',
    ];
    expect((await meWith(made(claims))).status).toBe(200); // the forgeries fail for what is wrong in them
    for (const token of forged) expect((await meWith(token)).status, token).toBe(401);
  });
});

describe('wrong tries', () => {
  test('at one account are cut off, while its neighbours at the same address go on', async () => {
    const fresh = await aServer();
    try {
      const [person, neighbour] = [await aPerson(fresh), await aPerson(fresh)];
      const statuses: number[] = [];
      for (let n = 0; n < 21; n += 1)
        statuses.push((await aBrowser(fresh).signIn(person.email, `guess number ${n}`)).status);
      expect(statuses.slice(0, 20)).toEqual(Array.from({ length: 20 }, () => 401));
      expect(statuses[20]).toBe(429);
      const cut = await aBrowser(fresh).signIn(` ${person.email.toUpperCase()}`, PASSWORD);
      expect([cut.status, cut.body.kind]).toEqual([429, 'too-many']);
      expect(cut.body.detail).toMatch(/quarter of an hour/);
      expect((await aBrowser(fresh).signIn(neighbour.email, PASSWORD)).status).toBe(200);
    } finally {
      await fresh.close();
    }
  });
});
