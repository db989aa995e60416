import { QueryFailedError } from 'typeorm';
import { expect, test } from 'vitest';
import { isDatabaseAway } from './database-away';

const coded = (code: string) => Object.assign(new Error('words'), { code });

test('a database that went away is told from a statement that was wrong', () => {
  for (const code of ['ECONNREFUSED', '57P01', '57P03', '08006']) {
    expect(isDatabaseAway(coded(code))).toBe(true);
    expect(isDatabaseAway(new QueryFailedError('SELECT 1', [], coded(code)))).toBe(true);
  }
  expect(isDatabaseAway(new Error('Connection terminated unexpectedly'))).toBe(true);
  for (const code of ['23505', '22P02', 'ENOENT']) expect(isDatabaseAway(coded(code))).toBe(false);
  expect(isDatabaseAway(new TypeError('x is undefined'))).toBe(false);
  expect(isDatabaseAway('57P01')).toBe(false);
});
