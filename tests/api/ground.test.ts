import { Client } from 'pg';
import { expect, test } from 'vitest';
import { freshDatabase } from '../support/fresh-database';

test('each copy of the template is a database of its own', async () => {
  const [one, other] = await Promise.all([freshDatabase(), freshDatabase()]);
  expect(one.url).not.toBe(other.url);
  const client = new Client({ connectionString: one.url });
  await client.connect();
  const { rows } = await client.query<{ n: number }>(
    'select count(*)::int as n from information_schema.tables where table_schema = $1',
    ['public'],
  );
  expect(rows[0]?.n).toBeGreaterThan(10);
  await client.end();
  await one.drop();
  await other.drop();
});
