import { z } from 'zod';
import { expect, test } from 'vitest';
import { newId } from './new-id';

test('every id is a version 4 UUID and no two are alike', () => {
  const ids = Array.from({ length: 1000 }, newId);
  for (const id of ids) expect(z.uuidv4().safeParse(id).success).toBe(true);
  expect(new Set(ids).size).toBe(1000);
});
