import { Problem } from '@mereward/shared/problems/problem';
import { isDeepStrictEqual } from 'node:util';
import type { EntityManager, EntityTarget, ObjectLiteral } from 'typeorm';
import type { QueryDeepPartialEntity } from 'typeorm/query-builder/QueryPartialEntity.js';

/** Inserts a row unless its id, or anything else that must be unique, is taken; answers whether it was inserted. */
export async function insertOnce<Row extends ObjectLiteral>(
  tx: EntityManager,
  entity: EntityTarget<Row>,
  row: QueryDeepPartialEntity<Row>,
): Promise<boolean> {
  const answer = await tx
    .createQueryBuilder()
    .insert()
    .into(entity)
    .values(row)
    .orIgnore()
    .returning('id')
    .execute();
  const rows: unknown = answer.raw;
  return Array.isArray(rows) && rows.length > 0;
}

type Kept = { by: string; content: unknown };

/**
 * A record made on a phone carries the phone's own id, and may be sent again when an answer was lost. The same
 * id from the same person with the same content is done already; with another content it is another record.
 */
export function mustRepeat(asked: Kept, kept: Kept): void {
  if (asked.by === kept.by && isDeepStrictEqual(plain(asked.content), plain(kept.content))) return;
  throw new Problem('conflict', 'Something else is kept under this id already', {
    detail: 'Nothing was changed. Reload to see what is kept, then send yours anew.',
  });
}

/** As it travels and as rows keep it: a nought with a sign is a nought. */
export const plain = (content: unknown): unknown => JSON.parse(JSON.stringify(content));

/** What to say when the version sent is not the row's. */
export const staleVersion = (): Problem =>
  new Problem('conflict', 'Someone changed this meanwhile', {
    detail: 'Yours was not saved. Reload to see their change, then make yours again.',
  });

/** Refuses with every fault named, each with a pointer into the request's `details`. */
export function refuseFaults(faults: readonly { field: string; words: string }[]): void {
  if (faults.length === 0) return;
  throw new Problem('invalid', faults[0]?.words ?? 'Something is not right', {
    detail: 'Nothing was saved. Put right what is named below and send again.',
    errors: faults.map(({ field, words }) => ({ pointer: `/details/${field}`, detail: words })),
  });
}
