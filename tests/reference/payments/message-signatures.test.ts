import { readConfig } from '@mereward/api/config';
import { signatureOf } from '@mereward/api/demo/card-provider/deliveries';
import { providerOf, readMessage } from '@mereward/api/payments/provider';
import { expect, test } from 'vitest';
import fixture from '../fixtures/12_security.json';

/**
 * Signatures of a card provider's messages: good, tampered, stale, of another secret, of two secrets, without a scheme.
 * Source: Stripe's documented scheme, vectors worked out with OpenSSL (see the fixture's meta). Tolerance: exact.
 */
async function isHeard({ payload, header, secret, now }: (typeof fixture.stripe)[number]): Promise<boolean> {
  const cards = { STRIPE_SECRET_KEY: 'sk_test_reference', STRIPE_WEBHOOK_SECRET: secret };
  const provider = await providerOf(readConfig({ DATABASE_URL: 'postgres://nowhere/none', ...cards }));
  if (!provider) throw new Error('No cards are taken');
  const sent = { body: Buffer.from(payload), signature: header, receivedAtMs: now * 1000 };
  return readMessage(provider, sent) !== null;
}

test.each(fixture.stripe)('$id: $why', async (message) => {
  expect(message.tolerance_s).toBe(300);
  expect(await isHeard(message)).toBe(message.valid);
});

test('the demo’s provider signs as the good ones are signed', () => {
  const [first] = fixture.stripe;
  expect(first && signatureOf(first.payload, first.secret, 1767225600)).toBe(first?.header);
});
