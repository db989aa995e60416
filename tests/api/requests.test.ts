import { FisheryView } from '@mereward/shared/fisheries/contract';
import { OutlineRead } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { aPhoto } from '../support/pictures';
import { aServer, type TestServer } from '../support/server';
import { boardDetails, fisheryDetails, lakeDetails, markDetails, pegDetails } from '../support/water-details';
import { aBoard, aFishery, aLake, aMark, aPeg, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let owner: Person;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  lake = await aLake(server, here);
  owner = here.people.owner;
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);

describe('a request that can’t be read', () => {
  const sending = (type: string, packed?: string) => {
    const asked = request(server.app).post('/api/accounts/session').set('content-type', type);
    return (packed ? asked.set('content-encoding', packed) : asked).send('{}');
  };

  test.each([
    ['of another type', 'text/plain', undefined, /application\/json/],
    ['in letters nobody knows', 'application/json; charset=runes', undefined, /UTF-8/],
    ['packed in a way nobody knows', 'application/json', 'crates', /gzip/],
    ['packed wrongly', 'application/json', 'gzip', /send it again/i],
  ])('%s is refused saying what to send', async (_name, type, packed, told) => {
    const answer = await sending(type, packed);
    expect(answer.status).toBe(400);
    expect(problem(answer.body).detail).toMatch(told);
  });

  test('because its address is broken is refused, not written down as a fault of ours', async () => {
    const answer = await aStranger(server).get('/lakes/%E0%A4%A');
    expect(problem(answer.body)).toMatchObject({ kind: 'invalid', title: 'This address can’t be read' });
  });

  test('of nothing but faults is answered with the first hundred', async () => {
    const outline = { type: 'Polygon', coordinates: [Array.from({ length: 5000 }, () => ['a', 'b'])] };
    const answer = await owner
      .post(`/fisheries/${here.id}/lakes`)
      .send({ id: randomUUID(), details: { ...lakeDetails(), outline } });
    expect(answer.status).toBe(400);
    expect(problem(answer.body).errors).toHaveLength(100);
  });

  test('says in plain words what is wrong with a field', async () => {
    const answer = await owner.post('/fisheries').send({ id: 'x', details: fisheryDetails({ name: '' }) });
    expect(problem(answer.body).errors).toContainEqual({ pointer: '/details/name', detail: 'Fill this in' });
  });
});

describe('letters', () => {
  test.each([
    ['nought', 'Peg\u0000'],
    ['half a letter', 'Peg \uD83C'],
    ['an order to read the other way', 'Peg \u202E7'],
  ])('that no row can keep are refused where they stand: %s', async (_name, name) => {
    const peg = await owner
      .post(`/lakes/${lake.id}/pegs`)
      .send({ id: randomUUID(), details: pegDetails({ number: 'L1', name }) });
    expect(problem(peg.body).errors?.map(({ pointer }) => pointer)).toEqual(['/details/name']);
    const email = `${randomUUID()}@anglers.example`;
    const account = await aStranger(server)
      .post('/accounts')
      .send({ name, email, password: 'long enough for us' });
    expect(problem(account.body).errors?.map(({ pointer }) => pointer)).toEqual(['/name']);
  });

  test('of a password are its holder’s own', async () => {
    const person = await aPerson(server);
    const answer = await aStranger(server)
      .post('/accounts/session')
      .send({ email: person.email, password: '\u202Ewrong' });
    expect(answer.status).toBe(401);
  });
});

test('what is not there is said with what to do', async () => {
  for (const path of ['/nowhere', `/lakes/${randomUUID()}`, `/fisheries/${randomUUID()}`, '/pegs/x/page'])
    expect(problem((await aStranger(server).get(path)).body).detail).toMatch(/go back|begin at the front/i);
});

describe('an address whose id is none', () => {
  test('leads nowhere, also when somebody took the id that is all noughts', async () => {
    const nil = '00000000-0000-0000-0000-000000000000';
    const sly = await aPerson(server);
    expect((await sly.post('/fisheries').send({ id: nil, details: fisheryDetails() })).status).toBe(201);
    expect((await aStranger(server).get('/fisheries/anything')).status).toBe(404);
    expect((await aStranger(server).get(`/fisheries/${nil}`)).status).toBe(200);
  });

  test('is read in capitals too', async () => {
    const answer = await aStranger(server).get(`/fisheries/${here.id.toUpperCase()}`);
    expect(FisheryView.parse(answer.body).id).toBe(here.id);
  });
});

test('a version no row can have is refused in words at every change', async () => {
  const peg = await aPeg(server, lake, { number: 'V1' });
  const mark = await aMark(server, lake, { code: 'V1' });
  const board = await aBoard(server, lake, { code: 'V1' });
  const changes: [string, object][] = [
    [`/fisheries/${here.id}`, fisheryDetails()],
    [`/lakes/${lake.id}`, lakeDetails()],
    [`/pegs/${peg.id}`, pegDetails()],
    [`/lakes/${lake.id}/marks/${mark.id}`, markDetails()],
    [`/lakes/${lake.id}/boards/${board.id}`, boardDetails()],
  ];
  for (const version of [2_147_483_647, Number.MAX_SAFE_INTEGER, -1])
    for (const [path, details] of changes) {
      const answer = await owner.put(path).send({ details, version });
      expect(problem(answer.body).errors?.map(({ pointer }) => pointer)).toEqual(['/version']);
    }
});

describe('an outline made to keep the server busy', () => {
  const refusal = async (text: string) => {
    const answer = await owner.post('/outlines/read').send({ filename: 'outline', text });
    return OutlineRead.parse(answer.body)
      .findings.map(({ words }) => words)
      .join(' ');
  };

  test('by running to and fro twenty thousand times is given up', async () => {
    const ring = Array.from({ length: 19_990 }, (_, i) => [1.62 + (i % 2) / 100, 53.6 + i / 1e7]);
    const closed = [...ring, [1.6, 53.7], [1.6, 53.6], ring[0]];
    expect(await refusal(JSON.stringify({ type: 'Polygon', coordinates: [closed] }))).toMatch(/to and fro/);
  });

  test('by a tag of a hundred thousand attributes is given up', async () => {
    const attributes = Array.from({ length: 100_000 }, (_, i) => `a${i}="1"`).join(' ');
    expect(await refusal(`<gpx ${attributes}></gpx>`)).toMatch(/tag of thousands of letters/);
  });
});

describe('a clock that is wrong', () => {
  test.each(['0000-01-01', '1826-06-01', '2999-01-01', '9999-12-31'])(
    'is noticed at the day of a photo (%s)',
    async (takenOn) => {
      const peg = await aPeg(server, lake, { number: takenOn.slice(0, 7) });
      const answer = await owner
        .post(`/pegs/${peg.id}/photos`)
        .field('id', randomUUID())
        .field('takenOn', takenOn)
        .attach('photo', await aPhoto(), 'peg.jpg');
      expect(problem(answer.body).errors?.map(({ pointer }) => pointer)).toEqual(['/takenOn']);
    },
  );

  test('is noticed at a ticket thousands of years ahead', async () => {
    const peg = await aPeg(server, lake, { number: 'T1' });
    const body = {
      id: randomUUID(),
      email: owner.email,
      from: '9999-01-01T06:00:00Z',
      until: '9999-01-01T18:00:00Z',
    };
    const answer = await here.people.office.post(`/pegs/${peg.id}/bookings`).send(body);
    expect(problem(answer.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/from' }] });
  });

  test.each(['1970-01-01T00:00:00Z', '0001-01-01T00:00:00Z', '2031-01-01T00:00:00Z'])(
    'is noticed at a level reading (%s)',
    async (at) => {
      const board = await aBoard(server, await aLake(server, here, { name: `Clock ${at}` }));
      const answer = await here.people.bailiff
        .post(`/boards/${board.id}/readings`)
        .send({ id: randomUUID(), at, levelM: 0.6, levelText: '0.6', note: '' });
      expect(problem(answer.body).errors?.[0]?.pointer).toBe('/at');
    },
  );
});

test('a name that is taken is refused with what to do', async () => {
  const first = await aPeg(server, lake, { number: 'N1' });
  const second = await aPeg(server, lake, { number: 'N2' });
  const answer = await owner
    .put(`/pegs/${second.id}`)
    .send({ details: { ...second.details, number: first.details.number }, version: 1 });
  expect(problem(answer.body)).toMatchObject({
    kind: 'conflict',
    detail: expect.stringMatching(/Change that/),
  });
});
