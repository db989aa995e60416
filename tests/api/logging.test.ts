import { readConfig } from '@mereward/api/config';
import { makeLogger } from '@mereward/api/http/logging';
import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aBrowser } from '../support/browser';
import { aLog } from '../support/lines';
import { aPerson, aStranger, PASSWORD } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aFishery } from '../support/waters';

const log = aLog();
let here: TestServer;
beforeAll(async () => {
  const config = readConfig({ DATABASE_URL: 'postgres://nowhere.invalid/none', LOG_LEVEL: 'debug' });
  here = await aServer({ logger: makeLogger(config, log.stream), env: { LOG_LEVEL: 'debug' } });
});
afterAll(() => here.close());

const tokenIn = (link: string | undefined) => new URL(link ?? '').searchParams.get('token') ?? '';

test('each request is one line with its id, method, path, status and time', async () => {
  const answer = await aStranger(here).get('/fisheries?near=home');
  const line = log.lines().at(-1);
  expect(line).toMatchObject({
    req: { id: answer.get('X-Request-Id'), method: 'GET', path: '/api/fisheries' },
    res: { status: 200 },
    responseTime: expect.any(Number),
  });
  const other = await aStranger(here).get('/fisheries');
  expect(other.get('X-Request-Id')).not.toBe(answer.get('X-Request-Id'));
  expect(answer.get('X-Request-Id')).toMatch(/^[0-9a-f-]{36}$/);
});

test('no line names a person, an address, a password, a token or where somebody is', async () => {
  const fishery = await aFishery(here);
  const name = 'Zebedee Quillfeather';
  const email = 'zebedee@anglers.example';
  await aStranger(here).post('/accounts').send({ name, email, password: PASSWORD }).expect(202);
  const verify = tokenIn((await here.mailTo(email)).links[0]);
  await request(here.app).get(`/verify?token=${verify}`);
  await aStranger(here).post('/accounts/verify').send({ token: verify }).expect(204);
  const browser = aBrowser(here);
  await browser.signIn(email, `${PASSWORD} wrong`);
  const signedIn = await browser.signIn(email, PASSWORD);
  const refresh = browser.cookie()?.split('=')[1] ?? '';
  await browser.refresh();
  await fishery.people.owner
    .post(`/fisheries/${fishery.id}/invitations`)
    .send({ email, role: 'bailiff' })
    .expect(201);
  const invitation = tokenIn((await here.mailTo(email)).links[0]);
  await aStranger(here).get(`/invitations/${invitation}`).expect(200);
  await aStranger(here).post('/accounts').set('X-Forwarded-For', '203.0.113.7').send({ name, email });
  await aStranger(here)
    .post('/accounts')
    .set('content-type', 'application/json')
    .send(`{"email": "${email}"`)
    .expect(400);
  const text = log.text();
  expect(text).toContain('/api/invitations/…');
  expect(text).toContain('a job is done');
  const secrets = [name, 'Quillfeather', email, 'zebedee', PASSWORD, verify, invitation, refresh];
  for (const secret of [...secrets, signedIn.body.accessToken, '203.0.113.7', '127.0.0.1'])
    expect(text, secret).not.toContain(secret);
});

test('a failure of ours is told by its number alone, and written down without what was sent', async () => {
  const person = await aPerson(here, { name: 'Ysolde Thrupp', email: 'ysolde@anglers.example' });
  await here.server.source.query('ALTER TABLE account RENAME TO mislaid');
  const before = log.lines().length;
  const answer = await aBrowser(here).signIn(person.email, PASSWORD);
  await here.server.source.query('ALTER TABLE mislaid RENAME TO account');
  expect(answer.status).toBe(500);
  expect(answer.body).toMatchObject({
    kind: 'internal',
    title: 'Something went wrong here',
    instance: answer.get('X-Request-Id'),
  });
  expect(answer.text).not.toMatch(/account"|relation|query|\.ts/i);
  const lines = log.lines().slice(before);
  const written = lines.find(({ msg }) => msg === 'internal');
  expect(written).toMatchObject({
    err: { type: 'QueryFailedError', code: '42P01', stack: expect.stringContaining('at ') },
    req: { id: answer.body.instance },
  });
  expect(JSON.stringify(lines)).not.toMatch(/ysolde|Thrupp|herons/i);
});
