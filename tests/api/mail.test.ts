import { handlers } from '@mereward/api/handlers';
import { makeLogger } from '@mereward/api/http/logging';
import { verifyMessage } from '@mereward/api/mail/messages';
import { post } from '@mereward/api/mail/send';
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { aServer, type TestServer } from '../support/server';
import { anSmtpGate, type SmtpGate } from '../support/smtp-gate';

let here: TestServer;
let gate: SmtpGate;
beforeAll(async () => {
  gate = await anSmtpGate();
  here = await aServer({ env: { SMTP_URL: gate.url, DEMO: 'true' } });
  gate.leadTo(here.captureUrl);
});
afterAll(async () => {
  await here.close();
  await gate.close();
});

const link = 'http://127.0.0.1:4310/verify?token=abc_-9';
const name = 'Ada <b onclick="x()">Reed</b>';
const queue = (email: string) =>
  here.server.source.transaction((tx) =>
    post({ tx, jobs: here.server.jobs }, verifyMessage({ email, name }, link)),
  );
const anAddress = () => `${randomUUID()}@anglers.example`;
const mailsTo = (address: string) => here.mails.filter(({ to }) => to === address);

describe('a mail', () => {
  test('leaves once its deed is committed, and says the same in both its forms', async () => {
    const address = anAddress();
    await queue(address);
    expect(mailsTo(address)).toHaveLength(0);
    const mail = await here.mailTo(address);
    expect(mail.links).toEqual([link]);
    expect(mail.text).toContain(name);
    expect(mail.html).toContain('Ada &lt;b onclick=&quot;x()&quot;&gt;Reed&lt;/b&gt;');
    expect(mail.html).toContain(`href="${link}"`);
    expect(mail.html).toContain('<meta name="viewport" content="width=device-width,initial-scale=1">');
    expect(mail.sentAt.toISOString()).toBe('2027-04-03T09:00:00.000Z');
  });

  test('of a deed that fails never leaves', async () => {
    const address = anAddress();
    const failing = here.server.source.transaction(async (tx) => {
      await post({ tx, jobs: here.server.jobs }, verifyMessage({ email: address, name }, link));
      throw new RangeError('the deed fails after its mail was queued');
    });
    await expect(failing).rejects.toThrow(RangeError);
    expect(await here.settle()).toBe(0);
    expect(mailsTo(address)).toHaveLength(0);
  });

  test('is tried again when the mail server is away, and bears the same Message-ID each time', async () => {
    const address = anAddress();
    await queue(address);
    gate.shut();
    await expect(here.settle()).rejects.toThrow();
    await expect(here.settle()).rejects.toThrow();
    expect(mailsTo(address)).toHaveLength(0);
    gate.open();
    expect(await here.settle()).toBe(1);
    expect(mailsTo(address)).toHaveLength(1);
    expect(await here.settle()).toBe(0);
    const job = { id: randomUUID(), payload: verifyMessage({ email: address, name }, link), attempt: 1 };
    const log = makeLogger(here.server.config);
    await handlers['mail.send']?.(job, here.server, log);
    await handlers['mail.send']?.({ ...job, attempt: 2 }, here.server, log);
    expect(mailsTo(address).map(({ id }) => id)).toContain(`<${job.id}@127.0.0.1>`);
    expect(mailsTo(address)).toHaveLength(2); // the one queued, and the one handed over twice
  });

  test('is handed over once by two workers that work side by side', async () => {
    const addresses = Array.from({ length: 12 }, anAddress);
    const before = gate.passed();
    await Promise.all(addresses.map(queue));
    await here.startWorker();
    await here.startWorker();
    const come = () => addresses.filter((address) => mailsTo(address).length === 1);
    await vi.waitFor(() => expect(come()).toHaveLength(12), { timeout: 15_000, interval: 50 });
    await here.stopWorkers(); // what follows does its mail itself
    expect(gate.passed() - before).toBe(12);
  });

  test('is forgotten by the queue once it was sent', async () => {
    const address = anAddress();
    await queue(address);
    await here.mailTo(address);
    const kept = await here.server.source.query(
      `SELECT (SELECT count(*) FROM pgboss.job WHERE data::text LIKE $1 OR output::text LIKE $1)
            + (SELECT count(*) FROM pgboss.archive WHERE data::text LIKE $1) AS n`,
      [`%${address}%`],
    );
    expect(Number(kept[0].n)).toBe(0);
  });

  test('keeps a line break in a name out of its headings', async () => {
    const address = anAddress();
    const { subject } = verifyMessage({ email: address, name: 'x\r\nBcc: all@anglers.example' }, link);
    expect(subject).not.toMatch(/[\r\n]/);
  });
});

describe('the demo’s page of caught mail', () => {
  const page = (path: string) => request(here.app).get(path);

  test('shows each mail as text with its links, and runs nothing', async () => {
    const address = anAddress();
    await queue(address);
    await here.mailTo(address);
    const answer = await page('/demo/mail');
    expect(answer.status).toBe(200);
    expect(answer.text).toContain(address);
    expect(answer.text).toContain('Ada &lt;b onclick=&quot;x()&quot;&gt;Reed&lt;/b&gt;');
    expect(answer.text).toContain(`<a href="${link}">`);
    expect(answer.text).not.toMatch(/<script|<b onclick/i);
    expect(answer.get('Content-Security-Policy')).toContain("script-src 'self'");
    expect(answer.get('Cache-Control')).toBe('no-store');
  });

  test('is there as JSON, the newest first', async () => {
    const [older, newer] = [anAddress(), anAddress()];
    await queue(older);
    await here.mailTo(older);
    await queue(newer);
    await here.mailTo(newer);
    const { mails } = (await page('/demo/mail.json')).body;
    expect(mails.slice(0, 2).map(({ to }: { to: string }) => to)).toEqual([newer, older]);
    expect(mails[0].links).toEqual([link]);
  });

  test('is not there where no demo was asked for', async () => {
    const plain = await aServer();
    try {
      expect((await request(plain.app).get('/demo/mail.json')).status).toBe(404);
      expect((await request(plain.app).get('/demo/mail')).text).not.toContain('caught');
    } finally {
      await plain.close();
    }
  });
});
