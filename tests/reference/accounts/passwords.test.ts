// Source: argon2id hashes of RFC 9106 form computed by the reference implementation's command line, and the list of
// settings in the OWASP Password Storage Cheat Sheet. Tolerance: exact.
import { passwordFits, passwordHash } from '@mereward/api/accounts/password';
import { expect, test } from 'vitest';
import fixture from '../fixtures/12_security.json';

test.each(fixture.argon2id_vectors)(
  'a hash made elsewhere with m=$m_KiB t=$t fits its password alone',
  async (each) => {
    expect(await passwordFits(each.encoded, each.password)).toBe(true);
    expect(await passwordFits(each.encoded, `${each.password} `)).toBe(false);
  },
);

test('new hashes are argon2id with settings OWASP lists, each with a salt of its own', async () => {
  const [one = '', other = ''] = await Promise.all([
    passwordHash('the same twice'),
    passwordHash('the same twice'),
  ]);
  const [, kind, version, settings = '', salt = ''] = one.split('$');
  expect([kind, version]).toEqual(['argon2id', 'v=19']);
  const listed = fixture.meta.argon2id.settings.map(({ m_KiB, t, p }) => `m=${m_KiB},t=${t},p=${p}`);
  expect(listed).toContain(settings);
  expect(Buffer.from(salt, 'base64')).toHaveLength(16);
  expect(other.split('$')[4]).not.toBe(salt);
});

test('no account at all fits no password', async () => {
  expect(await passwordFits(null, 'nobody has this password')).toBe(false);
});
