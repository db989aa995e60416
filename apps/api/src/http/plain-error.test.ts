import { expect, test } from 'vitest';
import { plainError } from './plain-error';

test('a refused statement keeps the names of things and none of the row', () => {
  const error = Object.assign(new Error('duplicate key: ada@anglers.example'), {
    name: 'QueryFailedError',
    parameters: ['ada@anglers.example'],
    driverError: {
      code: '23505',
      constraint: 'account_email',
      table: 'account',
      detail: '(ada@anglers.example)',
    },
  });
  const plain = plainError(error);
  expect(plain).toMatchObject({ code: '23505', constraint: 'account_email', table: 'account' });
  expect(JSON.stringify(plain)).not.toContain('ada@');
});

test.each([
  ['550 no such user <ada.reed@anglers.example>', '550 no such user <…@…>'],
  ['rcpt=ada@anglers.example;x', 'rcpt=…@…;x'],
  ['Invalid recipient ada@anglers.example: refused', 'Invalid recipient …@… refused'],
  ['connect ECONNREFUSED 127.0.0.1:25', 'connect ECONNREFUSED 127.0.0.1:25'],
])('a message loses its addresses: %s', (message, kept) => {
  const plain = plainError(new TypeError(message));
  expect(plain).toMatchObject({ type: 'TypeError', message: kept });
  expect(plain.stack).toMatch(/^\s+at /);
  expect(plain.stack).not.toContain('ada');
});

test('what is no error is not written down', () => {
  expect(JSON.stringify(plainError('ada@anglers.example'))).not.toContain('ada');
});
