import { RulesToReadView } from '@mereward/shared/rules/sheet-contract';
import { randomUUID } from 'node:crypto';
import type { Test } from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { pagesOf, readsPdf } from '../support/pdf-words';
import { aRule, publishRules } from '../support/rules';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let colin: Person;
let sheetId: string;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-07-01T09:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  colin = await aPerson(server, { name: 'Colin Frayne' });
  const rules = [
    aRule(1, 'Barbless hooks only.'),
    aRule(12, 'FO3 closed: overhead line 24 m away.', { basis: 'byelaw', severity: 'remove' }),
  ];
  sheetId = (await publishRules(here, rules, 'change')).sheet?.id ?? '';
});
afterAll(() => server.close());

/** The words of a PDF, page by page. */
async function words(asked: Test): Promise<string[]> {
  const answer = await asked.buffer(true).parse((res, done) => {
    const chunks: Buffer[] = [];
    res.on('data', (chunk: Buffer) => chunks.push(chunk));
    res.on('end', () => done(null, Buffer.concat(chunks)));
  });
  expect(answer.status).toBe(200);
  expect(answer.headers['content-type']).toBe('application/pdf');
  return pagesOf(answer.body as Buffer);
}

test.runIf(readsPdf)(
  'the sheet prints its rules with their numbers, where they come from and a block to sign',
  async () => {
    const pages = await words(aStranger(server).get(`/rule-sheets/${sheetId}/sheet.pdf`));
    const all = pages.join(' ');
    for (const part of [
      'Rules of Ostlemere Waters',
      'Version 1',
      'FO3 closed: overhead line 24 m away.',
      'Byelaw',
      'Signature',
    ])
      expect(all).toContain(part);
  },
);

test.runIf(readsPdf)('large print says the same on more paper', async () => {
  const many = Array.from({ length: 24 }, (_, i) =>
    aRule(i + 1, `Rule ${i + 1} of many, said at some length.`),
  );
  const { sheet } = await publishRules(here, many, 'change');
  const path = `/rule-sheets/${sheet?.id}/sheet.pdf`;
  const plain = await words(aStranger(server).get(path));
  const large = await words(aStranger(server).get(`${path}?print=large`));
  expect(large.length).toBeGreaterThan(plain.length);
  expect(large.join(' ')).toContain('Rule 24 of many');
  expect((await aStranger(server).get(`${path}?print=huge`)).status).toBe(400);
});

test.runIf(readsPdf)(
  'a dispute prints exactly what was accepted, when and how, for the office and for themselves only',
  async () => {
    server.setNow('2027-07-02T09:00:00Z');
    const rules = [aRule(1, 'Barbless hooks only.'), aRule(2, 'No fires.')];
    const { sheet } = await publishRules(here, rules, 'change');
    const version = { major: sheet?.major ?? 0, minor: 0 };
    const lake = await aLake(server, here);
    const peg = await aPeg(server, lake);
    const times = { from: '2027-07-17T06:00:00Z', until: '2027-07-17T18:00:00Z' };
    const bookingId = await aTicket(server, { pegId: peg.id, holder: colin, ...times });
    const witnessed = {
      id: randomUUID(),
      version,
      method: 'verbal',
      at: '2027-07-02T08:52:00Z',
      language: 'en-GB',
    };
    await here.people.bailiff.post(`/bookings/${bookingId}/rules/witnessed`).send(witnessed);
    await publishRules(here, [aRule(1, 'All is different now.')], 'change'); // later rules are no part of it
    const [reading] = RulesToReadView.parse((await colin.get(`/bookings/${bookingId}/rules`)).body).readings;
    const path = `/rule-readings/${reading?.id}/proof.pdf`;
    const all = (await words(here.people.office.get(path))).join(' ');
    for (const part of [
      'Colin Frayne',
      'read out by a witness',
      'The bailiff',
      '09:52',
      '10:00',
      'No fires.',
    ])
      expect(all).toContain(part);
    expect(all).not.toContain('All is different now.');
    await words(colin.get(path));
    expect((await here.people.member.get(path)).status).toBe(404);
    expect((await aStranger(server).get(path)).status).toBe(401);
  },
);
