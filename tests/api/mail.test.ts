import { verifyMessage } from '@mereward/api/mail/messages';
import { post } from '@mereward/api/mail/send';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
beforeAll(async () => {
  here = await aServer();
});
afterAll(() => here.close());

const link = 'http://127.0.0.1:4310/verify?token=abc';
const queue = (email: string) =>
  here.server.source.transaction((tx) =>
    post({ tx, jobs: here.server.jobs }, verifyMessage({ email, name: 'Ada <b>Reed</b>' }, link)),
  );

test('a mail leaves once its deed is committed, and says the same in both its forms', async () => {
  await queue('ada@anglers.example');
  expect(here.mails).toHaveLength(0);
  const mail = await here.mailTo('ada@anglers.example');
  expect(mail.links).toEqual([link]);
  expect(mail.html).toContain('Ada &lt;b&gt;Reed&lt;/b&gt;');
  expect(mail.html).toContain(`href="${link}"`);
  expect(mail.text).toContain('Ada <b>Reed</b>');
  expect(mail.sentAt.toISOString()).toBe('2027-04-03T09:00:00.000Z');
});
