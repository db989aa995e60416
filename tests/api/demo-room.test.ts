import { makeDataSource } from '@mereward/db/data-source';
import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { OSTLEMERE, OSTLEMERE_ID } from '../../apps/api/src/demo/fishery';
import { roomForDemo } from '../../apps/api/src/demo/room-for-demo';
import { freshDatabase } from '../support/fresh-database';
import type { Database } from '../support/test-cluster';

let database: Database;
beforeAll(async () => (database = await freshDatabase()));
afterAll(() => database.drop());

test('the demo goes into a database that holds nobody, and never among people of a real one', async () => {
  expect(await roomForDemo(database.url)).toBe(true);
  const source = await makeDataSource(database.url, 1).initialize();
  await source.manager.insert(Account, {
    id: randomUUID(),
    email: 'una@water.example',
    name: 'Una',
    passwordHash: 'not a hash of any password',
    emailVerifiedAt: null,
    units: { length: 'm', stickSpacingM: 3.6576 },
    createdAt: new Date('2026-05-01T09:00:00Z'),
  });
  await source.destroy();
  expect(await roomForDemo(database.url)).toBe(false);
});

test('people beside the demo keep it shown', async () => {
  const source = await makeDataSource(database.url, 1).initialize();
  const owner = await source.manager.findOneByOrFail(Account, { email: 'una@water.example' });
  await source.manager.insert(Fishery, {
    id: OSTLEMERE_ID,
    name: OSTLEMERE.name,
    zone: OSTLEMERE.zone,
    details: OSTLEMERE,
    version: 1,
    createdBy: owner.id,
    createdAt: new Date('2026-05-01T09:00:00Z'),
  });
  await source.destroy();
  expect(await roomForDemo(database.url)).toBe(true);
});
