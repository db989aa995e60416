import { Peg } from '@mereward/db/entities/lakes/peg';
import { PegCodes1780000009000 } from '@mereward/db/migrations/1780000009000-PegCodes';
import { readPegCode } from '@mereward/shared/lakes/peg-code';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { aServer, type TestServer } from '../support/server';
import { aFishery, aLake, aPeg, type TestLake } from '../support/waters';

let server: TestServer;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
  lake = await aLake(server, await aFishery(server));
});
afterAll(() => server.close());

const codes = async (): Promise<Record<string, string>> => {
  const pegs = await server.server.source.manager.find(Peg, { order: { id: 'ASC' } });
  return Object.fromEntries(pegs.map(({ id, code }) => [id, code]));
};

const Row = z.tuple([z.object({ code: z.string() })]);
const codeOf = async (id: string, attempt: number): Promise<string> =>
  Row.parse(await server.server.source.query('SELECT peg_code_of($1, $2) AS code', [id, attempt]))[0].code;

describe('a peg’s code', () => {
  test('is given to every new peg, and no two share one', async () => {
    for (let i = 1; i <= 30; i++) await aPeg(server, lake, { number: `C${i}` });
    const given = Object.values(await codes());
    expect(given.length).toBeGreaterThanOrEqual(30);
    expect(new Set(given).size).toBe(given.length);
    expect(given.map((code) => readPegCode(code))).toEqual(given);
  });

  test('comes out the same when the pegs are brought up again', async () => {
    const before = await codes();
    const q = server.server.source.createQueryRunner();
    const migration = new PegCodes1780000009000();
    await migration.down(q);
    await migration.up(q);
    await q.release();
    expect(await codes()).toEqual(before);
  });

  test('steps aside for one that is taken', async () => {
    const { id } = await aPeg(server, lake, { number: 'T1' });
    const next = randomUUID();
    await server.server.source.query('UPDATE peg SET code = $2 WHERE id = $1', [id, await codeOf(next, 0)]);
    const { createdBy } = await server.server.source.manager.findOneByOrFail(Peg, { id });
    const { details } = await aPeg(server, lake, { number: 'T2' });
    await server.server.source.manager.insert(Peg, {
      id: next,
      lakeId: lake.id,
      number: 'T3',
      walkingOrder: 99,
      details,
      version: 1,
      createdBy,
      createdAt: server.server.clock(),
    });
    expect((await codes())[next]).toBe(await codeOf(next, 1));
  });

  test('is neither chosen nor changed by what the program writes', async () => {
    const { id } = await aPeg(server, lake, { number: 'K1' });
    const before = (await codes())[id];
    await server.server.source.manager.update(Peg, { id }, { code: '333333', number: 'K2' });
    expect((await codes())[id]).toBe(before);
  });
});
