// Source: RFC 7515 appendix A.1 (its own token and key) and tokens made by hand after RFC 7515 and RFC 7519.
// Tolerance: exact; a signature and a time limit hold or they don't.
import { verifiedClaims } from '@mereward/api/http/session';
import { createSecretKey } from 'node:crypto';
import { expect, test } from 'vitest';
import { z } from 'zod';
import fixture from '../fixtures/12_security.json';

const Case = z.object({
  id: z.string(),
  token: z.string(),
  hmac_key_utf8: z.string(),
  now: z.number(),
  valid: z.boolean().nullable(), // null: either outcome is tolerated
  why: z.string(),
});

const cases = z.array(Case).min(9).parse(fixture.jwt);

const opens = (key: Buffer, token: string, nowS: number): boolean => {
  try {
    return Boolean(verifiedClaims(createSecretKey(key), token, new Date(nowS * 1000)));
  } catch {
    return false;
  }
};

test.each(cases.filter(({ valid }) => valid !== null))(
  '$id: $why',
  ({ token, hmac_key_utf8, now, valid }) => {
    expect(opens(Buffer.from(hmac_key_utf8), token, now)).toBe(valid);
  },
);

test.each(cases.filter(({ valid }) => valid === null))('$id ends in an answer: $why', (each) => {
  expect(typeof opens(Buffer.from(each.hmac_key_utf8), each.token, each.now)).toBe('boolean');
});

test('the token of RFC 7515 A.1 bears its signature until it runs out', () => {
  const { token, key_base64url, exp } = fixture.jwt_rfc7515_A1;
  const key = Buffer.from(key_base64url, 'base64url');
  expect(opens(key, token, exp - 1)).toBe(true);
  expect(opens(key, token, exp)).toBe(false);
  expect(opens(Buffer.from([...key].reverse()), token, exp - 1)).toBe(false);
});
