import { verifyMessage } from '@mereward/api/mail/messages';
import { post } from '@mereward/api/mail/send';
import { randomUUID } from 'node:crypto';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
beforeEach(async () => {
  here = await aServer();
});
afterEach(() => here.close());

/** Queues a mail and takes it in hand as a process that is killed right after: it is begun and never ends. */
async function anOrphan(): Promise<string> {
  const address = `${randomUUID()}@anglers.example`;
  const { source, jobs } = here.server;
  await source.transaction((tx) =>
    post({ tx, jobs }, verifyMessage({ email: address, name: 'Ada' }, 'http://127.0.0.1/verify?token=x')),
  );
  await source.query(
    `UPDATE pgboss.job SET state = 'active', started_on = now()
     WHERE name = 'mail.send' AND data ->> 'to' = $1`,
    [address],
  );
  return address;
}

const came = (address: string) => here.mails.some(({ to }) => to === address);
const soon = { timeout: 10_000, interval: 50 };

test('a job in hand when its process was killed is done by the next process at once', async () => {
  const address = await anOrphan();
  expect(await here.settle()).toBe(0);
  await here.startWorker();
  await vi.waitFor(() => expect(came(address)).toBe(true), soon);
});

test('a job in hand of another living process is left to it', async () => {
  await here.startWorker();
  const inHand = await anOrphan();
  await here.startWorker();
  const waiting = `${randomUUID()}@anglers.example`;
  const { source, jobs } = here.server;
  await source.transaction((tx) =>
    post({ tx, jobs }, verifyMessage({ email: waiting, name: 'Ada' }, 'http://127.0.0.1/verify?token=x')),
  );
  await vi.waitFor(() => expect(came(waiting)).toBe(true), soon);
  expect(came(inHand)).toBe(false);
});

test('a job that took its process down each time is not tried for ever', async () => {
  const address = await anOrphan();
  await here.server.source.query('UPDATE pgboss.job SET retry_count = retry_limit');
  await here.startWorker();
  const state = () =>
    here.server.source.query(`SELECT state FROM pgboss.job WHERE data ->> 'to' = $1`, [address]);
  expect(await state()).toEqual([{ state: 'failed' }]);
});
